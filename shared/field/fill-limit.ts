import { scaled, type Mass } from '../mass/mass'
import { saturationAt } from '../refrigerants/saturation'
import { Exact } from '../units/decimal'

const WATER_DENSITY_25C = '997.05' // [kg/m³] of water at 25 °C
const LIQUID_SHARE = '0.8' // of the volume that liquid may fill
const REFERENCE_CELSIUS = 25 // [°C], 77 °F

/**
 * The greatest net mass that a cylinder may hold: 80 % of its water capacity times the specific gravity of
 * the saturated liquid at the reference temperature.
 *
 * @param waterCapacityKg  [kg of water] stamped WC
 * @param celsius  [°C] 25 where not given; the highest temperature it may reach for a stricter limit
 * @returns [kg]; null where the table does not reach that temperature
 * @see AHRI Guideline K, its idea; common practice, no published source for the figure of 80 %
 */
export function fillLimitOf(waterCapacityKg: Mass, refrigerant: string, celsius = REFERENCE_CELSIUS): Mass | null {
  const density = saturationAt(refrigerant, 'liquidDensity', celsius)
  if (!density.ok) return null
  const specificGravity = new Exact(density.value.toPrecision(12)).dividedBy(WATER_DENSITY_25C)
  return scaled(waterCapacityKg, specificGravity.times(LIQUID_SHARE))
}
