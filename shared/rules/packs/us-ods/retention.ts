import { plainDate } from '../../../dates/plain-date'
import { dated } from '../../dated'
import { CHECKED_ON } from '../checked-on'

/** [years] records are kept at least this long. */
export const retention = dated<number>({
  name: 'retention',
  values: [{ from: plainDate('2019-01-01'), value: 3, source: { cite: '40 CFR 82.157(l)', basis: 'memory' }, checkedOn: CHECKED_ON }],
})
