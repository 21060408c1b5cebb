import { plainDate } from '../../../dates/plain-date'
import { lb, type Mass } from '../../../mass/mass'
import { dated } from '../../dated'
import { CHECKED_ON } from '../checked-on'

/** [kg] an appliance with a full charge of this much or more is covered. */
export const leastChargeKg = dated<Mass>({
  name: 'leastCharge',
  values: [{ from: plainDate('2026-01-01'), value: lb('15'), source: { cite: '40 CFR 84.106(a)', basis: 'memory' }, checkedOn: CHECKED_ON }],
})
