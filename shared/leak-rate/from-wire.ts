import type { WireHistory } from '../api/places'
import { kg } from '../mass/mass'
import type { CircuitHistory, LeakRateEvent } from './history'

/**
 * The history of a circuit as it came over the wire or out of the phone's own database.
 *
 * @throws RangeError if a mass cannot be read, or an addition or removal has no mass, id or instant
 */
export function historyFromWire(wire: WireHistory): CircuitHistory {
  return {
    method: wire.method,
    commissionedOn: wire.commissionedOn,
    fullCharges: wire.fullCharges.map(({ effectiveOn, massKg }) => ({ effectiveOn, massKg: kg(massKg) })),
    events: wire.events.map(eventFromWire),
  }
}

function eventFromWire({ kind, postingId, occurredOn, occurredAt, massKg, leakId, purpose }: WireHistory['events'][number]): LeakRateEvent {
  if (kind === 'follow-up-passed') return { kind, occurredOn, occurredAt }
  if (postingId === null || occurredAt === null || massKg === null)
    throw new RangeError(`An event of kind ${kind} on ${occurredOn} has no posting, no instant or no mass.`)
  const weighed = { postingId, occurredOn, occurredAt, massKg: kg(massKg), purpose }
  return kind === 'addition' ? { kind, ...weighed, leakId } : { kind, ...weighed }
}
