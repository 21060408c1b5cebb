/** Units in which a gauge is read; each is absolute or gauge by what it is measured against. */
export const PRESSURE_SCALES = ['kPa', 'bar', 'psi', 'inHg', 'umHg'] as const
export type PressureScale = (typeof PRESSURE_SCALES)[number]

const KPA_PER: Record<PressureScale, number> = {
  kPa: 1,
  bar: 100, // exact
  psi: 6.894757293168, // exact to the digits shown: 4.4482216152605 N on (0.0254 m)²
  inHg: 3.386388640341, // 25.4 mm of mercury at 133.322387415 Pa, exact by convention
  umHg: 0.000133322387415, // exact by convention
}

/** [kPa] standard atmosphere at sea level, exact by definition */
export const STANDARD_ATMOSPHERE_KPA = 101.325

/** @returns [kPa] the same pressure, absolute or gauge as it was given */
export const toKpa = (value: number, scale: PressureScale): number => value * KPA_PER[scale]
/** @param kpa  [kPa] @returns the same pressure in the scale, absolute or gauge as it was given */
export const fromKpa = (kpa: number, scale: PressureScale): number => kpa / KPA_PER[scale]

/**
 * The barometer at an elevation in the standard atmosphere; the weather moves it by a few per cent.
 *
 * @param elevationM  [m] above sea level, -500 to 11000, the troposphere
 * @returns [kPa] absolute
 * @throws RangeError outside that range
 * @see U.S. Standard Atmosphere, 1976: 101.325 (1 − 2.25577e-5 h)^5.25588
 */
export function barometerKpa(elevationM: number): number {
  if (!(elevationM >= -500 && elevationM <= 11_000)) throw new RangeError(`No standard atmosphere at ${elevationM} m.`)
  return STANDARD_ATMOSPHERE_KPA * (1 - 2.25577e-5 * elevationM) ** 5.25588
}

/**
 * Absolute pressure from a gauge reading; a vacuum is a negative gauge pressure.
 *
 * @param gaugeKpa  [kPa gauge]
 * @param barometer  [kPa absolute] at the site
 * @returns [kPa absolute] ≥ 0
 * @throws RangeError if it would be below a perfect vacuum
 */
export function absoluteKpa(gaugeKpa: number, barometer: number): number {
  const absolute = gaugeKpa + barometer
  // A reading of a perfect vacuum may miss zero by the rounding of its unit.
  if (!(absolute >= -0.01)) throw new RangeError(`${gaugeKpa} kPa gauge is below a perfect vacuum.`)
  return Math.max(0, absolute)
}

/** @param absolute  [kPa absolute] @param barometer  [kPa absolute] at the site @returns [kPa gauge], negative in a vacuum */
export const gaugeKpa = (absolute: number, barometer: number): number => absolute - barometer

/** Inches of mercury of vacuum, as recovery levels are written. @returns [inHg] below the barometer; 0 at it, negative above it */
export const vacuumInHg = (absolute: number, barometer: number): number => fromKpa(barometer - absolute, 'inHg')

/** Absolute pressure from inches of mercury of vacuum. @returns [kPa absolute] @throws RangeError as `absoluteKpa` does */
export const absoluteFromVacuumInHg = (vacuum: number, barometer: number): number =>
  absoluteKpa(-toKpa(vacuum, 'inHg'), barometer)
