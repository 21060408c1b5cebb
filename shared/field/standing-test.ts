import { toKelvin } from '../units/temperature'

/** One reading of a standing pressure test. */
export interface StandingReading {
  /** [kPa absolute] */
  absoluteKpa: number
  /** [°C] of the gas in the circuit, or of the air around it once both have settled */
  celsius: number
}

/**
 * The pressure that a tight circuit full of nitrogen has after a change of temperature: p2 = p1 × T2 / T1.
 *
 * @returns [kPa absolute]
 * @throws RangeError below absolute zero
 * @see the ideal gas law at constant volume
 */
export const expectedAbsoluteKpa = (start: StandingReading, endCelsius: number): number =>
  start.absoluteKpa * toKelvin(endCelsius, 'C') / toKelvin(start.celsius, 'C')

export interface StandingVerdict {
  /** [kPa absolute] what the temperature alone would give */
  expectedKpa: number
  /** [kPa] reading minus expectation; below zero something is missing */
  differenceKpa: number
  verdict: 'holds' | 'falls' | 'rises'
}

/**
 * Whether a standing pressure test holds: a fall beyond the correction for temperature and the resolution of
 * the gauge is a leak. A rise beyond them means that a reading or a temperature is off.
 *
 * @param resolutionKpa  [kPa] of the gauge; ≥ 0
 * @see common practice, no published source for the use of the gauge's resolution as tolerance; the equipment maker's procedure goes first
 */
export function judgeStandingTest(start: StandingReading, end: StandingReading, resolutionKpa: number): StandingVerdict {
  const expectedKpa = expectedAbsoluteKpa(start, end.celsius)
  const differenceKpa = end.absoluteKpa - expectedKpa
  const verdict = differenceKpa < -resolutionKpa ? 'falls' : differenceKpa > resolutionKpa ? 'rises' : 'holds'
  return { expectedKpa, differenceKpa, verdict }
}
