import { lb, lessThan, type Mass } from '../mass/mass'
import { saturationAt, tableRange } from '../refrigerants/saturation'
import type { Source } from '../rules/dated'
import { toKpa } from '../units/pressure'

export type PressureClass = 'very-high' | 'high' | 'medium' | 'low'

/** How far an appliance is evacuated before it is opened. */
export interface RecoveryLevel {
  pressure: PressureClass
  /** [kg] full charge from which the row holds, and the one from which the next row does; null: no limit */
  leastChargeKg: Mass | null
  belowChargeKg: Mass | null
  level: { kind: 'vacuum'; inHg: number } | { kind: 'absolute'; mmHg: number }
}

const LARGE_CHARGE = lb('200')

/** Recovery equipment and appliances made on or after 15 November 1993. */
export const RECOVERY_LEVELS_SOURCE: Source = { cite: '40 CFR 82.156(a), table 1', basis: 'memory' }

/** @see 40 CFR 82.156(a), table 1, equipment made on or after 15 November 1993; from memory */
export const RECOVERY_LEVELS: readonly RecoveryLevel[] = [
  { pressure: 'very-high', leastChargeKg: null, belowChargeKg: null, level: { kind: 'vacuum', inHg: 0 } },
  { pressure: 'high', leastChargeKg: null, belowChargeKg: LARGE_CHARGE, level: { kind: 'vacuum', inHg: 0 } },
  { pressure: 'high', leastChargeKg: LARGE_CHARGE, belowChargeKg: null, level: { kind: 'vacuum', inHg: 10 } },
  { pressure: 'medium', leastChargeKg: null, belowChargeKg: LARGE_CHARGE, level: { kind: 'vacuum', inHg: 10 } },
  { pressure: 'medium', leastChargeKg: LARGE_CHARGE, belowChargeKg: null, level: { kind: 'vacuum', inHg: 15 } },
  { pressure: 'low', leastChargeKg: null, belowChargeKg: null, level: { kind: 'absolute', mmHg: 25 } },
]

const CLASS_CELSIUS = 40 // [°C] 104 °F, at which the classes are told apart: 40 CFR 82.152
/** [psi absolute] liquid phase saturation pressure at that temperature, above which the class begins; 40 CFR 82.152, from memory */
const CLASS_FROM_PSIA = { 'very-high': 355, high: 170, medium: 45 } as const

/**
 * The pressure class of a refrigerant, by the pressure of its saturated liquid at 104 °F; one that has no liquid
 * at that temperature is of very high pressure.
 *
 * @returns null for a refrigerant without a table
 * @see 40 CFR 82.152, definitions of low-, medium-, high- and very high-pressure appliance; from memory
 */
export function pressureClassOf(refrigerant: string): PressureClass | null {
  const looked = saturationAt(refrigerant, 'bubbleKpa', CLASS_CELSIUS)
  if (!looked.ok) return isColderThan(refrigerant, CLASS_CELSIUS) ? 'very-high' : null
  if (looked.value > toKpa(CLASS_FROM_PSIA['very-high'], 'psi')) return 'very-high'
  if (looked.value > toKpa(CLASS_FROM_PSIA.high, 'psi')) return 'high'
  return looked.value > toKpa(CLASS_FROM_PSIA.medium, 'psi') ? 'medium' : 'low'
}

/** Every table that ends below 104 °F ends close to the critical point of its refrigerant. */
const isColderThan = (refrigerant: string, celsius: number): boolean => (tableRange(refrigerant)?.highest ?? Number.POSITIVE_INFINITY) < celsius

/**
 * The level to which an appliance is evacuated before it is opened. Whether the section is about its refrigerant
 * at all (it is not about carbon dioxide, for one) is not decided here.
 *
 * @param fullChargeKg  [kg] > 0
 * @returns null for a refrigerant without a table
 */
export function recoveryLevelFor({ refrigerant, fullChargeKg }: { refrigerant: string; fullChargeKg: Mass }): RecoveryLevel | null {
  const pressure = pressureClassOf(refrigerant)
  return RECOVERY_LEVELS.find((row) =>
    row.pressure === pressure && !(row.leastChargeKg && lessThan(fullChargeKg, row.leastChargeKg)) && !(row.belowChargeKg && !lessThan(fullChargeKg, row.belowChargeKg))) ?? null
}
