export const TEMPERATURE_SCALES = ['C', 'F', 'K'] as const
export type TemperatureScale = (typeof TEMPERATURE_SCALES)[number]

const ZERO_CELSIUS_K = 273.15 // exact
const ZERO_FAHRENHEIT_R = 459.67 // exact
const FAHRENHEIT_PER_KELVIN = 1.8 // exact

/** @returns [°C] @throws RangeError below absolute zero */
export function toCelsius(value: number, scale: TemperatureScale): number {
  return toKelvin(value, scale) - ZERO_CELSIUS_K
}

/** @param celsius  [°C] @throws RangeError below absolute zero */
export function fromCelsius(celsius: number, scale: TemperatureScale): number {
  toKelvin(celsius, 'C')
  if (scale === 'C') return celsius
  return scale === 'K' ? celsius + ZERO_CELSIUS_K : celsius * FAHRENHEIT_PER_KELVIN + 32
}

/** Thermodynamic temperature, for gas laws. @returns [K] ≥ 0 @throws RangeError below absolute zero */
export function toKelvin(value: number, scale: TemperatureScale): number {
  const kelvin = scale === 'K' ? value : scale === 'C' ? value + ZERO_CELSIUS_K : (value + ZERO_FAHRENHEIT_R) / FAHRENHEIT_PER_KELVIN
  if (!(kelvin >= 0)) throw new RangeError(`${value} °${scale} is below absolute zero.`)
  return kelvin
}

/** A difference such as superheat. @returns [K] */
export const differenceToKelvin = (difference: number, scale: TemperatureScale): number =>
  scale === 'F' ? difference / FAHRENHEIT_PER_KELVIN : difference

/** A difference such as superheat. @param kelvins  [K] @returns in degrees of the scale */
export const differenceFromKelvin = (kelvins: number, scale: TemperatureScale): number =>
  scale === 'F' ? kelvins * FAHRENHEIT_PER_KELVIN : kelvins
