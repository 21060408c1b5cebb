import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { POSTING_PURPOSES } from '../../../shared/api/ledger'
import { addDays, plainDate } from '../../../shared/dates/plain-date'
import type { CircuitHistory, LeakRateEvent } from '../../../shared/leak-rate/history'
import { inOrder } from '../../../shared/leak-rate/history'
import { isAbove, percent, toTenThousandths } from '../../../shared/leak-rate/percent'
import { lookAhead } from '../../../shared/leak-rate/look-ahead'
import { rateAdditions } from '../../../shared/leak-rate/rated-additions'
import { annualizedLeakRate, rollingLeakRate, roomBeforeThreshold } from '../../../shared/leak-rate/rates'
import { kg, lb, lessThan, sumMass, ZERO_MASS } from '../../../shared/mass/mass'

const mass = fc.integer({ min: 1, max: 400_000 }).map((hundredths) => lb((hundredths / 100).toFixed(2)))
const someEvent = fc.record({
  kind: fc.constantFrom('addition' as const, 'addition' as const, 'removal' as const, 'follow-up-passed' as const),
  day: fc.integer({ min: 0, max: 60 }), hour: fc.integer({ min: 0, max: 3 }), massKg: mass,
  leakId: fc.constantFrom(null, 'coil', 'valve'), purpose: fc.constantFrom(null, ...POSTING_PURPOSES),
})
const someHistory = fc.record({
  method: fc.constantFrom('annualizing' as const, 'rolling' as const), commissioned: fc.option(fc.integer({ min: -40, max: 40 })),
  full: mass, events: fc.array(someEvent, { maxLength: 25 }),
}).map(({ method, commissioned, full, events }): CircuitHistory => ({
  method,
  commissionedOn: commissioned === null ? null : addDays(plainDate('2024-01-31'), commissioned * 15),
  fullCharges: [{ effectiveOn: plainDate('2024-03-01'), massKg: full }],
  events: events.map((event, index): LeakRateEvent => {
    const occurredOn = addDays(plainDate('2024-01-31'), event.day * 15)
    const when = { occurredOn, occurredAt: `${occurredOn}T1${event.hour}:00:00Z` }
    const weighed = { ...when, postingId: `posting-${index}`, massKg: event.massKg, purpose: event.purpose }
    if (event.kind === 'follow-up-passed') return { kind: event.kind, ...when }
    return event.kind === 'addition' ? { kind: event.kind, ...weighed, leakId: event.leakId } : { kind: event.kind, ...weighed }
  }),
}))

describe('laws of the leak rate', () => {
  it('the order of entry changes no rate', () => {
    const shuffled = someHistory.chain((history) => fc.tuple(
      fc.constant(history), fc.shuffledSubarray([...history.events], { minLength: history.events.length })))
    fc.assert(fc.property(shuffled, ([history, events]) => {
      expect(rateAdditions({ ...history, events })).toEqual(rateAdditions(history))
    }))
  })

  it('what happens later changes no rate', () => {
    fc.assert(fc.property(someHistory, fc.nat(), (history, cut) => {
      const events = inOrder(history.events)
      const early = rateAdditions({ ...history, events: events.slice(0, cut % (events.length + 1)) })
      expect(rateAdditions(history).slice(0, early.length)).toEqual(early)
    }))
  })

  it('an addition has a rate or a reason why not, never both', () => {
    fc.assert(fc.property(someHistory, (history) => {
      for (const rated of rateAdditions(history)) {
        expect(rated.rate === null).toBe(rated.exempt !== null)
        expect(lessThan(rated.massKg, rated.countedKg)).toBe(false)
        expect(lessThan(rated.countedKg, ZERO_MASS)).toBe(false)
        if (rated.rate) expect(rated.summedIds.at(-1)).toBe(rated.postingId)
      }
    }))
  })

  it('no more comes back uncounted than was taken out', () => {
    fc.assert(fc.property(someHistory, (history) => {
      const removedKg = sumMass(history.events.flatMap((event) => (event.kind === 'removal' ? [event.massKg] : [])))
      const fillings = ['installation', 'retrofit']
      const uncountedKg = sumMass(rateAdditions(history).filter((rated) => !fillings.includes(rated.exempt ?? ''))
        .map((rated) => kg(rated.massKg.minus(rated.countedKg).toFixed())))
      expect(lessThan(removedKg, uncountedKg)).toBe(false)
    }))
  })

  it('the look-ahead is what the ledger computes afterwards', () => {
    fc.assert(fc.property(someHistory, (history) => {
      const candidate = inOrder(history.events).findLast((event) => event.kind === 'addition')
      fc.pre(candidate?.kind === 'addition')
      const others = { ...history, events: history.events.filter((event) => event !== candidate) }
      expect(lookAhead(others, candidate, []).rated)
        .toEqual(rateAdditions(history).find((rated) => rated.postingId === candidate.postingId))
    }))
  })

  it('the room just fits: with it the threshold is not passed, with a hair more it is', () => {
    const hair = kg('0.00000000000001')
    fc.assert(fc.property(mass, fc.integer({ min: 1, max: 800 }), fc.integer({ min: 1, max: 3000 }), (fullChargeKg, days, tenths) => {
      const threshold = percent((tenths / 10).toFixed(1))
      for (const method of ['annualizing', 'rolling'] as const) {
        const { roomKg } = roomBeforeThreshold({ threshold, fullChargeKg, days, alreadyAddedKg: ZERO_MASS, method })
        const rate = (addedKg: typeof roomKg) => method === 'rolling' ? rollingLeakRate({ addedKg, fullChargeKg }) : annualizedLeakRate({ addedKg, fullChargeKg, days })
        expect(isAbove(rate(roomKg), threshold)).toBe(false)
        expect(isAbove(rate(sumMass([roomKg, hair])), threshold)).toBe(true)
      }
    }))
  })

  it('sort keys keep the order of rates', () => {
    expect(toTenThousandths(percent('40.55555'))).toBe(405555)
  })
})
