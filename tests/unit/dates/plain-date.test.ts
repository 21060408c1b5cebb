import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  addDays, addMonths, addYears, daysBetween, earlier, isAfter, isBefore, isPlainDate, later, plainDate, yearOf,
} from '../../../shared/dates/plain-date'

describe('calendar dates', () => {
  it.each(['2026-12-01', '2024-02-29', '2000-02-29', '0001-01-01', '9999-12-31'])('%s is one', (text) => {
    expect(plainDate(text)).toBe(text)
  })
  it.each(['2026-02-29', '2100-02-29', '2026-04-31', '2026-13-01', '2026-00-10', '2026-1-1', '0000-01-01', '2026-12-01T00:00:00Z', ' 2026-12-01', ''])(
    '"%s" is none', (text) => {
      expect(isPlainDate(text)).toBe(false)
      expect(() => plainDate(text)).toThrow(RangeError)
    })
})

describe('days and months, counted by hand on a calendar', () => {
  it.each([
    ['2026-01-01', '2026-04-01', 90], ['2024-02-28', '2024-03-01', 2], ['2026-02-28', '2026-03-01', 1],
    ['2025-01-01', '2026-01-01', 365], ['2024-01-01', '2025-01-01', 366], ['2000-01-01', '2100-01-01', 36_525], ['2026-05-02', '2026-05-01', -1],
  ])('from %s to %s: %i days', (from, to, days) => {
    expect(daysBetween(plainDate(from), plainDate(to))).toBe(days)
    expect(addDays(plainDate(from), days)).toBe(to)
  })
  it.each([
    ['2026-01-31', 1, '2026-02-28'], ['2024-01-31', 1, '2024-02-29'], ['2026-03-31', -1, '2026-02-28'], ['2026-11-30', 3, '2027-02-28'],
    ['2026-08-15', 12, '2027-08-15'], ['0099-12-31', 2, '0100-02-28'], ['0050-01-15', 0, '0050-01-15'],
  ])('%s and %i months: %s', (from, months, expected) => {
    expect(addMonths(plainDate(from), months)).toBe(expected)
  })
  it('a year after a leap day is the last of February', () => {
    expect(addYears(plainDate('2024-02-29'), 1)).toBe('2025-02-28')
    expect(addYears(plainDate('2024-02-29'), 4)).toBe('2028-02-29')
  })
  it('before year 1 and after year 9999 there is no date', () => {
    expect(() => addDays(plainDate('0001-01-01'), -1)).toThrow(RangeError)
    expect(() => addMonths(plainDate('9999-12-31'), 1)).toThrow(RangeError)
  })
  it('order and year', () => {
    const [a, b] = [plainDate('2025-12-31'), plainDate('2026-01-01')]
    expect([isBefore(a, b), isAfter(a, b), isBefore(a, a), earlier(a, b), later(a, b), yearOf(b)]).toEqual([true, false, false, a, b, 2026])
  })
})

describe('laws of the calendar, leap days and all', () => {
  const someDate = fc.oneof(
    fc.integer({ min: -690_000, max: 2_850_000 }).map((days) => addDays(plainDate('2000-01-01'), days)),
    fc.integer({ min: 30, max: 2300 }).map((fours) => addYears(plainDate('0004-02-28'), 4 * fours)),
    fc.integer({ min: 30, max: 2300 }).map((fours) => addDays(addYears(plainDate('0004-02-28'), 4 * fours), 1)),
    fc.constantFrom(...['1900-02-28', '2000-02-29', '2024-02-29', '2024-03-01', '2100-02-28', '2100-03-01'].map(plainDate)),
  )
  const span = fc.integer({ min: -20_000, max: 20_000 })
  it('days added are days between', () => {
    fc.assert(fc.property(someDate, span, (date, days) => {
      expect(daysBetween(date, addDays(date, days))).toBe(days)
    }))
  })
  it('days added twice are their sum, and text order is date order', () => {
    fc.assert(fc.property(someDate, span, span, (date, a, b) => {
      expect(addDays(addDays(date, a), b)).toBe(addDays(date, a + b))
      expect(isBefore(date, addDays(date, a))).toBe(a > 0)
    }))
  })
  it('months keep the day, or fall on the last of the month', () => {
    fc.assert(fc.property(someDate, fc.integer({ min: -600, max: 600 }), (date, months) => {
      fc.pre(yearOf(date) > 60 && yearOf(date) < 9900)
      const moved = addMonths(date, months)
      const [year = 0, month = 0] = date.split('-').map(Number)
      const monthNumber = year * 12 + month - 1 + months
      expect(yearOf(moved) * 12 + Number(moved.slice(5, 7)) - 1).toBe(monthNumber)
      const isSameDay = moved.slice(8) === date.slice(8)
      expect(isSameDay || (moved < addDays(moved, 1) && addDays(moved, 1).endsWith('-01') && moved.slice(8) < date.slice(8))).toBe(true)
    }))
  })
})
