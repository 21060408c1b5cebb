import type { PostingDraft } from '../api/ledger'
import { daysBetween, type PlainDate } from '../dates/plain-date'
import { contentsAfter, receivingCylinder } from './contents'
import { isNegative, isPositive, kg, lessThan, minus, negated, plus, type Mass } from './mass'
import { buildPosting, changeOf } from './postings'
import { circuitOf, type CircuitState, type CylinderContents, type PostingStates } from './states'

/** Something a careful person would look at once more; the posting may be made all the same. */
export type PostingWarning =
  | { code: 'above-full-charge'; fullChargeKg: Mass; overKg: Mass }
  | { code: 'full-charge-unknown' }
  | { code: 'more-than-booked'; bookKg: Mass; excessKg: Mass }
  | { code: 'circuit-below-zero'; bookKg: Mass }
  | { code: 'circuit-mothballed' }
  | { code: 'contents-change'; from: CylinderContents; to: CylinderContents }
  | { code: 'date-long-past'; days: number }

/** [d] a repair clock of 40 CFR 82.157(d) has run out by then, if one was started */
const LONG_PAST_DAYS = 30

/**
 * What to look at once more before this is posted, the gravest first; empty if nothing is odd.
 *
 * - `above-full-charge`: more goes in, in one charge, than the whole circuit holds
 * - `more-than-booked`: the circuit held more than the book knew; the excess is posted as a variance
 * - `circuit-below-zero`: a reversal leaves less than nothing in the book of a circuit; the next complete
 *   weigh-in heals it
 * - `contents-change`: recovered or mixed gas joins cleaner gas, and the whole cylinder counts as the lesser
 *
 * @throws RangeError as `buildPosting` does
 */
export function postingWarnings(draft: PostingDraft, states: PostingStates, today: PlainDate): PostingWarning[] {
  const warnings = [
    ...(draft.kind === 'charge' || draft.kind === 'opening-charge' ? chargeWarnings(draft, circuitOf(draft, states)) : []),
    ...bookWarnings(draft, states),
    ...contentsWarnings(draft, states),
  ]
  const days = daysBetween(draft.occurredOn, today)
  return days > LONG_PAST_DAYS ? [...warnings, { code: 'date-long-past', days }] : warnings
}

function chargeWarnings(draft: PostingDraft, circuit: CircuitState): PostingWarning[] {
  const warnings: PostingWarning[] = []
  const { fullChargeKg } = circuit
  const chargedKg = kg(draft.massKg)
  if (!fullChargeKg) warnings.push({ code: 'full-charge-unknown' })
  else if (lessThan(fullChargeKg, chargedKg))
    warnings.push({ code: 'above-full-charge', fullChargeKg, overKg: minus(chargedKg, fullChargeKg) })
  if (circuit.status === 'mothballed') warnings.push({ code: 'circuit-mothballed' })
  return warnings
}

function bookWarnings(draft: PostingDraft, states: PostingStates): PostingWarning[] {
  const { circuit } = states
  if (!circuit) return []
  const posting = buildPosting(draft, states)
  if (draft.kind === 'charge' || draft.kind === 'recovery') {
    const excessKg = negated(changeOf(posting, { kind: 'variance' }))
    return isPositive(excessKg) ? [{ code: 'more-than-booked', bookKg: circuit.bookKg, excessKg }] : []
  }
  const changeKg = changeOf(posting, { kind: 'circuit', id: circuit.id })
  const bookKg = plus(circuit.bookKg, changeKg)
  return isNegative(changeKg) && isNegative(bookKg) ? [{ code: 'circuit-below-zero', bookKg }] : []
}

function contentsWarnings(draft: PostingDraft, states: PostingStates): PostingWarning[] {
  const into = receivingCylinder(draft, states)
  const after = contentsAfter(draft, states)
  return into && after && isPositive(into.contentKg) && after.contents !== into.contents
    ? [{ code: 'contents-change', from: into.contents, to: after.contents }]
    : []
}
