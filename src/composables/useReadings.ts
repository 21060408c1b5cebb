import { computed, inject, ref } from 'vue'
import { useI18n } from 'vue-i18n'
import { absoluteKpa, barometerKpa, fromKpa, gaugeKpa, STANDARD_ATMOSPHERE_KPA, toKpa } from '../../shared/units/pressure'
import { differenceFromKelvin, differenceToKelvin, fromCelsius, toCelsius } from '../../shared/units/temperature'
import { fromMetres, toMetres } from '../../shared/units/length'
import { PREFERENCES } from './preferences'
import { useUnits } from './useUnits'

const ELEVATION_KEY = 'weighback.bench.elevation'

/** A number as a person types it, with a point or a comma; null where nothing readable stands. */
export function readNumber(text: string): number | null {
  const plain = text.trim().replace(',', '.').replace('−', '-')
  return /^-?\d{1,9}(\.\d{0,9})?$/.test(plain) ? Number(plain) : null
}

/** Pressures, temperatures and lengths on the bench, in the units of this person, against the barometer of the place. */
export function useReadings() {
  const { t } = useI18n()
  const { numberText } = useUnits()
  const preferences = inject(PREFERENCES, null)
  const pressure = computed(() => preferences?.value.pressureUnit ?? 'psig')
  const scale = computed(() => (pressure.value === 'psig' ? 'psi' as const : pressure.value))
  const temperature = computed(() => preferences?.value.temperatureUnit ?? 'F')
  const isMetric = computed(() => temperature.value === 'C')

  /** Elevation as typed, kept on this device; in feet or metres. */
  const elevation = ref(localStorage.getItem(ELEVATION_KEY) ?? '0')
  const keepElevation = (text: string): void => {
    elevation.value = text
    localStorage.setItem(ELEVATION_KEY, text)
  }
  /** [kPa absolute] */
  const barometer = computed(() => {
    const typed = readNumber(elevation.value)
    const metres = typed === null ? 0 : toMetres(typed, isMetric.value ? 'm' : 'ft')
    return metres >= -500 && metres <= 11_000 ? barometerKpa(metres) : STANDARD_ATMOSPHERE_KPA
  })

  const pressureUnit = (isAbsolute: boolean): string => (scale.value === 'psi' ? (isAbsolute ? 'psia' : 'psig') : `${scale.value} ${t(isAbsolute ? 'bench.absolute' : 'bench.gauge')}`)
  const temperatureUnit = computed(() => (temperature.value === 'F' ? '°F' : '°C'))
  const differenceUnit = computed(() => (temperature.value === 'F' ? '°F' : 'K'))
  const elevationUnit = computed(() => (isMetric.value ? 'm' : 'ft'))
  const lengthUnit = computed(() => (isMetric.value ? 'm' : 'ft'))
  const diameterUnit = computed(() => (isMetric.value ? 'mm' : 'in'))

  /** @returns [kPa absolute]; null where nothing readable stands, or below a perfect vacuum */
  function readPressure(text: string, isAbsolute: boolean): number | null {
    const value = readNumber(text)
    if (value === null) return null
    const kpa = toKpa(value, scale.value)
    const absolute = isAbsolute ? kpa : kpa + barometer.value
    return absolute > 0 ? (isAbsolute ? kpa : absoluteKpa(kpa, barometer.value)) : null
  }
  const showPressure = (absolute: number, isAbsolute: boolean): string =>
    `${numberText(fromKpa(isAbsolute ? absolute : gaugeKpa(absolute, barometer.value), scale.value), scale.value === 'bar' ? 3 : 1)} ${pressureUnit(isAbsolute)}`
  /** @returns [kPa] a difference, such as the resolution of a gauge */
  const readPressureDifference = (text: string): number | null => {
    const value = readNumber(text)
    return value === null || value < 0 ? null : toKpa(value, scale.value)
  }
  const showPressureDifference = (kpa: number): string => `${numberText(fromKpa(kpa, scale.value), scale.value === 'bar' ? 3 : 1)} ${scale.value}`
  /** @returns [°C] */
  const readTemperature = (text: string): number | null => {
    const value = readNumber(text)
    return value === null ? null : toCelsius(value, temperature.value)
  }
  const showTemperature = (celsius: number): string => `${numberText(fromCelsius(celsius, temperature.value), 1)} ${temperatureUnit.value}`
  /** @returns [K] */
  const readDifference = (text: string): number | null => {
    const value = readNumber(text)
    return value === null ? null : differenceToKelvin(value, temperature.value)
  }
  const showDifference = (kelvins: number): string => `${numberText(differenceFromKelvin(kelvins, temperature.value), 1)} ${differenceUnit.value}`
  /** @returns [m] */
  const readLength = (text: string): number | null => {
    const value = readNumber(text)
    return value === null || value < 0 ? null : toMetres(value, lengthUnit.value)
  }
  /** @returns [m] */
  const readDiameter = (text: string): number | null => {
    const value = readNumber(text)
    return value === null || value < 0 ? null : toMetres(value, diameterUnit.value)
  }
  const showElevation = (metres: number): string => numberText(fromMetres(metres, elevationUnit.value), 0)
  const showDensity = (kgPerCubicMetre: number): string =>
    isMetric.value ? `${numberText(kgPerCubicMetre, kgPerCubicMetre < 100 ? 2 : 1)} kg/m³` : `${numberText(kgPerCubicMetre / 16.018463, kgPerCubicMetre < 100 ? 3 : 2)} lb/ft³`

  return {
    barometer, elevation, keepElevation, elevationUnit, pressureUnit, temperatureUnit, differenceUnit, lengthUnit, diameterUnit, scale,
    readPressure, showPressure, readPressureDifference, showPressureDifference, readTemperature, showTemperature, readDifference, showDifference, readLength, readDiameter, showElevation, showDensity,
  }
}
