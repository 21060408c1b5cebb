import type { EnteredWeighing, MassUnit } from '../api/ledger'
import { isPositive, kg, lb, minus, oz, OUNCES_PER_POUND, LB_KG, lessThan, plus, type Mass } from '../mass/mass'
import { Exact } from './decimal'

/** Why a reading cannot be taken as a mass. */
export type ReadingFault =
  | 'not-a-number'
  /** "1,250" pounds: a thousand and more, or one and a quarter? A guess could be wrong by a thousand. */
  | 'comma-unclear'
  | 'negative'
  | 'too-fine'
  | 'too-large'
  /** Pounds and ounces with sixteen ounces or more. */
  | 'ounces-over-16'

export type Reading = { ok: true; mass: Mass } | { ok: false; code: ReadingFault }

/** Digits after the point that a reading may have; a finer one is no reading of a field scale. For lb-oz: of the ounces. */
export const FINEST_DIGITS: Record<MassUnit, number> = { 'lb': 4, 'lb-oz': 2, 'oz': 2, 'kg': 6, 'g': 3 }

/** [kg] above it a reading is taken for a slip of the finger */
const GREATEST_READING = kg('1000000')

/** Digits before the point; more than the greatest reading has in any unit. */
const WHOLE_DIGITS = 10
const SUFFIXES: Record<Exclude<MassUnit, 'lb-oz'>, RegExp> = {
  lb: /\s*(lbs?\.?|pounds?)$/i,
  oz: /\s*(oz\.?|ounces?)$/i,
  kg: /\s*(kg|kilograms?)$/i,
  g: /\s*(g|grams?)$/i,
}

/**
 * What a person types or a scale shows, as an exact mass ≥ 0. Point or comma as decimal sign, the unit itself
 * may stand behind; pounds and ounces as "12-4.5", "12 4.5" or "12 lb 4.5 oz", either part alone only with its
 * unit, or pounds as a whole number.
 */
export function parseMass(text: string, unit: MassUnit): Reading {
  const plain = text.trim().replace(/[\u2212\u2013]/g, '-').replace(/[\u00a0\u202f]/g, ' ')
  if (unit === 'lb-oz') return parsePoundsAndOunces(plain)
  const number = parseNumber(plain.replace(SUFFIXES[unit], ''), unit)
  return 'code' in number ? { ok: false, code: number.code } : checkedSize(MASS_OF[unit](number.text))
}

const POUNDS_ALONE = /^(\d+)\s*(?:lbs?\.?)?$/i
const OUNCES_ALONE = /^([\d.,]+)\s*(?:oz\.?|ounces?)$/i
const BOTH = /^(\d+)(?:\s*lbs?\.?\s*-?\s*|\s*-\s*|\s+)([\d.,]+)\s*(?:oz\.?|ounces?)?$/i

function parsePoundsAndOunces(text: string): Reading {
  if (text.startsWith('-')) return { ok: false, code: 'negative' }
  const [pounds, ounces] = BOTH.exec(text)?.slice(1) ?? [POUNDS_ALONE.exec(text)?.[1], OUNCES_ALONE.exec(text)?.[1]]
  if (pounds === undefined && ounces === undefined) return { ok: false, code: 'not-a-number' }
  const wholePounds = parseNumber(pounds ?? '0', 'lb-oz')
  if ('code' in wholePounds) return { ok: false, code: wholePounds.code }
  const looseOunces = parseNumber(ounces ?? '0', 'lb-oz')
  if ('code' in looseOunces) return { ok: false, code: looseOunces.code }
  if (Number(looseOunces.text) >= OUNCES_PER_POUND) return { ok: false, code: 'ounces-over-16' }
  return checkedSize(plus(lb(wholePounds.text), oz(looseOunces.text)))
}

function parseNumber(text: string, unit: MassUnit): { text: string } | { code: ReadingFault } {
  const isMetric = unit === 'kg' || unit === 'g'
  if (!/^-?(\d+([.,]\d*)?|[.,]\d+)$/.test(text)) return { code: 'not-a-number' }
  if (text.startsWith('-')) return { code: 'negative' }
  if (!isMetric && /^[1-9]\d{0,2},\d{3}$/.test(text)) return { code: 'comma-unclear' }
  const [whole = '', fraction = ''] = text.replace(',', '.').split('.')
  const needed = fraction.replace(/0+$/, '')
  if (needed.length > FINEST_DIGITS[unit]) return { code: 'too-fine' }
  const wholeNeeded = whole.replace(/^0+(?=\d)/, '') || '0'
  if (wholeNeeded.length > WHOLE_DIGITS) return { code: 'too-large' }
  return { text: needed ? `${wholeNeeded}.${needed}` : wholeNeeded }
}

const MASS_OF: Record<Exclude<MassUnit, 'lb-oz'>, (text: string) => Mass> = {
  lb, oz, kg, g: (grams) => kg(new Exact(grams).dividedBy(1000).toFixed()),
}

const checkedSize = (mass: Mass): Reading =>
  lessThan(GREATEST_READING, mass) ? { ok: false, code: 'too-large' } : { ok: true, mass }

/** A mass in the unit a person reads, as decimal text with a point; the client writes it with Intl. */
export type MassParts =
  | { unit: Exclude<MassUnit, 'lb-oz'>; value: string }
  | { unit: 'lb-oz'; isNegative: boolean; pounds: string; ounces: string }

/**
 * A mass in a unit, rounded half to even for display only.
 *
 * @param digits  after the point; for lb-oz of the ounces
 */
export function massIn(mass: Mass, unit: MassUnit, digits: number): MassParts {
  if (unit !== 'lb-oz') return { unit, value: withoutMinusZero(inUnit(mass, unit).toFixed(digits)) }
  // Rounded as ounces first, so that 15.99 oz becomes a pound and not "16.0 oz".
  const ounces = inUnit(mass, 'oz').toDecimalPlaces(digits).abs()
  const pounds = ounces.dividedToIntegerBy(OUNCES_PER_POUND)
  return {
    unit, isNegative: mass.isNegative() && !ounces.isZero(), pounds: pounds.toFixed(0),
    ounces: ounces.minus(pounds.times(OUNCES_PER_POUND)).toFixed(digits),
  }
}

/** A mass as a person would type it, which `parseMass` reads again; superfluous zeros left out. @param digits as in `massIn` */
export function massText(mass: Mass, unit: MassUnit, digits: number = FINEST_DIGITS[unit]): string {
  const parts = massIn(mass, unit, digits)
  const short = (text: string) => new Exact(text).toFixed()
  if (parts.unit !== 'lb-oz') return short(parts.value)
  return `${parts.isNegative ? '-' : ''}${parts.pounds}-${short(parts.ounces)}`
}

function inUnit(mass: Mass, unit: Exclude<MassUnit, 'lb-oz'>): Exact {
  switch (unit) {
    case 'kg':
      return mass
    case 'g':
      return mass.times(1000)
    case 'lb':
      return mass.dividedBy(LB_KG)
    case 'oz':
      return mass.times(OUNCES_PER_POUND).dividedBy(LB_KG)
    default:
      return unit satisfies never
  }
}

const withoutMinusZero = (text: string): string => (/^-0(\.0*)?$/.test(text) ? text.slice(1) : text)

/** Whether the gas leaves the cylinder on the scale (charge, return) or comes into it (recovery, purchase). */
export type WeighingDirection = 'out' | 'in'

export type NetReading =
  | { ok: true; mass: Mass }
  | { ok: false; field: 'before' | 'after' | 'amount'; code: ReadingFault }
  /** After is not lighter than before, though gas went out, or not heavier, though gas came in. */
  | { ok: false; field: 'after'; code: 'net-not-positive' }
  | { ok: false; field: 'before' | 'after' | 'amount'; code: 'missing' }

/**
 * The net mass that a weighing shows: the amount where one was entered, else the difference of the two readings.
 *
 * @returns [kg] > 0, or the field that does not fit and why
 */
export function netOf({ unit, before, after, amount }: EnteredWeighing, direction: WeighingDirection): NetReading {
  if (isFilled(amount)) {
    const reading = parseMass(amount, unit)
    if (!reading.ok) return { ...reading, field: 'amount' }
    return isPositive(reading.mass) ? reading : { ok: false, field: 'amount', code: 'missing' }
  }
  if (!isFilled(before)) return { ok: false, field: isFilled(after) ? 'before' : 'amount', code: 'missing' }
  if (!isFilled(after)) return { ok: false, field: 'after', code: 'missing' }
  const first = parseMass(before, unit)
  if (!first.ok) return { ...first, field: 'before' }
  const second = parseMass(after, unit)
  if (!second.ok) return { ...second, field: 'after' }
  const mass = direction === 'out' ? minus(first.mass, second.mass) : minus(second.mass, first.mass)
  return isPositive(mass) ? { ok: true, mass } : { ok: false, field: 'after', code: 'net-not-positive' }
}

const isFilled = (text: string | null): text is string => text !== null && text.trim() !== ''

/**
 * What a scale shows beyond the book: positive where the cylinder holds more than the ledger says.
 *
 * @param grossKg  [kg] on the scale
 * @param tareKg  [kg] stamped
 * @param bookKg  [kg] net, by the ledger
 * @returns [kg] signed
 */
export function varianceFromScale({ grossKg, tareKg, bookKg }: { grossKg: Mass; tareKg: Mass; bookKg: Mass }): Mass {
  return minus(minus(grossKg, tareKg), bookKg)
}
