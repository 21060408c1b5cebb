import { LB_KG, toKgText, type Mass } from '../../shared/mass/mass'
import type { Percent } from '../../shared/leak-rate/percent'
import type { PlainDate } from '../../shared/dates/plain-date'
import { Exact } from '../../shared/units/decimal'
import { say } from '../language'

/** [digits after the point] of pounds that are written out exactly; more would be a division that does not end */
const MOST_POUND_DIGITS = 6
const MOST_RATE_DIGITS = 4

/** How one paper says things: in the language of the person who asks and the mass unit of the place. */
export interface Words {
  locale: string
  massUnit: 'lb' | 'kg'
  /** A sentence of the area of the papers. */
  text: (key: string, params?: Record<string, unknown>) => string
  /** A sentence of any area. */
  common: (key: string, params?: Record<string, unknown>) => string
  /** A number alone, two digits after the point, in the unit of the place. */
  mass: (mass: Mass) => string
  /** "60.00 lb (27.22 kg)" */
  massInBoth: (mass: Mass) => string
  /** Exact kilograms, and pounds that are exact where they can be. */
  massExact: (mass: Mass) => string
  /** A rate without its sign, to two digits; more where it would look equal to its threshold and is not. */
  rate: (rate: Percent, threshold: Percent | null) => string
  /** A threshold without its sign, to as many digits as it has. */
  threshold: (threshold: Percent) => string
  date: (date: PlainDate) => string
  /** An instant with its zone. */
  instant: (instant: Date, timeZone: string) => string
  /** What is missing is said, never left out. */
  orMissing: (value: string | null) => string
}

export function wordsFor(locale: string, jurisdiction: string): Words {
  const massUnit = jurisdiction.startsWith('US') ? 'lb' : 'kg'
  const text = (key: string, params: Record<string, unknown> = {}): string => say(locale, `papers.${key}`, params)
  const number = numbersIn(locale)
  const dates = new Intl.DateTimeFormat(locale, { dateStyle: 'medium', timeZone: 'UTC' })
  const pounds = (mass: Mass): Exact => mass.dividedBy(LB_KG)
  const lb = (mass: Mass): string => text('unit.lb', { mass: number(pounds(mass), 2) })
  const kg = (mass: Mass): string => text('unit.kg', { mass: number(mass, 2) })
  return {
    locale, massUnit, text, common: (key, params = {}) => say(locale, key, params),
    mass: (mass) => number(massUnit === 'lb' ? pounds(mass) : mass, 2),
    massInBoth: (mass) => (massUnit === 'lb' ? text('unit.both', { first: lb(mass), second: kg(mass) }) : text('unit.both', { first: kg(mass), second: lb(mass) })),
    massExact: (mass) => exactMass(text, number, mass),
    rate: (rate, threshold) => rateText(text, number, rate, threshold),
    threshold: (threshold) => number(threshold, 0, MOST_RATE_DIGITS),
    date: (date) => dates.format(new Date(`${date}T00:00:00Z`)),
    instant: (instant, timeZone) => new Intl.DateTimeFormat(locale, {
      year: 'numeric', month: 'short', day: 'numeric', hour: '2-digit', minute: '2-digit', timeZone, timeZoneName: 'short',
    }).format(instant),
    orMissing: (value) => value || text('notRecorded'),
  }
}

type Numbers = (value: Exact, least: number, most?: number) => string

/** Writes exact decimals with at least and at most so many digits after the point, halves away from zero. */
function numbersIn(locale: string): Numbers {
  const formats = new Map<string, Intl.NumberFormat>()
  return (value, least, most = least) => {
    const key = `${least} ${most}`
    const format = formats.get(key) ?? new Intl.NumberFormat(locale, { minimumFractionDigits: least, maximumFractionDigits: most })
    formats.set(key, format)
    return format.format(value.toFixed(most, Exact.ROUND_HALF_UP) as `${number}`) // Intl reads exact text; TypeScript wants it spelled as a number
  }
}

function exactMass(text: Words['text'], number: Numbers, mass: Mass): string {
  const kilograms = text('unit.kg', { mass: number(mass, 2, Math.max(2, mass.decimalPlaces())) })
  const pounds = mass.dividedBy(LB_KG).toDecimalPlaces(MOST_POUND_DIGITS)
  return pounds.times(LB_KG).equals(mass)
    ? text('unit.exactBoth', { pounds: number(pounds, 2, MOST_POUND_DIGITS), kilograms })
    : text('unit.exactKilograms', { pounds: number(pounds, 2, 4), kilograms, exact: toKgText(mass) })
}

function rateText(text: Words['text'], number: Numbers, rate: Percent, threshold: Percent | null): string {
  const looksEqual = (digits: number): boolean =>
    threshold !== null && !rate.equals(threshold) && rate.toDecimalPlaces(digits, Exact.ROUND_HALF_UP).equals(threshold)
  let digits = 2
  while (digits < MOST_RATE_DIGITS && looksEqual(digits)) digits += 1
  const shown = number(rate, 2, digits)
  if (threshold === null || !looksEqual(digits)) return shown
  return text(rate.greaterThan(threshold) ? 'unit.justAbove' : 'unit.justBelow', { percent: shown })
}
