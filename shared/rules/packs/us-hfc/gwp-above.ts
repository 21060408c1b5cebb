import { plainDate } from '../../../dates/plain-date'
import { dated } from '../../dated'
import { CHECKED_ON } from '../checked-on'

/** [GWP, AR4 100-year] a substitute above this value is covered, whether or not it contains an HFC. */
export const gwpAbove = dated<string>({
  name: 'gwpAbove',
  values: [{ from: plainDate('2026-01-01'), value: '53', source: { cite: '40 CFR 84.106(a)', basis: 'memory' }, checkedOn: CHECKED_ON }],
})
