import { describe, expect, it } from 'vitest'
import { addDays, plainDate } from '../../shared/dates/plain-date'
import type { CircuitHistory } from '../../shared/leak-rate/history'
import { isAbove, percent, toPercentText } from '../../shared/leak-rate/percent'
import { rateAdditions } from '../../shared/leak-rate/rated-additions'
import { annualizedLeakRate, rollingLeakRate, roomBeforeThreshold } from '../../shared/leak-rate/rates'
import { lb, ZERO_MASS } from '../../shared/mass/mass'

describe('annualizing method, 40 CFR 82.152 "leak rate"; worked by hand, exact fractions', () => {
  it.each([
    // full lb, added lb, days, percent to four digits (half a unit of the last digit is the tolerance)
    ['100', '10', 90, '40.5556'],   // 10/100 × 365/90 = 40.5555…
    ['60', '60', 365, '100.0000'],  // flat after a year
    ['60', '60', 1200, '100.0000'], // longer counts as 365
    ['60', '60', 73, '500.0000'],   // 365/73 = 5
    ['200', '20', 365, '10.0000'],
    ['80', '5', 50, '45.6250'],     // 3 lb, then 2 lb for the same leak, 50 days to the second
  ])('%s lb charge, %s lb added after %i days: %s %%', (full, added, days, expected) => {
    expect(toPercentText(annualizedLeakRate({ addedKg: lb(added), fullChargeKg: lb(full), days }), 4)).toBe(expected)
  })

  it('20 lb in 200 lb after a year is exactly 10 %, which is not above 10 %; a hundredth of an ounce more is', () => {
    const rate = (added: string) => annualizedLeakRate({ addedKg: lb(added), fullChargeKg: lb('200'), days: 365 })
    expect(rate('20').equals(10)).toBe(true)
    expect(isAbove(rate('20'), percent('10'))).toBe(false)
    expect(isAbove(rate('20.000625'), percent('10'))).toBe(true)
  })

  it('a share without an end, multiplied back by days, is still exactly at its threshold', () => {
    // 7.3 lb of 365 lb is 0.02; × 365/73 is exactly 10 %
    expect(annualizedLeakRate({ addedKg: lb('7.3'), fullChargeKg: lb('365'), days: 73 }).equals(10)).toBe(true)
    // 0.9 lb of 10.95 lb has no end; × 365/300 = 0.9 × 365 / 3285 = exactly 10 %
    expect(annualizedLeakRate({ addedKg: lb('0.9'), fullChargeKg: lb('10.95'), days: 300 }).equals(10)).toBe(true)
  })

  it('80 lb charge, 3 lb and then 2 lb for one leak, 50 days to the second: 45.625 %', () => {
    const begin = plainDate('2026-01-01')
    const at = (day: number, pounds: string, leakId: string | null) => ({
      kind: 'addition' as const, postingId: `day ${day}`, occurredOn: addDays(begin, day), occurredAt: `${addDays(begin, day)}T12:00:00Z`,
      massKg: lb(pounds), leakId, purpose: 'leak' as const,
    })
    const history: CircuitHistory = {
      method: 'annualizing', commissionedOn: null, fullCharges: [{ effectiveOn: begin, massKg: lb('80') }],
      events: [at(0, '1', null), at(20, '3', 'coil'), at(50, '2', 'coil')],
    }
    expect(rateAdditions(history).at(-1)?.rate?.toFixed()).toBe('45.625')
  })
})

describe('rolling average method, 40 CFR 82.152 "leak rate"; worked by hand', () => {
  it.each([
    ['100', '19', '19.0000'],
    ['60', '20', '33.3333'], // recovered 40 lb of 60, put back 60: 20 lb were lost
    ['60', '75', '125.0000'], // the loss that 40 CFR 82.157 calls chronic
  ])('%s lb charge, %s lb in the window: %s %%', (full, added, expected) => {
    expect(toPercentText(rollingLeakRate({ addedKg: lb(added), fullChargeKg: lb(full) }), 4)).toBe(expected)
  })
})

describe('room before a threshold; worked by hand: threshold × full charge × min(days, 365) / 365', () => {
  it.each([
    // full lb, threshold, days, lb to four digits
    ['100', '10', 90, '2.4658'],  // 900/365
    ['100', '10', 365, '10.0000'],
    ['100', '10', 700, '10.0000'],
    ['60', '20', 73, '2.4000'],   // 12/5
    ['500', '30', 1, '0.4110'],   // 150/365 = 0.41095…
  ])('%s lb charge, %s %%, %i days: %s lb', (full, threshold, days, expected) => {
    const { roomKg } = roomBeforeThreshold({ threshold: percent(threshold), fullChargeKg: lb(full), days, alreadyAddedKg: ZERO_MASS, method: 'annualizing' })
    expect(roomKg.dividedBy('0.45359237').toFixed(4)).toBe(expected)
  })
})
