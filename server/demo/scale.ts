import type { EnteredWeighing } from '../../shared/api/ledger'
import { kg, larger, lb, plus, ratio, scaled, type Mass } from '../../shared/mass/mass'

/** The units in which the demo's people weigh, each with the step of its scale. */
export type ScaleUnit = 'lb' | 'lb-oz' | 'kg'
const STEP: Record<ScaleUnit, Mass> = { 'lb': lb('0.05'), 'lb-oz': lb('0.03125'), 'kg': kg('0.01') } // half an ounce is 1/32 lb
const HALF_OUNCES = 32 // in a pound

const stepsOf = (unit: ScaleUnit, mass: Mass): number => ratio(mass, STEP[unit]).round().toNumber()
const massOf = (unit: ScaleUnit, steps: number): Mass => scaled(STEP[unit], String(steps))

/** The mass that the scale would show, one step at least. */
export const weighed = (unit: ScaleUnit, mass: Mass): Mass => larger(massOf(unit, stepsOf(unit, mass)), STEP[unit])

/** The most that the scale can show without going beyond the mass. */
export const weighedAtMost = (unit: ScaleUnit, mass: Mass): Mass => massOf(unit, ratio(mass, STEP[unit]).floor().toNumber())

/** The readings under a cylinder that gives `taken`, an amount the scale can show. Their difference is exactly that amount. */
export function readingsOfGiving(unit: ScaleUnit, gross: Mass, taken: Mass): EnteredWeighing {
  const before = stepsOf(unit, gross)
  return { unit, before: reading(unit, before), after: reading(unit, before - stepsOf(unit, taken)), amount: null }
}

/** The readings under a cylinder that takes `given` in. */
export function readingsOfTaking(unit: ScaleUnit, gross: Mass, given: Mass): EnteredWeighing {
  const { before, after } = readingsOfGiving(unit, plus(gross, given), given)
  return { unit, before: after, after: before, amount: null }
}

/** The amount alone, read as the difference on a zeroed scale. */
export const amountOnScale = (unit: ScaleUnit, amount: Mass): EnteredWeighing =>
  ({ unit, before: null, after: null, amount: reading(unit, stepsOf(unit, amount)) })

function reading(unit: ScaleUnit, steps: number): string {
  if (unit === 'kg') return (steps / 100).toFixed(2)
  if (unit === 'lb') return (steps / 20).toFixed(2)
  return `${Math.floor(steps / HALF_OUNCES)}-${(steps % HALF_OUNCES) / 2}`
}

