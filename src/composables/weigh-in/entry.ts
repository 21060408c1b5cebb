import type { WireCylinder } from '../../../shared/api/cylinders'
import type { EnteredWeighing, MassUnit, PostingDraft, PostingPurpose } from '../../../shared/api/ledger'
import type { WireCircuit } from '../../../shared/api/places'
import { instantOfLocal } from '../../../shared/dates/local-instant'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { isPositive, kg, toKgText } from '../../../shared/mass/mass'
import type { Mass } from '../../../shared/mass/mass'
import { netOf } from '../../../shared/units/mass-units'
import type { NetReading } from '../../../shared/units/mass-units'

export const WEIGH_IN_KINDS = ['charge', 'recovery', 'loss'] as const
export type WeighInKind = (typeof WEIGH_IN_KINDS)[number]

/** What a person enters at the scale, kept on the device as it is typed. */
export interface WeighInEntry {
  /** Becomes the id of the posting: the same entry sent twice is posted once. */
  id: string
  kind: WeighInKind
  cylinder: WireCylinder | null
  unit: MassUnit
  how: 'readings' | 'amount'
  before: string | null
  after: string | null
  amount: string | null
  /** A charge that leaves the circuit full, a recovery that leaves it empty. */
  isComplete: boolean
  /** A loss of everything that the book says is in the circuit. */
  isWhole: boolean
  purpose: PostingPurpose | null
  leakId: string | null
  part: string | null
  workDone: string | null
  note: string | null
  /** The site's local date and clock. */
  occurredOn: PlainDate | null
  time: string
  /** The visit it belongs to, once it is known; `newVisitId` is for the one that is begun with it. */
  visitId: string | null
  newVisitId: string
}

/** Why gas goes in or comes out, the commonest first. A loss has no purpose: nobody meant it. */
export const PURPOSES_OF: Record<WeighInKind, readonly PostingPurpose[]> = {
  charge: ['leak', 'seasonal', 'installation', 'retrofit'],
  recovery: ['repair', 'seasonal', 'retirement'],
  loss: [],
}

/** Word for word what was typed; null for a loss by the book, which nobody read from a scale. */
export function enteredOf({ kind, how, unit, before, after, amount, isWhole }: WeighInEntry): EnteredWeighing | null {
  if (kind === 'loss') return isWhole ? null : { unit, before: null, after: null, amount }
  return how === 'readings' ? { unit, before, after, amount: null } : { unit, before: null, after: null, amount }
}

/** The net mass of the entry [kg], or the field that does not fit and why. */
export function netOfEntry(entry: WeighInEntry, bookChargeKg: string): NetReading {
  const entered = enteredOf(entry)
  if (!entered) {
    const mass = kg(bookChargeKg)
    return isPositive(mass) ? { ok: true, mass } : { ok: false, field: 'amount', code: 'missing' }
  }
  const net = netOf(entered, entry.kind === 'recovery' ? 'in' : 'out')
  const isBeforeMissing = !net.ok && net.code === 'missing' && net.field === 'amount' && entry.how === 'readings' && entry.kind !== 'loss'
  return isBeforeMissing ? { ok: false, field: 'before', code: 'missing' } : net
}

export const isClockTime = (text: string): boolean => /^([01]\d|2[0-3]):[0-5]\d$/.test(text)

/** The posting that an entry makes; null while its day or time is missing. */
export function draftOf(entry: WeighInEntry, circuit: Pick<WireCircuit, 'id' | 'refrigerant' | 'siteTimeZone'>, netKg: Mass): PostingDraft | null {
  if (!entry.occurredOn || !isClockTime(entry.time)) return null
  return {
    id: entry.id,
    kind: entry.kind,
    occurredOn: entry.occurredOn,
    occurredAt: instantOfLocal({ date: entry.occurredOn, time: entry.time, timeZone: circuit.siteTimeZone }),
    refrigerant: circuit.refrigerant,
    massKg: toKgText(netKg),
    entered: enteredOf(entry),
    cylinderId: entry.kind === 'loss' ? null : entry.cylinder?.id ?? null,
    toCylinderId: null,
    circuitId: circuit.id,
    partnerId: null,
    visitId: entry.visitId,
    leakId: entry.kind === 'recovery' ? null : entry.leakId,
    purpose: entry.purpose,
    isComplete: entry.kind !== 'loss' && entry.isComplete,
    part: entry.part,
    workDone: entry.workDone,
    note: entry.note,
    reversesId: null,
    reason: null,
  }
}
