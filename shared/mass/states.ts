import type { CYLINDER_CONTENTS, CYLINDER_KINDS, CYLINDER_STATUSES } from '../api/cylinders'
import type { PostingDraft, PostingKind } from '../api/ledger'
import type { CircuitStatus } from '../api/places'
import type { PlainDate } from '../dates/plain-date'
import type { Mass } from './mass'

export type CylinderContents = (typeof CYLINDER_CONTENTS)[number]

/** A cylinder as the ledger and its stamp know it at the moment of posting. */
export interface CylinderState {
  id: string
  refrigerant: string
  kind: (typeof CYLINDER_KINDS)[number]
  contents: CylinderContents
  /** [kg] net, by the book */
  contentKg: Mass
  /** [kg] stamped */
  tareKg: Mass
  /** [kg of water] stamped; null where there is no stamp */
  waterCapacityKg: Mass | null
  /** [kg] greatest net mass at 80 % of the volume, from the saturated liquid at 25 °C; null without a water capacity */
  fillLimitKg: Mass | null
  testDueOn: PlainDate | null
  /** Whose gas it is, where it was recovered. */
  ownerCustomerId: string | null
  status: (typeof CYLINDER_STATUSES)[number]
}

/** A circuit as the ledger knows it at the moment of posting. */
export interface CircuitState {
  id: string
  refrigerant: string
  /** [kg] what the book says is in it */
  bookKg: Mass
  /** [kg] the full charge in force on the day of the event; null while nobody has determined it */
  fullChargeKg: Mass | null
  status: CircuitStatus
  ownerCustomerId: string
}

/** One side of an entry. Air is what was lost; variance is what a weighing or an opening adds to the book unexplained. */
export type AccountRef =
  | { kind: 'cylinder' | 'circuit' | 'partner'; id: string }
  | { kind: 'air' }
  | { kind: 'variance' }

/** One line of a posting; positive into the account. */
export interface Entry {
  account: AccountRef
  refrigerant: string
  /** [kg] never zero */
  massKg: Mass
}

/** The posting that a reversal takes back. */
export interface OriginalPosting {
  id: string
  kind: PostingKind
  entries: readonly Entry[]
  /** The reversal that already took it back, if one did. */
  reversedById: string | null
}

/** Everything a posting touches, read under lock by the server and from its own copy by the phone. */
export interface PostingStates {
  circuit?: CircuitState | undefined
  cylinder?: CylinderState | undefined
  toCylinder?: CylinderState | undefined
  original?: OriginalPosting | undefined
}

/** @throws RangeError if the draft names another circuit than the one read: a mistake of ours */
export function circuitOf(draft: PostingDraft, states: PostingStates): CircuitState {
  return checked(states.circuit, draft.circuitId, 'circuit')
}

/** @throws RangeError as `circuitOf` does */
export function cylinderOf(draft: PostingDraft, states: PostingStates): CylinderState {
  return checked(states.cylinder, draft.cylinderId, 'cylinder')
}

/** @throws RangeError as `circuitOf` does */
export function toCylinderOf(draft: PostingDraft, states: PostingStates): CylinderState {
  return checked(states.toCylinder, draft.toCylinderId, 'receiving cylinder')
}

/** @throws RangeError as `circuitOf` does */
export function originalOf(draft: PostingDraft, states: PostingStates): OriginalPosting {
  return checked(states.original, draft.reversesId, 'posting to take back')
}

function checked<State extends { id: string }>(state: State | undefined, id: string | null, name: string): State {
  if (!state || state.id !== id) throw new RangeError(`The state of the ${name} ${id} was not given.`)
  return state
}
