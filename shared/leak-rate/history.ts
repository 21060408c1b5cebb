import type { PostingPurpose } from '../api/ledger'
import type { LeakRateMethod } from '../api/places'
import type { PlainDate } from '../dates/plain-date'
import type { Mass } from '../mass/mass'

/** Refrigerant that went into the circuit. */
export interface Addition {
  kind: 'addition'
  postingId: string
  occurredOn: PlainDate
  /** ISO 8601 instant with Z or an offset; orders the events of one day */
  occurredAt: string
  /** [kg] > 0 */
  massKg: Mass
  leakId: string | null
  purpose: PostingPurpose | null
}

/** Refrigerant that was recovered from the circuit. What leaked out is no removal: nobody weighed it. */
export interface Removal {
  kind: 'removal'
  postingId: string
  occurredOn: PlainDate
  occurredAt: string
  /** [kg] > 0 */
  massKg: Mass
  purpose: PostingPurpose | null
}

/** A follow-up verification test that showed all identified leaks repaired. */
export interface FollowUpPassed {
  kind: 'follow-up-passed'
  occurredOn: PlainDate
  /** Null where only the day is known: the test then comes after everything that was added on that day. */
  occurredAt: string | null
}

export type LeakRateEvent = Addition | Removal | FollowUpPassed

/** A full charge and the day from which it is in force. */
export interface FullChargeRevision {
  effectiveOn: PlainDate
  /** [kg] > 0 */
  massKg: Mass
}

/**
 * What the leak rate of a circuit is computed from. The caller leaves out postings that were reversed, and the
 * reversals. An opening charge is where the book begins, not an addition; only when a new circuit was filled
 * does the caller pass it, as an addition whose purpose is installation.
 */
export interface CircuitHistory {
  method: LeakRateMethod
  commissionedOn: PlainDate | null
  /** Revisions as recorded; of two that are in force from the same day the later recorded counts. */
  fullCharges: readonly FullChargeRevision[]
  /** In any order. */
  events: readonly LeakRateEvent[]
}

/**
 * The events in the order in which they happened: by local date, then by instant, then removals before
 * additions before tests, then by the id of the posting. So the order of entry changes no rate.
 *
 * @throws RangeError if an instant cannot be read
 */
export function inOrder(events: readonly LeakRateEvent[]): LeakRateEvent[] {
  const keyed = events.map((event) => ({ event, at: instantOf(event), id: event.kind === 'follow-up-passed' ? '' : event.postingId }))
  keyed.sort((a, b) =>
    compare(a.event.occurredOn, b.event.occurredOn) || compare(a.at, b.at)
    || RANK[a.event.kind] - RANK[b.event.kind] || compare(a.id, b.id))
  return keyed.map(({ event }) => event)
}

/** The full charge in force on a day; null if none was determined by then. @returns [kg] */
export function fullChargeOn(fullCharges: readonly FullChargeRevision[], on: PlainDate): Mass | null {
  let inForce: FullChargeRevision | null = null
  for (const revision of fullCharges) {
    if (revision.effectiveOn <= on && (!inForce || revision.effectiveOn >= inForce.effectiveOn)) inForce = revision
  }
  return inForce?.massKg ?? null
}

const RANK = { 'removal': 0, 'addition': 1, 'follow-up-passed': 2 } as const

function instantOf({ occurredAt }: LeakRateEvent): number {
  if (occurredAt === null) return Infinity
  const instant = Date.parse(occurredAt)
  if (Number.isNaN(instant)) throw new RangeError(`"${occurredAt}" is not an instant.`)
  return instant
}

const compare = <Key extends string | number>(a: Key, b: Key): number => (a < b ? -1 : a > b ? 1 : 0)
