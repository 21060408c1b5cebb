import { FULL_CHARGE_METHODS, type FullChargeDraft } from '../../shared/api/places'
import type { PlainDate } from '../../shared/dates/plain-date'
import { lb, minus, plus, toKgText } from '../../shared/mass/mass'
import { oneOf } from './one-of'

const HALF_RANGE = lb('4')
const NOTES = { manufacturer: 'Name plate', calculated: 'From line lengths and component figures', measured: 'Weighed out and in again', range: null }

/** A full charge of the demo's data by the method it names; an established range lies evenly about it. */
export function fullChargeDraft(part: { fullChargeLb: number; method: string }, effectiveOn: PlainDate, note?: string): FullChargeDraft {
  const method = oneOf(FULL_CHARGE_METHODS, part.method)
  const mass = lb(String(part.fullChargeLb))
  const plain = { method, effectiveOn, note: note ?? NOTES[method] }
  return method === 'range'
    ? { ...plain, massKg: null, rangeLowKg: toKgText(minus(mass, HALF_RANGE)), rangeHighKg: toKgText(plus(mass, HALF_RANGE)) }
    : { ...plain, massKg: toKgText(mass), rangeLowKg: null, rangeHighKg: null }
}
