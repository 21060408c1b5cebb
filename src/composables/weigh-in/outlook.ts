import type { WireCylinder } from '../../../shared/api/cylinders'
import type { PostingDraft } from '../../../shared/api/ledger'
import type { Standing, WireCircuit, WireThreshold } from '../../../shared/api/places'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { historyFromWire } from '../../../shared/leak-rate/from-wire'
import type { Addition } from '../../../shared/leak-rate/history'
import { lookAhead } from '../../../shared/leak-rate/look-ahead'
import type { ThresholdOutlook } from '../../../shared/leak-rate/look-ahead'
import { isNear } from '../../../shared/leak-rate/near'
import { toPercentText } from '../../../shared/leak-rate/percent'
import type { RatedAddition } from '../../../shared/leak-rate/rated-additions'
import { draftFaults } from '../../../shared/mass/draft-faults'
import { isPositive, kg, larger, minus, plus, toKgText, ZERO_MASS } from '../../../shared/mass/mass'
import type { Mass } from '../../../shared/mass/mass'
import { bookAfterCharge, bookAfterRecovery } from '../../../shared/mass/postings'
import { refusePosting } from '../../../shared/mass/refusals'
import type { Refusal } from '../../../shared/mass/refusals'
import type { CircuitState } from '../../../shared/mass/states'
import { circuitStateOf, cylinderStateOf } from '../../../shared/mass/states-from-wire'
import { postingWarnings } from '../../../shared/mass/warnings'
import type { PostingWarning } from '../../../shared/mass/warnings'
import { dutiesOfAddition, thresholdsFor } from '../../../shared/rules/engine'
import type { Duty } from '../../../shared/rules/engine'
import { factsFromWire } from '../../../shared/rules/facts-from-wire'
import { PACKS } from '../../../shared/rules/packs'

/** A threshold with what the addition does to the room before it. */
export interface ThresholdAhead extends ThresholdOutlook {
  wire: WireThreshold
}

/** What a weigh-in will do, computed before anything is sent. */
export interface WeighInOutlook {
  refusal: Refusal | null
  warnings: PostingWarning[]
  bookAfterKg: Mass
  /** [kg] what a full weigh-in shows to have leaked; zero otherwise */
  lossRevealedKg: Mass
  /** [kg] null for a loss */
  cylinderAfterKg: Mass | null
  /** Only for a charge. */
  rated: RatedAddition | null
  /** The lowest first: who keeps below it keeps below all. */
  thresholds: ThresholdAhead[]
  duties: Duty[]
  /** What the beam shows once it is posted. */
  beam: {
    fullChargeKg: string | null
    bookChargeKg: string
    ratePercent: string | null
    thresholdPercent: string | null
    roomKg: string | null
    standing: Standing
  }
}

interface Question {
  draft: PostingDraft
  circuit: WireCircuit
  cylinder: WireCylinder | null
  /** The date at the site now. */
  today: PlainDate
}

const RATE_DIGITS = 6

/** The outlook of a draft that has a mass; without a cylinder nothing can be refused or warned of yet. */
export function outlookOf({ draft, circuit, cylinder, today }: Question): WeighInOutlook {
  const netKg = kg(draft.massKg)
  const state = circuitStateOf(circuit, draft.occurredOn)
  const bookAfterKg = bookAfter(draft, state, netKg)
  const ahead = draft.kind === 'charge' ? rateAhead(draft, circuit, state) : { rated: null, thresholds: [], duties: [] }
  const isSound = draftFaults(draft).length === 0
  const states = { circuit: state, ...(cylinder ? { cylinder: cylinderStateOf(cylinder) } : {}) }
  return {
    refusal: isSound ? refusePosting(draft, states, today) : null,
    warnings: isSound ? postingWarnings(draft, states, today) : [],
    bookAfterKg,
    lossRevealedKg: draft.kind === 'charge' ? larger(ZERO_MASS, minus(plus(state.bookKg, netKg), bookAfterKg)) : ZERO_MASS,
    cylinderAfterKg: cylinder && draft.kind !== 'loss' ? (draft.kind === 'charge' ? minus : plus)(kg(cylinder.contentKg), netKg) : null,
    ...ahead,
    beam: beamAfter(circuit, state, bookAfterKg, ahead),
  }
}

/** What would be refused for the cylinder alone, whatever the amount: asked as soon as one is chosen. */
export function refusalOfCylinder({ draft, circuit, cylinder, today }: Question & { cylinder: WireCylinder }): Refusal | null {
  const states = { circuit: circuitStateOf(circuit, draft.occurredOn), cylinder: cylinderStateOf(cylinder) }
  return refusePosting({ ...draft, cylinderId: cylinder.id, massKg: LEAST_MASS }, states, today)
}

const LEAST_MASS = '0.00000000000001' // [kg] the smallest that storage keeps

function bookAfter(draft: PostingDraft, state: CircuitState, netKg: Mass): Mass {
  if (draft.kind === 'charge') return bookAfterCharge(state, { chargedKg: netKg, isComplete: draft.isComplete })
  if (draft.kind === 'recovery') return bookAfterRecovery(state, { recoveredKg: netKg, isComplete: draft.isComplete })
  return minus(state.bookKg, netKg)
}

function rateAhead(draft: PostingDraft, circuit: WireCircuit, state: CircuitState): Pick<WeighInOutlook, 'rated' | 'thresholds' | 'duties'> {
  const facts = factsFromWire(circuit, state.fullChargeKg)
  const inForce = thresholdsFor(facts, PACKS, draft.occurredOn).toSorted((a, b) => a.threshold.comparedTo(b.threshold))
  const candidate: Addition = {
    kind: 'addition', postingId: draft.id, occurredOn: draft.occurredOn, occurredAt: draft.occurredAt,
    massKg: kg(draft.massKg), leakId: draft.leakId, purpose: draft.purpose,
  }
  const { rated, outlooks } = lookAhead(historyFromWire(circuit.history), candidate, inForce.map(({ threshold }) => threshold))
  const thresholds = inForce.flatMap(({ packId, threshold, source, checkedOn }, index) => {
    const outlook = outlooks[index]
    return outlook ? [{ ...outlook, wire: { packId, percent: threshold.toFixed(), ...source, checkedOn } }] : []
  })
  return { rated, thresholds, duties: dutiesOfAddition({ circuit: facts, packs: PACKS, rate: rated.rate, on: draft.occurredOn }) }
}

function beamAfter(circuit: WireCircuit, state: CircuitState, bookAfterKg: Mass, { rated, thresholds }: Pick<WeighInOutlook, 'rated' | 'thresholds'>): WeighInOutlook['beam'] {
  const [lowest] = thresholds
  const charge = { fullChargeKg: state.fullChargeKg && toKgText(state.fullChargeKg), bookChargeKg: toKgText(bookAfterKg) }
  if (!rated?.rate) {
    const { ratePercent, thresholdPercent, roomKg } = circuit
    return { ...charge, ratePercent, thresholdPercent, roomKg, standing: isPositive(bookAfterKg) || circuit.standing === 'over' ? circuit.standing : 'flat' }
  }
  const standing = !lowest ? 'none' : lowest.isAbove ? 'over' : isNear(rated.rate, lowest.threshold) ? 'near' : 'far'
  return {
    ...charge, ratePercent: toPercentText(rated.rate, RATE_DIGITS), thresholdPercent: lowest?.wire.percent ?? null,
    roomKg: lowest ? toKgText(lowest.after.roomKg) : null, standing,
  }
}
