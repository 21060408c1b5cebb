import { plainDate } from '../../../dates/plain-date'
import type { RulePack } from '../../pack'
import { leakRepairDuties } from '../leak-repair-duties'
import { leastChargeKg } from './least-charge'
import { retention } from './retention'
import { threshold } from './threshold'

export const usOds: RulePack = {
  id: 'us-ods',
  jurisdictions: ['US', 'US-CA'],
  scope: { refrigerants: { kind: 'ozone-depleting' }, leastChargeKg, exceptsSubsector: false },
  threshold,
  duties: leakRepairDuties('40 CFR 82.157', plainDate('2019-01-01'), 'memory'),
  retention,
}
