import { plainDate } from '../../../dates/plain-date'
import { lb, type Mass } from '../../../mass/mass'
import { dated } from '../../dated'
import { CHECKED_ON } from '../checked-on'

/** [kg] an appliance with a full charge of this much or more is covered. */
export const leastChargeKg = dated<Mass>({
  name: 'leastCharge',
  values: [{ from: plainDate('2019-01-01'), value: lb('50'), source: { cite: '40 CFR 82.157(a)', basis: 'read' }, checkedOn: CHECKED_ON }],
})
