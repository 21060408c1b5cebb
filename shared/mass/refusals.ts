import type { PostingDraft, PostingKind } from '../api/ledger'
import { isAfter, isBefore, type PlainDate } from '../dates/plain-date'
import { isNegative, isPositive, kg, larger, lessThan, minus, negated, plus, ZERO_MASS, type Mass } from './mass'
import { buildPosting, changeOf, type Posting } from './postings'
import { circuitOf, cylinderOf, originalOf, toCylinderOf, type CylinderState, type PostingStates } from './states'

/** An expected no of the trade, with the numbers that its sentence needs. */
export type Refusal =
  | { code: 'wrong-refrigerant'; where: 'cylinder' | 'to-cylinder' | 'circuit'; holds: string; offered: string }
  | { code: 'test-date-passed'; cylinderId: string; testDueOn: PlainDate }
  | { code: 'fill-limit-exceeded'; cylinderId: string; roomKg: Mass; limitKg: Mass; tareKg: Mass }
  | { code: 'disposable-not-refillable'; cylinderId: string }
  | { code: 'cylinder-negative'; cylinderId: string; contentKg: Mass; shortKg: Mass }
  | { code: 'mixed-not-chargeable'; cylinderId: string }
  | { code: 'recovered-of-another-owner'; cylinderId: string; gasOwnerId: string | null; otherOwnerId: string | null }
  | { code: 'cylinder-out-of-use'; cylinderId: string; status: 'returned' | 'scrapped' }
  | { code: 'circuit-retired'; circuitId: string }
  | { code: 'circuit-negative'; circuitId: string; bookKg: Mass; shortKg: Mass }
  | { code: 'already-reversed'; reversedById: string }
  | { code: 'reversal-of-reversal' }
  | { code: 'date-in-future'; today: PlainDate }

/**
 * Why this posting may not be made, the most dangerous reason first; null if it may.
 *
 * Order of precedence: wrong refrigerant, test date, fill limit, disposable, cylinder below zero, mixed gas,
 * another owner's gas, cylinder out of use, circuit retired, circuit below zero, date in the future.
 * A reversal is bookkeeping, not an act on a cylinder. It is asked first whether it can be one at all (reversal
 * of a reversal, already reversed), and then only for the limits that the book must keep: the fill limit and a
 * content of at least zero.
 *
 * Test dates are compared with the day of the event, not of its sending: a cylinder that was filled in date
 * stays filled in date, however late the line came back.
 *
 * @param today  the date at the site when the posting is decided
 * @throws RangeError as `buildPosting` does
 */
export function refusePosting(draft: PostingDraft, states: PostingStates, today: PlainDate): Refusal | null {
  const posting = buildPosting(draft, states)
  for (const check of draft.kind === 'reversal' ? REVERSAL_CHECKS : CHECKS) {
    const refusal = check({ draft, states, posting, today })
    if (refusal) return refusal
  }
  return null
}

interface Question {
  draft: PostingDraft
  states: PostingStates
  posting: Posting
  today: PlainDate
}
type Check = (question: Question) => Refusal | null

/** Kinds that put gas into a cylinder that we or a supplier fill. Opening stock is found in it, not filled. */
const FILLS: readonly PostingKind[] = ['purchase', 'receipt', 'recovery', 'transfer']
/** Kinds that refill a cylinder on the job; a disposable one is filled once, by its maker. */
const REFILLS: readonly PostingKind[] = ['recovery', 'transfer']
/** Kinds that only settle what the book still shows in a cylinder that has gone. */
const SETTLES: readonly PostingKind[] = ['return', 'reclaim', 'destruction', 'variance']

function filledCylinder({ draft, states }: Question): CylinderState {
  return draft.kind === 'transfer' ? toCylinderOf(draft, states) : cylinderOf(draft, states)
}

const touchedCylinders = ({ states }: Question): CylinderState[] =>
  [states.cylinder, states.toCylinder].filter((cylinder) => cylinder !== undefined)

const wrongRefrigerant: Check = ({ draft, states }) => {
  const offered = draft.refrigerant
  const holders = [['cylinder', states.cylinder], ['to-cylinder', states.toCylinder], ['circuit', states.circuit]] as const
  for (const [where, holder] of holders) {
    if (holder && holder.refrigerant !== offered) return { code: 'wrong-refrigerant', where, holds: holder.refrigerant, offered }
  }
  return null
}

const testDatePassed: Check = (question) => {
  if (!FILLS.includes(question.draft.kind)) return null
  const { id, testDueOn } = filledCylinder(question)
  return testDueOn && isBefore(testDueOn, question.draft.occurredOn) ? { code: 'test-date-passed', cylinderId: id, testDueOn } : null
}

const fillLimitExceeded: Check = (question) => {
  for (const { id, fillLimitKg: limitKg, contentKg, tareKg } of touchedCylinders(question)) {
    const changeKg = changeOf(question.posting, { kind: 'cylinder', id })
    if (limitKg && isPositive(changeKg) && lessThan(limitKg, plus(contentKg, changeKg)))
      return { code: 'fill-limit-exceeded', cylinderId: id, roomKg: larger(ZERO_MASS, minus(limitKg, contentKg)), limitKg, tareKg }
  }
  return null
}

const disposableNotRefillable: Check = (question) => {
  if (!REFILLS.includes(question.draft.kind)) return null
  const { id, kind } = filledCylinder(question)
  return kind === 'disposable' ? { code: 'disposable-not-refillable', cylinderId: id } : null
}

const cylinderNegative: Check = (question) => {
  for (const { id, contentKg } of touchedCylinders(question)) {
    const changeKg = changeOf(question.posting, { kind: 'cylinder', id })
    const afterKg = plus(contentKg, changeKg)
    if (isNegative(changeKg) && isNegative(afterKg))
      return { code: 'cylinder-negative', cylinderId: id, contentKg, shortKg: negated(afterKg) }
  }
  return null
}

/** Gas that may be mixed goes to a reclaimer or to destruction, or to a cylinder that is marked mixed or stands empty. */
const mixedNotChargeable: Check = ({ draft, states }) => {
  const { kind } = draft
  if (kind !== 'charge' && kind !== 'return' && kind !== 'transfer') return null
  const from = cylinderOf(draft, states)
  if (from.contents !== 'mixed') return null
  if (kind === 'transfer') {
    const to = toCylinderOf(draft, states)
    if (to.contents === 'mixed' || !isPositive(to.contentKg)) return null
  }
  return { code: 'mixed-not-chargeable', cylinderId: from.id }
}

/** Recovered gas may only go back to its owner until it was reclaimed: 40 CFR 82.164, from memory. */
const recoveredOfAnotherOwner: Check = ({ draft, states }) => {
  const refused = (cylinder: CylinderState, otherOwnerId: string | null): Refusal | null =>
    cylinder.contents === 'recovered' && (cylinder.ownerCustomerId === null || cylinder.ownerCustomerId !== otherOwnerId)
      ? { code: 'recovered-of-another-owner', cylinderId: cylinder.id, gasOwnerId: cylinder.ownerCustomerId, otherOwnerId }
      : null
  if (draft.kind === 'charge') return refused(cylinderOf(draft, states), circuitOf(draft, states).ownerCustomerId)
  if (draft.kind === 'recovery') {
    const into = cylinderOf(draft, states)
    return isPositive(into.contentKg) ? refused(into, circuitOf(draft, states).ownerCustomerId) : null
  }
  if (draft.kind !== 'transfer') return null
  const from = cylinderOf(draft, states)
  const to = toCylinderOf(draft, states)
  const bothRecovered = from.contents === 'recovered' && isPositive(to.contentKg)
  return bothRecovered ? refused(to, from.ownerCustomerId) : null
}

const cylinderOutOfUse: Check = (question) => {
  if (SETTLES.includes(question.draft.kind)) return null
  for (const { id, status } of touchedCylinders(question)) {
    if (status !== 'in-use') return { code: 'cylinder-out-of-use', cylinderId: id, status }
  }
  return null
}

/** A retired circuit is still emptied, and what it lost is still booked; only nothing goes in any more. */
const circuitRetired: Check = ({ draft, states: { circuit } }) =>
  circuit?.status === 'retired' && (draft.kind === 'charge' || draft.kind === 'opening-charge')
    ? { code: 'circuit-retired', circuitId: circuit.id }
    : null

const circuitNegative: Check = ({ draft, states }) => {
  if (draft.kind !== 'loss') return null
  const { id, bookKg } = circuitOf(draft, states)
  const afterKg = minus(bookKg, kg(draft.massKg))
  return isNegative(afterKg) ? { code: 'circuit-negative', circuitId: id, bookKg, shortKg: negated(afterKg) } : null
}

const reversalOfReversal: Check = ({ draft, states }) =>
  originalOf(draft, states).kind === 'reversal' ? { code: 'reversal-of-reversal' } : null

const alreadyReversed: Check = ({ draft, states }) => {
  const { reversedById } = originalOf(draft, states)
  return reversedById ? { code: 'already-reversed', reversedById } : null
}

const dateInFuture: Check = ({ draft, today }) =>
  isAfter(draft.occurredOn, today) ? { code: 'date-in-future', today } : null

const CHECKS: readonly Check[] = [
  wrongRefrigerant, testDatePassed, fillLimitExceeded, disposableNotRefillable, cylinderNegative, mixedNotChargeable,
  recoveredOfAnotherOwner, cylinderOutOfUse, circuitRetired, circuitNegative, dateInFuture,
]
const REVERSAL_CHECKS: readonly Check[] = [reversalOfReversal, alreadyReversed, fillLimitExceeded, cylinderNegative, dateInFuture]
