import { plainDate } from '../../../dates/plain-date'
import { percent } from '../../../leak-rate/percent'
import { dated } from '../../dated'
import type { ByCategory } from '../../pack'
import type { Percent } from '../../../leak-rate/percent'
import { CHECKED_ON } from '../checked-on'

/** [% of full charge per 12 months] above which, not at which, action is due. */
export const threshold = dated<ByCategory<Percent>>({
  name: 'threshold',
  values: [{
    from: plainDate('2019-01-01'),
    value: { 'industrial-process': percent('30'), commercial: percent('20'), 'comfort-cooling': percent('10'), other: percent('10') },
    source: { cite: '40 CFR 82.157(c)(2)', basis: 'read' },
    checkedOn: CHECKED_ON,
  }],
})
