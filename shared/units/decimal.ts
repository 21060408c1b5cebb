import { Decimal as DecimalJs } from 'decimal.js'

/**
 * The one decimal arithmetic of the house: 40 significant digits, which no sum or single
 * quotient of masses exhausts, and plain notation whenever it is written out.
 */
export const Exact = DecimalJs.clone({ precision: 40, rounding: DecimalJs.ROUND_HALF_EVEN, toExpNeg: -40, toExpPos: 40 })

/** An exact decimal; dimensionless unless its name says otherwise. */
export type Exact = DecimalJs
