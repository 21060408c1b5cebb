import { plainDate } from '../../../dates/plain-date'
import type { RulePack } from '../../pack'
import { leakRepairDuties } from '../leak-repair-duties'
import { chronicLoss } from './chronic-loss'
import { leastChargeKg } from './least-charge'
import { retention } from './retention'
import { threshold } from './threshold'

/** Until 9 April 2020 the section covered substitutes too; what they owed then is not computed, as its records have passed their 3 years. */
export const usOds: RulePack = {
  id: 'us-ods',
  jurisdictions: ['US', 'US-CA'],
  scope: { refrigerants: { kind: 'ozone-depleting' }, leastChargeKg, exceptsSubsector: false },
  threshold,
  duties: leakRepairDuties('40 CFR 82.157', plainDate('2019-01-01'), 'memory'),
  chronicLoss,
  retention,
}
