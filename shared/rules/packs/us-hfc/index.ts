import { plainDate } from '../../../dates/plain-date'
import type { RulePack } from '../../pack'
import { leakRepairDuties } from '../leak-repair-duties'
import { chronicLoss } from './chronic-loss'
import { gwpAbove } from './gwp-above'
import { leastChargeKg } from './least-charge'
import { retention } from './retention'
import { threshold } from './threshold'

export const usHfc: RulePack = {
  id: 'us-hfc',
  jurisdictions: ['US', 'US-CA'],
  scope: { refrigerants: { kind: 'hfc-or-substitute', gwpAbove }, leastChargeKg, exceptsSubsector: true },
  threshold,
  duties: leakRepairDuties('40 CFR 84.106', plainDate('2026-01-01'), 'memory'),
  chronicLoss,
  retention,
}
