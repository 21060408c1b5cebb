import type { LeakRateMethod } from '../api/places'
import { isNegative, isPositive, kg, larger, MASS_SCALE, minus, ZERO_MASS, type Mass } from '../mass/mass'
import { Exact } from '../units/decimal'
import { percentOfQuotient, type Percent } from './percent'

/** [d] the year of the leak rate: longer spans count as this many days */
export const YEAR_DAYS = 365

/** What the annualizing method divides. */
export interface LeakAddition {
  addedKg: Mass
  fullChargeKg: Mass
  days: number
}

/**
 * Leak rate by the annualizing method: added / full charge × 365 / min(days, 365).
 *
 * @param addedKg  [kg] all additions for this leak, summed; > 0
 * @param fullChargeKg  [kg] > 0
 * @param days  [d] whole days from the last addition before that leak; ≥ 1; above 365 counts as 365
 * @returns [% of full charge per 12 months], exact, not rounded
 * @throws RangeError if a mass is not positive or days < 1: the caller groups same-day additions first
 * @see 40 CFR 82.152, "leak rate", annualizing method
 */
export function annualizedLeakRate({ addedKg, fullChargeKg, days }: LeakAddition): Percent {
  requirePositive(addedKg, 'What was added')
  requirePositive(fullChargeKg, 'The full charge')
  return percentOfQuotient(addedKg.times(YEAR_DAYS), fullChargeKg.times(countedDays(days)))
}

/**
 * Leak rate by the rolling average method: what was added in the window / full charge.
 *
 * @param addedKg  [kg] the sum over the window; > 0
 * @param fullChargeKg  [kg] > 0
 * @returns [% of full charge per 12 months], exact, not rounded
 * @throws RangeError if a mass is not positive
 * @see 40 CFR 82.152, "leak rate", rolling average method
 */
export function rollingLeakRate({ addedKg, fullChargeKg }: Omit<LeakAddition, 'days'>): Percent {
  requirePositive(addedKg, 'What was added')
  requirePositive(fullChargeKg, 'The full charge')
  return percentOfQuotient(addedKg, fullChargeKg)
}

/** What may still be added before a threshold is passed. */
export interface Room {
  /** [kg] may still be added; zero once the threshold is reached */
  roomKg: Mass
  /** [kg] added beyond the threshold; zero while it is not passed */
  overByKg: Mass
}

/**
 * How much may still be added before the leak rate is above the threshold. Adding exactly the room gives
 * at most the threshold, which is not above it; where the division does not come out even, the room is
 * rounded down to what storage keeps.
 *
 * @param threshold  [% of full charge per 12 months] ≥ 0
 * @param fullChargeKg  [kg] > 0
 * @param days  [d] from the last addition before that leak; ≥ 1; the rolling method does not use it
 * @param alreadyAddedKg  [kg] counted for the same leak, or in the window; ≥ 0
 * @throws RangeError if the full charge is not positive, what was added negative, or days < 1
 */
export function roomBeforeThreshold({ threshold, fullChargeKg, days, alreadyAddedKg, method }: {
  threshold: Percent
  fullChargeKg: Mass
  days: number
  alreadyAddedKg: Mass
  method: LeakRateMethod
}): Room {
  requirePositive(fullChargeKg, 'The full charge')
  if (isNegative(alreadyAddedKg)) throw new RangeError('What was added is not negative.')
  const yearShare = method === 'annualizing' ? countedDays(days) : YEAR_DAYS
  const limit = threshold.times(fullChargeKg).times(yearShare).dividedBy(100 * YEAR_DAYS)
  const leftKg = minus(kg(limit.toFixed(MASS_SCALE, Exact.ROUND_DOWN)), alreadyAddedKg)
  return { roomKg: larger(ZERO_MASS, leftKg), overByKg: larger(ZERO_MASS, minus(ZERO_MASS, leftKg)) }
}

function countedDays(days: number): number {
  if (!Number.isInteger(days) || days < 1) throw new RangeError(`A leak rate needs at least one whole day, not ${days}.`)
  return Math.min(days, YEAR_DAYS)
}

function requirePositive(mass: Mass, name: string): void {
  if (!isPositive(mass)) throw new RangeError(`${name} is not positive: ${mass.toFixed()} kg.`)
}
