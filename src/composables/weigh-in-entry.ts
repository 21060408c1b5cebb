import type { WireCylinder } from '../../shared/api/cylinders'
import type { EnteredWeighing, MassUnit, PostingDraft, PostingPurpose } from '../../shared/api/ledger'
import type { WireCircuit } from '../../shared/api/places'
import { instantOfLocal } from '../../shared/dates/local-instant'
import type { PlainDate } from '../../shared/dates/plain-date'
import { toKgText, type Mass } from '../../shared/mass/mass'

export type WeighInKind = 'charge' | 'recovery' | 'loss'

/** What stands in the weigh-in form; kept on the device word for word until it is posted. */
export interface WeighInEntry {
  /** UUID v7 of the posting, made when the form opens. */
  id: string
  /** Known once it was first sent. */
  visitId: string | null
  kind: WeighInKind
  cylinderId: string | null
  isNet: boolean
  unit: MassUnit
  before: string
  after: string
  amount: string
  isWholeLoss: boolean
  isComplete: boolean
  purpose: PostingPurpose
  leakId: string | null
  part: string | null
  workDone: string | null
  note: string | null
  occurredOn: PlainDate | null
  time: string
}

/** The purposes on offer for each kind, the commonest first. */
export const PURPOSES_OF_KIND: Record<WeighInKind, readonly PostingPurpose[]> = {
  charge: ['leak', 'seasonal', 'installation', 'retrofit'],
  recovery: ['repair', 'seasonal', 'retrofit', 'retirement'],
  loss: ['leak'],
}

/** The readings as the person entered them; null where the whole book charge was lost and nothing was read. */
export function enteredOf({ kind, isWholeLoss, isNet, unit, before, after, amount }: WeighInEntry): EnteredWeighing | null {
  if (kind === 'loss' && isWholeLoss) return null
  return isNet || kind === 'loss' ? { unit, before: null, after: null, amount: amount || null } : { unit, before: before || null, after: after || null, amount: null }
}

const TIME = /^([01]\d|2[0-3]):[0-5]\d$/
export const isTime = (text: string): boolean => TIME.test(text)

/** The posting that an entry makes; null while a day or time is missing. */
export function draftOf(entry: WeighInEntry, { circuit, cylinder, massKg }: { circuit: WireCircuit; cylinder: WireCylinder | null; massKg: Mass }): PostingDraft | null {
  const { id, kind, occurredOn, time, visitId, purpose, leakId, part, workDone, note } = entry
  if (!occurredOn || !isTime(time)) return null
  return {
    id, kind, occurredOn, occurredAt: instantOfLocal({ date: occurredOn, time, timeZone: circuit.siteTimeZone }), refrigerant: circuit.refrigerant,
    massKg: toKgText(massKg), entered: enteredOf(entry), cylinderId: kind === 'loss' ? null : cylinder?.id ?? null, toCylinderId: null,
    circuitId: circuit.id, partnerId: null, visitId, leakId: purpose === 'leak' ? leakId : null, purpose,
    isComplete: kind === 'loss' ? entry.isWholeLoss : entry.isComplete, part: trimmed(part), workDone: trimmed(workDone), note: trimmed(note),
    reversesId: null, reason: null,
  }
}

const trimmed = (text: string | null): string | null => text?.trim() || null
