import { describe, expect, it } from 'vitest'
import { instantOfLocal, localTimeOf } from '../../../shared/dates/local-instant'
import { plainDate } from '../../../shared/dates/plain-date'

describe('the instant of a clock at a site, from the published clock changes of each zone', () => {
  it.each([
    // Chicago: CST is UTC-6, CDT UTC-5
    ['America/Chicago', '2026-12-01', '08:30', '2026-12-01T14:30:00.000Z'],
    ['America/Chicago', '2026-06-15', '23:45', '2026-06-16T04:45:00.000Z'],
    // 8 March 2026: the clock goes from 2 to 3; half past two is left out and taken as half past three
    ['America/Chicago', '2026-03-08', '01:59', '2026-03-08T07:59:00.000Z'],
    ['America/Chicago', '2026-03-08', '02:30', '2026-03-08T08:30:00.000Z'],
    ['America/Chicago', '2026-03-08', '03:00', '2026-03-08T08:00:00.000Z'],
    // 1 November 2026: the clock shows half past one twice; the first is still CDT
    ['America/Chicago', '2026-11-01', '01:30', '2026-11-01T06:30:00.000Z'],
    ['America/Chicago', '2026-11-01', '02:00', '2026-11-01T08:00:00.000Z'],
    // Phoenix keeps UTC-7; Kathmandu is UTC+5:45; Kiritimati UTC+14
    ['America/Phoenix', '2026-07-01', '00:00', '2026-07-01T07:00:00.000Z'],
    ['Asia/Kathmandu', '2026-01-01', '12:00', '2026-01-01T06:15:00.000Z'],
    ['Pacific/Kiritimati', '2026-01-01', '00:30', '2025-12-31T10:30:00.000Z'],
  ])('%s, %s %s: %s', (timeZone, date, time, expected) => {
    expect(instantOfLocal({ date: plainDate(date), time, timeZone })).toBe(expected)
  })
  it.each([
    ['2026-12-01T14:30:59Z', 'America/Chicago', '08:30'],
    ['2026-03-08T08:00:00Z', 'America/Chicago', '03:00'],
    ['2026-01-01T06:15:00Z', 'Asia/Kathmandu', '12:00'],
  ])('at %s a clock in %s shows %s', (instant, timeZone, expected) => {
    expect(localTimeOf(instant, timeZone)).toBe(expected)
  })
  it.each(['24:00', '8:30', '', '08:60'])('"%s" is no time', (time) => {
    expect(() => instantOfLocal({ date: plainDate('2026-12-01'), time, timeZone: 'UTC' })).toThrow(RangeError)
  })
})
