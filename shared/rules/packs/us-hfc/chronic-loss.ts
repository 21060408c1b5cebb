import { plainDate } from '../../../dates/plain-date'
import { percent, type Percent } from '../../../leak-rate/percent'
import { dated } from '../../dated'
import { CHECKED_ON } from '../checked-on'

/** [% of full charge lost in a calendar year] at or above which the leak is chronic and reported. */
export const chronicLoss = dated<Percent>({
  name: 'chronicLoss',
  values: [{ from: plainDate('2026-01-01'), value: percent('125'), source: { cite: '40 CFR 84.106(j)', basis: 'memory' }, checkedOn: CHECKED_ON }],
})
