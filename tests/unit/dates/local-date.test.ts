import { describe, expect, it } from 'vitest'
import { isTimeZone, localDateOf } from '../../../shared/dates/plain-date'

describe('the date at a site, from the published clock changes of each zone', () => {
  it.each([
    // Chicago: CST is UTC-6, CDT UTC-5; clocks forward 8 March 2026, back 1 November 2026
    ['America/Chicago', '2026-03-08T05:59:59Z', '2026-03-07'],
    ['America/Chicago', '2026-03-08T06:00:00Z', '2026-03-08'],
    ['America/Chicago', '2026-03-09T04:59:59Z', '2026-03-08'],
    ['America/Chicago', '2026-03-09T05:00:00Z', '2026-03-09'],
    ['America/Chicago', '2026-11-02T05:59:59Z', '2026-11-01'],
    ['America/Chicago', '2026-11-02T06:00:00Z', '2026-11-02'],
    // Phoenix keeps UTC-7 all year
    ['America/Phoenix', '2026-07-01T06:59:59Z', '2026-06-30'],
    // Havana changes at midnight: the day begins at one o'clock
    ['America/Havana', '2026-03-08T04:59:59Z', '2026-03-07'],
    ['America/Havana', '2026-03-08T05:00:00Z', '2026-03-08'],
    // Apia left out 30 December 2011
    ['Pacific/Apia', '2011-12-30T09:59:59Z', '2011-12-29'],
    ['Pacific/Apia', '2011-12-30T10:00:00Z', '2011-12-31'],
    // Kiritimati is UTC+14, Kathmandu UTC+5:45
    ['Pacific/Kiritimati', '2026-01-01T10:00:00Z', '2026-01-02'],
    ['Asia/Kathmandu', '2026-01-01T18:14:59Z', '2026-01-01'],
    ['Asia/Kathmandu', '2026-01-01T18:15:00Z', '2026-01-02'],
    // an offset in the instant changes nothing about the site
    ['America/Chicago', '2026-06-15T01:00:00+02:00', '2026-06-14'],
  ])('%s at %s: %s', (zone, instant, expected) => {
    expect(localDateOf(instant, zone)).toBe(expected)
  })
  it.each([['2026-06-15T12:00:00', 'America/Chicago'], ['2026-06-15', 'America/Chicago'], ['soon', 'America/Chicago'], ['T25Z', 'UTC'],
    ['2026-06-15T12:00:00Z', 'America/Nowhere']])('"%s" in %s is refused', (instant, zone) => {
    expect(() => localDateOf(instant, zone)).toThrow(RangeError)
  })
  it('knows zones by name', () => {
    expect([isTimeZone('Europe/Berlin'), isTimeZone('Middle/Nowhere'), isTimeZone('')]).toEqual([true, false, false])
  })
})

describe('around every clock change of 2025 and 2026, in every zone', () => {
  const HALF_DAY_MS = 43_200_000
  const begin = Date.parse('2025-01-01T00:00:00Z')
  const halfDays = Array.from({ length: 2 * 730 }, (_, index) => begin + index * HALF_DAY_MS)

  it('the date is the instant moved by the offset of the zone', () => {
    let changes = 0
    for (const zone of Intl.supportedValuesOf('timeZone')) {
      const offsetOf = offsetsOf(zone)
      const jan = offsetOf(begin)
      const moving = halfDays.filter((at, index) => index % 14 === 0 && offsetOf(at) !== jan).length > 0
      if (!moving) continue
      for (const at of halfDays) {
        if (offsetOf(at) === offsetOf(at + HALF_DAY_MS)) continue
        changes += 1
        const change = firstWith(at, at + HALF_DAY_MS, (each) => offsetOf(each) !== offsetOf(at))
        for (const near of [-86_400_000, -3_600_000, -1, 0, 1, 3_600_000, 86_400_000].map((ms) => change + ms)) {
          const expected = new Date(near + offsetOf(near)).toISOString().slice(0, 10)
          expect(localDateOf(new Date(near).toISOString(), zone), `${zone} ${new Date(near).toISOString()}`).toBe(expected)
        }
      }
    }
    expect(changes).toBeGreaterThan(400) // some 110 zones change four times in two years
  }, 60_000)
})

/** The offset of a zone from UTC [ms] at an instant, by the zone's printed offset. */
function offsetsOf(timeZone: string): (at: number) => number {
  const format = new Intl.DateTimeFormat('en-US', { timeZone, timeZoneName: 'longOffset' })
  return (at) => {
    const [, sign = '+', hours = '0', minutes = '0'] = /GMT([+-])(\d{2}):(\d{2})$/.exec(format.format(at)) ?? []
    return (sign === '-' ? -1 : 1) * (Number(hours) * 3_600_000 + Number(minutes) * 60_000)
  }
}

/** The first millisecond in a span from which a statement holds. */
function firstWith(from: number, to: number, holds: (at: number) => boolean): number {
  let [low, high] = [from, to]
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2)
    if (holds(middle)) high = middle
    else low = middle
  }
  return high
}
