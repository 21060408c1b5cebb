import { isAfter, type PlainDate } from '../dates/plain-date'
import { larger, minus, plus, sumMass, ZERO_MASS, type Mass } from '../mass/mass'
import { fullChargeOn, inOrder, type Addition, type CircuitHistory } from './history'
import { isAbove, type Percent } from './percent'
import { RateLedger, type RatedAddition } from './rated-additions'
import { roomBeforeThreshold, type Room } from './rates'

/** A threshold as it stands before and after an addition. */
export interface ThresholdOutlook {
  /** [% of full charge per 12 months] */
  threshold: Percent
  /** Whether the rate of the addition is above it; false where the addition is exempt. */
  isAbove: boolean
  /** [kg] what may be weighed in on that day, with gas that only comes back */
  before: Room
  /** [kg] what of it is left after the addition */
  after: Room
}

/** What an addition would do. */
export interface LookAhead {
  rated: RatedAddition
  /** One per threshold, in the given order; none for an installation or retrofit, or without a full charge. */
  outlooks: ThresholdOutlook[]
}

/**
 * The leak rate that an addition will give, and the room before and after it, as `rateAdditions` will compute it
 * once it is posted. Events that happened after the candidate stay out of it.
 *
 * @param candidate  the addition that is about to be posted and is not yet in the history
 * @param thresholds  [%] those in force for the circuit
 */
export function lookAhead(history: CircuitHistory, candidate: Addition, thresholds: readonly Percent[]): LookAhead {
  const ledger = new RateLedger(history)
  for (const event of inOrder([...history.events, candidate])) {
    if (event === candidate) break
    ledger.take(event)
  }
  const isFilling = ledger.fillingOf(candidate) !== null
  const ground = roomGround(ledger, history, candidate)
  const rated = ledger.add(candidate)
  if (!ground || isFilling) return { rated, outlooks: [] }
  const outlooks = thresholds.map((threshold) => ({
    threshold,
    isAbove: rated.rate !== null && isAbove(rated.rate, threshold),
    before: roomLeft(ground, threshold, ZERO_MASS),
    after: roomLeft(ground, threshold, candidate.massKg),
  }))
  return { rated, outlooks }
}

/**
 * What may still be added on a day for a new leak before a threshold is passed, gas recovered for a repair and
 * not yet put back included. Null without a full charge.
 */
export function roomOn(history: CircuitHistory, on: PlainDate, threshold: Percent): Room | null {
  const ledger = new RateLedger(history)
  for (const event of inOrder(history.events)) {
    if (isAfter(event.occurredOn, on)) break
    ledger.take(event)
  }
  const ground = roomGround(ledger, history, { occurredOn: on, leakId: null, purpose: 'leak' })
  return ground && roomLeft(ground, threshold, ZERO_MASS)
}

interface RoomGround {
  method: CircuitHistory['method']
  fullChargeKg: Mass
  days: number
  alreadyAddedKg: Mass
  /** [kg] may come back without being counted */
  creditKg: Mass
}

type Question = Pick<Addition, 'occurredOn' | 'leakId' | 'purpose'>

function roomGround(ledger: RateLedger, history: CircuitHistory, question: Question): RoomGround | null {
  const fullChargeKg = fullChargeOn(history.fullCharges, question.occurredOn)
  if (!fullChargeKg) return null
  const { summed, days } = ledger.groundOf(question)
  const alreadyAddedKg = sumMass(summed.map((each) => each.countedKg))
  return { method: history.method, fullChargeKg, days, alreadyAddedKg, creditKg: ledger.credits.available(question) }
}

function roomLeft(ground: RoomGround, threshold: Percent, addedKg: Mass): Room {
  const countedKg = larger(ZERO_MASS, minus(addedKg, ground.creditKg))
  const creditLeftKg = larger(ZERO_MASS, minus(ground.creditKg, addedKg))
  const { roomKg, overByKg } = roomBeforeThreshold({ ...ground, threshold, alreadyAddedKg: plus(ground.alreadyAddedKg, countedKg) })
  return { roomKg: plus(roomKg, creditLeftKg), overByKg }
}
