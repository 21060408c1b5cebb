import type { PostingDraft } from '../api/ledger'
import { draftFaults } from './draft-faults'
import { isNegative, isZero, kg, larger, minus, negated, plus, smaller, sumMass, ZERO_MASS, type Mass } from './mass'
import {
  circuitOf, cylinderOf, originalOf, toCylinderOf,
  type AccountRef, type CircuitState, type Entry, type PostingStates,
} from './states'

/** A posting as it goes into the ledger. */
export interface Posting {
  entries: Entry[]
}

/**
 * The entries of a posting. They sum to zero per refrigerant, and none of them is zero.
 * Whether the posting may be made at all, `refusePosting` decides.
 *
 * @throws RangeError if the draft has faults (see `draftFaults`), a state is missing, or the entries do
 * not balance: mistakes of ours, since drafts are checked where they come in
 */
export function buildPosting(draft: PostingDraft, states: PostingStates): Posting {
  const fault = draftFaults(draft)[0]
  if (fault) throw new RangeError(`The draft of a ${draft.kind} cannot be posted: ${fault.code} (${fault.field}).`)
  const entries = entriesOf(draft, states).filter((entry) => !isZero(entry.massKg))
  checkBalance(entries)
  return { entries }
}

/**
 * What the book says is in a circuit after a charge. A complete weigh-in leaves it at its full charge,
 * whatever the book said before; a partial one adds to the book, up to the full charge. Without a known
 * full charge the book takes what went in.
 *
 * @param chargedKg  [kg] > 0
 * @returns [kg]
 */
export function bookAfterCharge(circuit: CircuitState, charge: { chargedKg: Mass; isComplete: boolean }): Mass {
  const summedKg = plus(circuit.bookKg, charge.chargedKg)
  if (!circuit.fullChargeKg) return summedKg
  return charge.isComplete ? circuit.fullChargeKg : smaller(circuit.fullChargeKg, summedKg)
}

/**
 * What the book says is in a circuit after a recovery: nothing once it was left empty, else what
 * remains, and never less than nothing.
 *
 * @param recoveredKg  [kg] > 0
 * @returns [kg]
 */
export function bookAfterRecovery(circuit: CircuitState, recovery: { recoveredKg: Mass; isComplete: boolean }): Mass {
  return recovery.isComplete ? ZERO_MASS : larger(ZERO_MASS, minus(circuit.bookKg, recovery.recoveredKg))
}

/** The change that a posting makes to one account. @returns [kg] positive into the account */
export function changeOf(posting: Posting, account: AccountRef): Mass {
  return sumMass(posting.entries.filter((entry) => isSameAccount(entry.account, account)).map((entry) => entry.massKg))
}

/** Whether two references mean one account. */
export function isSameAccount(a: AccountRef, b: AccountRef): boolean {
  return a.kind === b.kind && ('id' in a ? a.id : null) === ('id' in b ? b.id : null)
}

const AIR: AccountRef = { kind: 'air' }
const VARIANCE: AccountRef = { kind: 'variance' }

function entriesOf(draft: PostingDraft, states: PostingStates): Entry[] {
  if (draft.kind === 'reversal')
    return originalOf(draft, states).entries.map((entry) => ({ ...entry, massKg: negated(entry.massKg) }))
  const moved = (from: AccountRef, to: AccountRef) => move(draft.refrigerant, kg(draft.massKg), from, to)
  const partner = (): AccountRef => ({ kind: 'partner', id: draft.partnerId ?? '' })
  const cylinder = (): AccountRef => ({ kind: 'cylinder', id: cylinderOf(draft, states).id })
  const circuit = (): AccountRef => ({ kind: 'circuit', id: circuitOf(draft, states).id })
  switch (draft.kind) {
    case 'purchase':
    case 'receipt':
      return moved(partner(), cylinder())
    case 'charge':
      return [...moved(cylinder(), circuit()), ...revealedByCharge(draft, states)]
    case 'recovery':
      return [...moved(circuit(), cylinder()), ...revealedByRecovery(draft, states)]
    case 'loss':
      return moved(circuit(), AIR)
    case 'transfer':
      return moved(cylinder(), { kind: 'cylinder', id: toCylinderOf(draft, states).id })
    case 'return':
    case 'reclaim':
    case 'destruction':
      return moved(cylinder(), partner())
    case 'variance':
    case 'opening-stock':
      return moved(VARIANCE, cylinder())
    case 'opening-charge':
      return moved(VARIANCE, circuit())
    default:
      return draft.kind satisfies never
  }
}

function revealedByCharge(draft: PostingDraft, states: PostingStates): Entry[] {
  const circuit = circuitOf(draft, states)
  const chargedKg = kg(draft.massKg)
  const afterKg = bookAfterCharge(circuit, { chargedKg, isComplete: draft.isComplete })
  return settle(draft, circuit, minus(plus(circuit.bookKg, chargedKg), afterKg))
}

function revealedByRecovery(draft: PostingDraft, states: PostingStates): Entry[] {
  const circuit = circuitOf(draft, states)
  const recoveredKg = kg(draft.massKg)
  const afterKg = bookAfterRecovery(circuit, { recoveredKg, isComplete: draft.isComplete })
  return settle(draft, circuit, minus(minus(circuit.bookKg, recoveredKg), afterKg))
}

/** What the book held too much has gone into the air; what it held too little was never booked, and is a variance. */
function settle(draft: PostingDraft, circuit: CircuitState, lossKg: Mass): Entry[] {
  const account: AccountRef = { kind: 'circuit', id: circuit.id }
  return isNegative(lossKg)
    ? move(draft.refrigerant, negated(lossKg), VARIANCE, account)
    : move(draft.refrigerant, lossKg, account, AIR)
}

function move(refrigerant: string, massKg: Mass, from: AccountRef, to: AccountRef): Entry[] {
  return [{ account: from, refrigerant, massKg: negated(massKg) }, { account: to, refrigerant, massKg }]
}

function checkBalance(entries: readonly Entry[]): void {
  const sums = new Map<string, Mass>()
  for (const { refrigerant, massKg } of entries) sums.set(refrigerant, plus(sums.get(refrigerant) ?? ZERO_MASS, massKg))
  for (const [refrigerant, sum] of sums) {
    if (!isZero(sum)) throw new RangeError(`The entries of ${refrigerant} sum to ${sum.toFixed()} kg instead of zero.`)
  }
}
