import type { PostingDraft } from '../../shared/api/ledger'
import type { Standing, WireCircuit, WireThreshold } from '../../shared/api/places'
import { historyFromWire } from '../../shared/leak-rate/from-wire'
import { fullChargeOn } from '../../shared/leak-rate/history'
import { lookAhead, type ThresholdOutlook } from '../../shared/leak-rate/look-ahead'
import { isNear } from '../../shared/leak-rate/near'
import { isAbove, percent, type Percent } from '../../shared/leak-rate/percent'
import type { RatedAddition } from '../../shared/leak-rate/rated-additions'
import { isPositive, kg, larger, minus, plus, toKgText, ZERO_MASS, type Mass } from '../../shared/mass/mass'
import { bookAfterCharge, bookAfterRecovery } from '../../shared/mass/postings'
import type { CircuitState } from '../../shared/mass/states'
import { dutiesOfAddition, thresholdsFor, type Duty } from '../../shared/rules/engine'
import { factsFromWire } from '../../shared/rules/facts-from-wire'
import { PACKS } from '../../shared/rules/packs'

/** What CircuitBeam is drawn from. */
export interface BeamValues {
  fullChargeKg: string | null
  bookChargeKg: string
  ratePercent: string | null
  thresholdPercent: string | null
  roomKg: string | null
  standing: Standing
}

/** What a posting would do to a circuit. */
export interface Outlook {
  /** Null for a recovery or a loss: nothing is added. */
  rated: RatedAddition | null
  /** [% per 12 months] null where nothing is rated */
  rate: Percent | null
  /** The lowest threshold in force on that day, and how it stands before and after. */
  threshold: WireThreshold | null
  ahead: ThresholdOutlook | null
  duties: Duty[]
  bookKg: Mass
  /** [kg] that the book held too much and that counts as lost */
  lossKg: Mass
  beam: BeamValues
}

/** The beam of a circuit as it stands. */
export const beamOf = ({ fullChargeKg, bookChargeKg, ratePercent, thresholdPercent, roomKg, standing }: WireCircuit): BeamValues =>
  ({ fullChargeKg, bookChargeKg, ratePercent, thresholdPercent, roomKg, standing })

/** Looks ahead with the same functions that the server computes with once it is posted. */
export function outlookOf(circuit: WireCircuit, state: CircuitState, draft: PostingDraft): Outlook {
  const massKg = kg(draft.massKg)
  const bookKg = bookAfter(state, draft, massKg)
  if (draft.kind !== 'charge') {
    const lossKg = draft.kind === 'loss' ? massKg : larger(ZERO_MASS, minus(minus(state.bookKg, massKg), bookKg))
    const rate = circuit.ratePercent === null ? null : percent(circuit.ratePercent)
    const threshold = circuit.thresholdPercent === null ? null : percent(circuit.thresholdPercent)
    return {
      rated: null, rate: null, threshold: null, ahead: null, duties: [], bookKg, lossKg,
      beam: { ...beamOf(circuit), bookChargeKg: toKgText(bookKg), standing: standingOf({ circuit, rate, threshold, bookKg }) },
    }
  }
  const history = historyFromWire(circuit.history)
  const facts = factsFromWire(circuit, fullChargeOn(history.fullCharges, draft.occurredOn))
  const thresholds = thresholdsFor(facts, PACKS, draft.occurredOn)
  const { id: postingId, occurredOn, occurredAt, leakId, purpose } = draft
  const { rated, outlooks } = lookAhead(history, { kind: 'addition', postingId, occurredOn, occurredAt, massKg, leakId, purpose }, thresholds.map((each) => each.threshold))
  const at = thresholds.reduce((lowest, each, index) => (each.threshold.lessThan(thresholds[lowest]?.threshold ?? each.threshold) ? index : lowest), 0)
  const lowest = thresholds[at]
  const threshold: WireThreshold | null = lowest
    ? { packId: lowest.packId, percent: lowest.threshold.toFixed(), cite: lowest.source.cite, basis: lowest.source.basis, checkedOn: lowest.checkedOn }
    : null
  const ahead = outlooks[at] ?? null
  const shownRate = rated.rate ?? (circuit.ratePercent === null ? null : percent(circuit.ratePercent))
  return {
    rated, rate: rated.rate, threshold, ahead, bookKg, lossKg: larger(ZERO_MASS, minus(plus(state.bookKg, massKg), bookKg)),
    duties: dutiesOfAddition({ circuit: facts, packs: PACKS, rate: rated.rate, on: occurredOn }),
    beam: {
      fullChargeKg: state.fullChargeKg && toKgText(state.fullChargeKg), bookChargeKg: toKgText(bookKg),
      ratePercent: shownRate && shownRate.toDecimalPlaces(6).toFixed(), thresholdPercent: threshold?.percent ?? null,
      roomKg: ahead ? toKgText(ahead.after.roomKg) : circuit.roomKg,
      standing: standingOf({ circuit, rate: shownRate, threshold: lowest?.threshold ?? null, bookKg }),
    },
  }
}

function bookAfter(state: CircuitState, { kind, isComplete }: PostingDraft, massKg: Mass): Mass {
  if (kind === 'charge') return bookAfterCharge(state, { chargedKg: massKg, isComplete })
  if (kind === 'recovery') return bookAfterRecovery(state, { recoveredKg: massKg, isComplete })
  return larger(ZERO_MASS, minus(state.bookKg, massKg))
}

function standingOf({ circuit, rate, threshold, bookKg }: { circuit: WireCircuit; rate: Percent | null; threshold: Percent | null; bookKg: Mass }): Standing {
  if (rate && threshold && isAbove(rate, threshold)) return 'over'
  if (circuit.status === 'in-service' && circuit.fullChargeKg !== null && !isPositive(bookKg)) return 'flat'
  if (rate && threshold) return isNear(rate, threshold) ? 'near' : 'far'
  return 'none'
}
