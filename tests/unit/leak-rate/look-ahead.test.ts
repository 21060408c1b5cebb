import { describe, expect, it } from 'vitest'
import { plainDate } from '../../../shared/dates/plain-date'
import { historyFromWire } from '../../../shared/leak-rate/from-wire'
import { lookAhead, roomOn } from '../../../shared/leak-rate/look-ahead'
import { percent } from '../../../shared/leak-rate/percent'
import { rateAdditions } from '../../../shared/leak-rate/rated-additions'
import { annualizedLeakRate, rollingLeakRate, roomBeforeThreshold } from '../../../shared/leak-rate/rates'
import { lb } from '../../../shared/mass/mass'
import { added, aHistory, followUp, poundsOf, removed } from './builders'

const outlook = (history: Parameters<typeof lookAhead>[0], candidate: Parameters<typeof lookAhead>[1]) => {
  const { rated, outlooks } = lookAhead(history, candidate, [percent('10')])
  const [first] = outlooks
  return {
    rate: rated.rate?.toDecimalPlaces(4).toFixed() ?? null,
    ...(first && { isAbove: first.isAbove, before: poundsOf(first.before.roomKg), after: poundsOf(first.after.roomKg), overBy: poundsOf(first.after.overByKg) }),
  }
}

describe('before the gas goes in, 100 lb charge, threshold 10 %, a year since the last addition; worked by hand', () => {
  const history = aHistory([added('2025-01-01', '1')])
  it.each([
    // lb, rate, above, room before, room after, over by
    ['4', '4', false, '10', '6', '0'],
    ['10', '10', false, '10', '0', '0'], // exactly at the threshold is not above it
    ['10.01', '10.01', true, '10', '0', '0.01'],
    ['25', '25', true, '10', '0', '15'],
  ])('%s lb', (pounds, rate, isAbove, before, after, overBy) => {
    expect(outlook(history, added('2026-01-01', pounds))).toEqual({ rate, isAbove, before, after, overBy })
  })
  it('what was added for the same leak has used up room', () => {
    const sameLeak = aHistory([added('2024-01-01', '1'), added('2025-12-01', '7', { leakId: 'coil' })])
    expect(outlook(sameLeak, added('2026-01-01', '2', { leakId: 'coil' }))).toMatchObject({ rate: '9', before: '3', after: '1' })
  })
  it('gas that only comes back does not use up room', () => {
    const repaired = aHistory([added('2024-01-01', '1'), removed('2026-01-01', '40')])
    expect(outlook(repaired, added('2026-01-01', '45'))).toMatchObject({ rate: '5', isAbove: false, before: '50', after: '5' })
    expect(outlook(repaired, added('2026-01-01', '30'))).toMatchObject({ rate: null, isAbove: false, before: '50', after: '20' })
  })
  it('an installation has no rate and no room', () => {
    expect(outlook(history, added('2026-01-01', '100', { purpose: 'installation' }))).toEqual({ rate: null })
  })
  it('without a full charge there is neither', () => {
    expect(outlook(aHistory([], { fullCharges: [] }), added('2026-01-01', '10'))).toEqual({ rate: null })
  })
  it('shows the same rate that the ledger computes once it is posted', () => {
    const candidate = added('2026-01-01', '7', { leakId: 'coil' })
    expect(lookAhead(history, candidate, []).rated).toEqual(rateAdditions({ ...history, events: [...history.events, candidate] }).at(-1))
  })
  it('an addition entered late does not see what happened after it', () => {
    const later = aHistory([added('2024-01-01', '1'), added('2026-03-01', '9', { leakId: 'coil' })])
    expect(outlook(later, added('2026-01-01', '4', { leakId: 'coil' }))).toMatchObject({ rate: '4', before: '10' })
  })
})

describe('the room that is left on a day', () => {
  const room = (history: Parameters<typeof roomOn>[0], on: string) => {
    const left = roomOn(history, plainDate(on), percent('10'))
    return left && { room: poundsOf(left.roomKg), over: poundsOf(left.overByKg) }
  }
  it('grows with the days since the last addition', () => {
    const history = aHistory([added('2025-01-01', '50')])
    expect(room(history, '2025-03-15')).toEqual({ room: '2', over: '0' }) // 10 % × 100 lb × 73/365
    expect(room(history, '2026-01-01')).toEqual({ room: '10', over: '0' })
  })
  it('on the day of an addition counts it to the same leak', () => {
    expect(room(aHistory([added('2024-01-01', '1'), added('2026-01-01', '12')]), '2026-01-01')).toEqual({ room: '0', over: '2' })
  })
  it('by the rolling method is what the window leaves', () => {
    expect(room(aHistory([added('2025-06-01', '7')], { method: 'rolling' }), '2026-01-01')).toEqual({ room: '3', over: '0' })
    expect(room(aHistory([added('2025-06-01', '7'), followUp('2025-06-10')], { method: 'rolling' }), '2026-01-01')).toEqual({ room: '10', over: '0' })
  })
  it('does not know what happens later', () => {
    expect(room(aHistory([added('2024-01-01', '1'), added('2026-02-01', '12')]), '2026-01-01')).toEqual({ room: '10', over: '0' })
  })
  it('is unknown without a full charge', () => {
    expect(room(aHistory([], { fullCharges: [] }), '2026-01-01')).toBeNull()
  })
})

describe('arguments that no circuit can have are refused', () => {
  const good = { addedKg: lb('1'), fullChargeKg: lb('10'), days: 1 }
  it.each([{ ...good, days: 0 }, { ...good, days: 1.5 }, { ...good, addedKg: lb('0') }, { ...good, fullChargeKg: lb('0') }])('%o', (given) => {
    expect(() => annualizedLeakRate(given)).toThrow(RangeError)
  })
  it('a rolling rate of nothing added, a room below nothing added', () => {
    expect(() => rollingLeakRate({ addedKg: lb('0'), fullChargeKg: lb('10') })).toThrow(RangeError)
    expect(() => roomBeforeThreshold({ threshold: percent('10'), fullChargeKg: lb('10'), days: 1, alreadyAddedKg: lb('-1'), method: 'rolling' })).toThrow(RangeError)
  })
})

describe('the history from the wire', () => {
  const event = { postingId: 'a', occurredOn: plainDate('2026-01-01'), occurredAt: '2026-01-01T12:00:00Z', massKg: '4.5359237', leakId: 'coil', purpose: 'leak' as const }
  const wire = { method: 'rolling' as const, commissionedOn: null, fullCharges: [{ effectiveOn: plainDate('2020-01-01'), massKg: '45.359237' }] }
  it('gives exact masses and the rate they make', () => {
    const history = historyFromWire({ ...wire, events: [
      { ...event, kind: 'addition' }, { ...event, kind: 'removal', postingId: 'b', leakId: null, purpose: null },
      { ...event, kind: 'follow-up-passed', postingId: null, massKg: null, leakId: null, purpose: null },
    ] })
    expect(history.events.map(({ kind }) => kind)).toEqual(['addition', 'removal', 'follow-up-passed'])
    expect(rateAdditions(historyFromWire({ ...wire, events: [{ ...event, kind: 'addition' }] }))[0]?.rate?.toFixed()).toBe('10')
  })
  it.each([{ massKg: null }, { postingId: null }, { occurredAt: null }, { massKg: 'ten' }])('refuses an addition with %o', (missing) => {
    expect(() => historyFromWire({ ...wire, events: [{ ...event, ...missing, kind: 'addition' }] })).toThrow(RangeError)
  })
})
