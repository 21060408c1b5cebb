import type { YearlyCylinderRow } from '../api/cylinders'
import { kg, minus, plus, sumMass, toKgText, type Mass } from './mass'

/** Columns of the yearly cylinder ledger that make the stock larger, the opening stock first. */
export const YEARLY_IN = ['openingKg', 'boughtKg', 'recoveredKg', 'receivedKg', 'transferredInKg', 'takenUpKg', 'varianceKg'] as const
/** Columns that make it smaller, and what is left at the end. */
export const YEARLY_OUT = ['chargedKg', 'returnedKg', 'reclaimedKg', 'destroyedKg', 'transferredOutKg', 'closingKg'] as const
const YEARLY_MASSES = [...YEARLY_IN, ...YEARLY_OUT]

/**
 * By how much a row does not add up: all that came in less all that went out and what is left.
 *
 * @returns [kg] zero in a true ledger
 */
export function yearlyImbalance(row: YearlyCylinderRow): Mass {
  return minus(sumMass(YEARLY_IN.map((column) => kg(row[column]))), sumMass(YEARLY_OUT.map((column) => kg(row[column]))))
}

/** Adds a row to a total of the same refrigerant, column by column. */
export function addYearly(total: YearlyCylinderRow, row: YearlyCylinderRow): YearlyCylinderRow {
  const sums = YEARLY_MASSES.map((column) => [column, toKgText(plus(kg(total[column]), kg(row[column])))] as const)
  return { ...total, ...Object.fromEntries(sums) }
}
