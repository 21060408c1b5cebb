import { Exact } from '../units/decimal'

/**
 * An exact mass [kg]. Opaque on purpose: only the functions here add, compare and print it,
 * so no float can slip in. On the wire and in `numeric` columns it is a string of kilograms.
 */
export type Mass = Exact & { readonly unit: 'kg' }

/** [kg/lb] exact, international pound, 1959 */
export const LB_KG = '0.45359237'
/** [oz/lb] exact */
export const OUNCES_PER_POUND = 16
/** Digits after the point of a mass in kilograms that storage keeps; a hundredth of an ounce needs them all. */
export const MASS_SCALE = 14

const asMass = (value: Exact): Mass => value as Mass

/**
 * A mass from kilograms, as read from the wire or from a `numeric` column.
 *
 * @param kilograms  [kg] decimal text such as "12.5"
 * @throws RangeError if the text is not a finite decimal number or is finer than storage keeps
 */
export function kg(kilograms: string): Mass {
  return asMass(checkedScale(parseDecimal(kilograms)))
}

/** A mass from avoirdupois pounds. @param pounds [lb] decimal text @throws RangeError as `kg` does */
export function lb(pounds: string): Mass {
  return asMass(checkedScale(parseDecimal(pounds).times(LB_KG)))
}

/** A mass from avoirdupois ounces. @param ounces [oz] decimal text @throws RangeError as `kg` does */
export function oz(ounces: string): Mass {
  return asMass(checkedScale(parseDecimal(ounces).times(LB_KG).dividedBy(OUNCES_PER_POUND)))
}

export const ZERO_MASS: Mass = asMass(new Exact(0))

export const plus = (a: Mass, b: Mass): Mass => asMass(a.plus(b))
export const minus = (a: Mass, b: Mass): Mass => asMass(a.minus(b))
export const negated = (a: Mass): Mass => asMass(a.negated())
/** A mass times a dimensionless factor, rounded to what storage keeps. */
export const scaled = (a: Mass, factor: string | Exact): Mass =>
  asMass(a.times(factor).toDecimalPlaces(MASS_SCALE))
export const sumMass = (masses: Iterable<Mass>): Mass => {
  let total = ZERO_MASS
  for (const mass of masses) total = plus(total, mass)
  return total
}
export const lessThan = (a: Mass, b: Mass): boolean => a.lessThan(b)
export const equalMass = (a: Mass, b: Mass): boolean => a.equals(b)
export const isZero = (a: Mass): boolean => a.isZero()
export const isPositive = (a: Mass): boolean => a.greaterThan(0)
export const isNegative = (a: Mass): boolean => a.lessThan(0)
export const smaller = (a: Mass, b: Mass): Mass => (a.lessThan(b) ? a : b)
export const larger = (a: Mass, b: Mass): Mass => (a.lessThan(b) ? b : a)

/** The quotient of two masses, dimensionless. @throws RangeError if the divisor is zero */
export function ratio(a: Mass, b: Mass): Exact {
  if (b.isZero()) throw new RangeError('A mass cannot be divided by a mass of zero.')
  return a.dividedBy(b)
}

/** @returns [kg] plain decimal text without superfluous zeros, as stored and sent */
export const toKgText = (mass: Mass): string => mass.toFixed()

function parseDecimal(text: string): Exact {
  if (!/^-?\d{1,12}(\.\d+)?$/.test(text)) throw new RangeError(`"${text}" is not a decimal number.`)
  return new Exact(text)
}

function checkedScale(value: Exact): Exact {
  if (value.decimalPlaces() > MASS_SCALE) throw new RangeError(`A mass has at most ${MASS_SCALE} digits after the point in kilograms.`)
  return value
}
