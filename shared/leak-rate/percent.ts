import { Exact } from '../units/decimal'

/** An exact percentage [% of full charge per 12 months, where it is a leak rate]. Opaque as `Mass` is. */
export type Percent = Exact & { readonly unit: '%' }

/** @param text  [%] decimal text such as "10" @throws RangeError if it is not a decimal number */
export function percent(text: string): Percent {
  if (!/^-?\d{1,12}(\.\d+)?$/.test(text)) throw new RangeError(`"${text}" is not a decimal number.`)
  return new Exact(text) as Percent
}

/** A dimensionless ratio as a percentage: 0.25 becomes 25 %. */
export const percentOfRatio = (value: Exact): Percent => value.times(100) as Percent
/**
 * A quotient as a percentage, divided once, so that exactly 10 % comes out as exactly 10.
 *
 * @throws RangeError if the divisor is zero
 */
export function percentOfQuotient(dividend: Exact, divisor: Exact): Percent {
  if (divisor.isZero()) throw new RangeError('A percentage of zero has no meaning.')
  return dividend.times(100).dividedBy(divisor) as Percent
}
/** "Above", not "at": the reading of every threshold in the packs. */
export const isAbove = (a: Percent, threshold: Percent): boolean => a.greaterThan(threshold)
/** @returns [%] decimal text rounded half to even at the given digits, for display and checks only */
export const toPercentText = (value: Percent, digits: number): string => value.toFixed(digits)
/** @returns the rate in ten-thousandths of a per cent, rounded down, for integer sort keys */
export const toTenThousandths = (value: Percent): number => value.times(10_000).floor().toNumber()
