import { describe, expect, it } from 'vitest'
import { kg, lb, oz, toKgText } from '../../shared/mass/mass'
import { toMetres } from '../../shared/units/length'
import { massIn } from '../../shared/units/mass-units'
import { absoluteFromVacuumInHg, absoluteKpa, barometerKpa, fromKpa, gaugeKpa, toKpa } from '../../shared/units/pressure'
import { toCelsius, toKelvin } from '../../shared/units/temperature'

describe('international yard and pound, 1959; exact by definition', () => {
  it('1 lb is 0.45359237 kg, and 16 oz are 1 lb', () => {
    expect(toKgText(lb('1'))).toBe('0.45359237')
    expect(toKgText(oz('16'))).toBe('0.45359237')
    expect(toKgText(oz('1'))).toBe('0.028349523125')
    expect(massIn(kg('0.45359237'), 'lb', 10)).toEqual({ unit: 'lb', value: '1.0000000000' })
  })
  it('1 ft is 0.3048 m, 1 in is 25.4 mm', () => {
    expect([toMetres(1, 'ft'), toMetres(1, 'in'), toMetres(5280, 'ft')]).toEqual([0.3048, 0.0254, 1609.344])
  })
})

describe('NIST Special Publication 811, appendix B; from memory, all digits that it prints', () => {
  it.each([
    ['1 psi', toKpa(1, 'psi'), 6.894757, 5e-7],
    ['1 inch of mercury, conventional', toKpa(1, 'inHg'), 3.386389, 5e-7],
    ['1 micrometre of mercury, Pa', toKpa(1, 'umHg') * 1000, 0.1333224, 5e-8],
    ['1 bar', toKpa(1, 'bar'), 100, 0],
  ])('%s', (_name, actual, expected, tolerance) => {
    expect(Math.abs(actual - expected)).toBeLessThanOrEqual(tolerance)
  })
  it('1 psi is 6.894757293168 kPa', () => {
    expect(toKpa(1, 'psi')).toBe(6.894757293168)
  })
  it('29.92 inHg is a standard atmosphere, 760 000 µmHg as well', () => {
    expect(toKpa(29.92, 'inHg')).toBeCloseTo(101.32, 2)
    expect(toKpa(760_000, 'umHg')).toBeCloseTo(101.325, 3)
  })
})

describe('fixed points of temperature, exact by definition', () => {
  it.each([['ice point', 32, 0], ['steam point', 212, 100], ['where both scales meet', -40, -40], ['77 °F', 77, 25]])('%s', (_name, fahrenheit, celsius) => {
    expect(toCelsius(fahrenheit, 'F')).toBeCloseTo(celsius, 9)
  })
  it('absolute zero is -459.67 °F and -273.15 °C', () => {
    expect([toKelvin(-459.67, 'F'), toKelvin(-273.15, 'C')]).toEqual([0, 0])
  })
})

describe('U.S. Standard Atmosphere, 1976, by geometric height; from memory', () => {
  it.each([
    // m, kPa, tolerance: the formula takes the height for geopotential, which grows apart with the height
    [0, 101.325, 0], [500, 95.46, 0.01], [1000, 89.88, 0.01], [2000, 79.5, 0.01], [3000, 70.12, 0.02], [5000, 54.05, 0.04],
  ])('%i m: %f kPa within %f', (metres, expected, tolerance) => {
    expect(Math.abs(barometerKpa(metres) - expected)).toBeLessThanOrEqual(tolerance)
  })
})

describe('gauge and absolute, worked by hand', () => {
  it('0 psig at sea level is 14.696 psia', () => {
    expect(fromKpa(absoluteKpa(0, barometerKpa(0)), 'psi')).toBeCloseTo(14.696, 3)
  })
  it('400 psig at 75 °F is 388.37 psig at 60 °F: 414.696 × 519.67 / 534.67 − 14.696', () => {
    const sealed = absoluteKpa(toKpa(400, 'psi'), 101.325)
    const cooled = gaugeKpa((sealed * toKelvin(60, 'F')) / toKelvin(75, 'F'), 101.325)
    expect(fromKpa(cooled, 'psi')).toBeCloseTo(388.37, 2)
  })
  it('10 inches of vacuum at sea level is 67.461 kPa absolute: 101.325 − 33.864', () => {
    expect(absoluteFromVacuumInHg(10, 101.325)).toBeCloseTo(67.461, 3)
  })
})
