declare const plainDateBrand: unique symbol

/** A calendar date without a zone, ISO 8601 "2026-12-01". Plain text comparison is date order. */
export type PlainDate = string & { readonly [plainDateBrand]: true }

/** @param text "YYYY-MM-DD", proleptic Gregorian, years 0001 to 9999 @throws RangeError if no such day exists */
export function plainDate(text: string): PlainDate {
  if (!isPlainDate(text)) throw new RangeError(`"${text}" is not a calendar date such as 2026-12-01.`)
  return text
}

export function isPlainDate(text: string): text is PlainDate {
  if (!/^\d{4}-\d{2}-\d{2}$/.test(text) || text.startsWith('0000')) return false
  const at = Date.parse(`${text}T00:00:00Z`)
  return !Number.isNaN(at) && new Date(at).toISOString().slice(0, 10) === text
}

const DAY_MS = 86_400_000 // [ms] of a day in UTC, which has no clock changes
const toDayNumber = (date: PlainDate): number => Date.parse(`${date}T00:00:00Z`) / DAY_MS
const fromDayNumber = (day: number): PlainDate => plainDate(new Date(day * DAY_MS).toISOString().slice(0, 10))

/** @returns [d] whole days from one date to another; negative if `to` is earlier */
export const daysBetween = (from: PlainDate, to: PlainDate): number => toDayNumber(to) - toDayNumber(from)
/** @param days [d] may be negative */
export const addDays = (date: PlainDate, days: number): PlainDate => fromDayNumber(toDayNumber(date) + days)
/**
 * The same day of the month, so many months later; the month's last day where it is shorter
 * (31 January plus one month is 28 or 29 February).
 */
export function addMonths(date: PlainDate, months: number): PlainDate {
  const [year = 0, month = 0, day = 0] = date.split('-').map(Number)
  const first = monthOf(year, month - 1 + months)
  const lastDay = monthOf(first.getUTCFullYear(), first.getUTCMonth() + 1, 0).getUTCDate()
  first.setUTCDate(Math.min(day, lastDay))
  return plainDate(first.toISOString().slice(0, 10))
}
/** Not Date.UTC, which takes the years 0 to 99 for the last century. */
function monthOf(year: number, monthIndex: number, day = 1): Date {
  const date = new Date(0)
  date.setUTCFullYear(year, monthIndex, day)
  return date
}
export const addYears = (date: PlainDate, years: number): PlainDate => addMonths(date, 12 * years)
export const isBefore = (a: PlainDate, b: PlainDate): boolean => a < b
export const isAfter = (a: PlainDate, b: PlainDate): boolean => a > b
export const earlier = (a: PlainDate, b: PlainDate): PlainDate => (a < b ? a : b)
export const later = (a: PlainDate, b: PlainDate): PlainDate => (a < b ? b : a)
/** The four-digit year of a date. */
export const yearOf = (date: PlainDate): number => Number(date.slice(0, 4))

const formats = new Map<string, Intl.DateTimeFormat>()

/**
 * The calendar date at a site when an instant passes.
 *
 * @param instant  ISO 8601 instant with offset or Z
 * @param timeZone  IANA zone name such as "America/Chicago"
 * @throws RangeError if the zone is unknown, or the instant cannot be read or does not say its offset
 */
export function localDateOf(instant: string, timeZone: string): PlainDate {
  // Without an offset the machine's own zone would decide.
  if (!/T.*(Z|[+-]\d{2}:?\d{2})$/.test(instant)) throw new RangeError(`"${instant}" is not an instant with an offset.`)
  let format = formats.get(timeZone)
  if (!format) {
    format = new Intl.DateTimeFormat('en-US', { timeZone, year: 'numeric', month: '2-digit', day: '2-digit' })
    formats.set(timeZone, format)
  }
  const parts = format.formatToParts(new Date(instant))
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.find((each) => each.type === type)?.value ?? ''
  return plainDate(`${part('year').padStart(4, '0')}-${part('month')}-${part('day')}`)
}

/** Whether the runtime knows this IANA zone name. */
export function isTimeZone(name: string): boolean {
  try {
    new Intl.DateTimeFormat('en', { timeZone: name })
    return true
  } catch {
    return false
  }
}
