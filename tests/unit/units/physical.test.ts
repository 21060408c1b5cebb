import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fromMetres, LENGTH_UNITS, toMetres } from '../../../shared/units/length'
import {
  absoluteFromVacuumInHg, absoluteKpa, barometerKpa, fromKpa, gaugeKpa, PRESSURE_SCALES, toKpa, vacuumInHg,
} from '../../../shared/units/pressure'
import { differenceFromKelvin, differenceToKelvin, fromCelsius, TEMPERATURE_SCALES, toCelsius, toKelvin } from '../../../shared/units/temperature'

describe('there and back', () => {
  const value = fc.double({ min: -200, max: 5000, noNaN: true })
  it('every pressure scale', () => {
    fc.assert(fc.property(value, fc.constantFrom(...PRESSURE_SCALES), (number, scale) => {
      expect(fromKpa(toKpa(number, scale), scale)).toBeCloseTo(number, 9)
    }))
  })
  it('every temperature scale', () => {
    fc.assert(fc.property(fc.double({ min: 0, max: 5000, noNaN: true }), fc.constantFrom(...TEMPERATURE_SCALES), (number, scale) => {
      expect(fromCelsius(toCelsius(number, scale), scale)).toBeCloseTo(number, 9)
    }))
  })
  it('every length', () => {
    fc.assert(fc.property(value, fc.constantFrom(...LENGTH_UNITS), (number, unit) => {
      expect(fromMetres(toMetres(number, unit), unit)).toBeCloseTo(number, 9)
    }))
  })
  it('gauge and absolute', () => {
    fc.assert(fc.property(fc.double({ min: -60, max: 5000, noNaN: true }), fc.double({ min: 60, max: 105, noNaN: true }), (gauge, barometer) => {
      expect(gaugeKpa(absoluteKpa(gauge, barometer), barometer)).toBeCloseTo(gauge, 9)
    }))
  })
})

describe('what no gauge can show is refused', () => {
  it('below a perfect vacuum', () => {
    expect(() => absoluteKpa(-102, 101.325)).toThrow(RangeError)
    expect(() => absoluteFromVacuumInHg(31, 101.325)).toThrow(RangeError)
  })
  it('a perfect vacuum that misses zero by rounding is zero', () => {
    expect(absoluteKpa(toKpa(-14.696, 'psi'), 101.325)).toBe(0)
  })
  it('below absolute zero', () => {
    expect(() => toKelvin(-460, 'F')).toThrow(RangeError)
    expect(() => toCelsius(-274, 'C')).toThrow(RangeError)
    expect(() => fromCelsius(-274, 'F')).toThrow(RangeError)
  })
  it('an elevation outside the troposphere, or none', () => {
    for (const elevation of [-501, 11_001, Number.NaN]) expect(() => barometerKpa(elevation)).toThrow(RangeError)
  })
  it('the barometer falls with the elevation', () => {
    fc.assert(fc.property(fc.integer({ min: -500, max: 10_999 }), (metres) => {
      expect(barometerKpa(metres + 1)).toBeLessThan(barometerKpa(metres))
    }))
  })
})

describe('differences have no zero point', () => {
  it('a superheat of 18 °F is 10 K', () => {
    expect([differenceToKelvin(18, 'F'), differenceFromKelvin(10, 'F'), differenceToKelvin(10, 'C')]).toEqual([10, 18, 10])
  })
  it('vacuum reads zero at the barometer', () => {
    expect(vacuumInHg(101.325, 101.325)).toBe(0)
  })
})
