import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { REFRIGERANTS } from '../../../shared/refrigerants/catalogue'
import { glideAt, saturationAt, tableRange, temperatureAt, type Looked } from '../../../shared/refrigerants/saturation'

const COLUMNS = ['bubbleKpa', 'dewKpa', 'liquidDensity', 'vapourDensity'] as const
const known = (looked: Looked): number => {
  if (!looked.ok) throw new Error(JSON.stringify(looked))
  return looked.value
}
/** Any refrigerant, at any temperature within its table. */
const aPoint = fc.record({ id: fc.constantFrom(...REFRIGERANTS.map(({ id }) => id)), share: fc.double({ min: 0, max: 1, noNaN: true }) }).map(({ id, share }) => {
  const { lowest, highest } = tableRange(id) ?? { lowest: 0, highest: 0 }
  return { id, celsius: Math.min(highest, lowest + share * (highest - lowest)) }
})

describe('laws of the saturation curve, for all refrigerants at any temperature of their tables', () => {
  it('reading backwards gives the temperature back, to a millionth of a kelvin', () => {
    fc.assert(fc.property(aPoint, fc.constantFrom(...COLUMNS), ({ id, celsius }, column) => {
      expect(Math.abs(known(temperatureAt(id, column, known(saturationAt(id, column, celsius)))) - celsius)).toBeLessThan(1e-6)
    }), { numRuns: 2000 })
  })
  it('warmer means a higher pressure and a lighter liquid', () => {
    fc.assert(fc.property(aPoint, fc.double({ min: 0.01, max: 5, noNaN: true }), ({ id, celsius }, warmer) => {
      fc.pre(celsius + warmer <= (tableRange(id)?.highest ?? 0))
      expect(known(saturationAt(id, 'bubbleKpa', celsius + warmer))).toBeGreaterThan(known(saturationAt(id, 'bubbleKpa', celsius)))
      expect(known(saturationAt(id, 'liquidDensity', celsius + warmer))).toBeLessThan(known(saturationAt(id, 'liquidDensity', celsius)))
    }), { numRuns: 2000 })
  })
  it('vapour is lighter than liquid, and a glide is never negative', () => {
    fc.assert(fc.property(aPoint, ({ id, celsius }) => {
      expect(known(saturationAt(id, 'vapourDensity', celsius))).toBeLessThan(known(saturationAt(id, 'liquidDensity', celsius)))
      const glide = glideAt(id, known(saturationAt(id, 'bubbleKpa', celsius)))
      expect(glide.ok ? glide.value >= 0 : glide.code).not.toBe(false)
    }), { numRuns: 1000 })
  })
})

describe('where a table ends', () => {
  it('its first and last temperature still answer, a hundredth beyond them does not', () => {
    for (const { id } of REFRIGERANTS) {
      const range = tableRange(id)
      if (!range) throw new Error(id)
      expect([id, saturationAt(id, 'dewKpa', range.lowest).ok, saturationAt(id, 'dewKpa', range.highest).ok]).toEqual([id, true, true])
      expect([id, saturationAt(id, 'dewKpa', range.lowest - 0.01).ok, saturationAt(id, 'dewKpa', range.highest + 0.01).ok]).toEqual([id, false, false])
    }
  })
  it('the answer names the range: carbon dioxide has none above 28 °C, close below its critical point of 31 °C', () => {
    const beyond = saturationAt('R-744', 'bubbleKpa', 35)
    expect(beyond).toMatchObject({ ok: false, code: 'outside-table' })
    if (!beyond.ok && beyond.code === 'outside-table') expect([Math.round(beyond.lowest), Math.round(beyond.highest)]).toEqual([-54, 28])
  })
  it('a pressure outside, none at all and an unknown refrigerant give no temperature', () => {
    for (const kPa of [0, -5, 1e6, Number.NaN, Number.POSITIVE_INFINITY]) expect(temperatureAt('R-22', 'bubbleKpa', kPa)).toMatchObject({ ok: false, code: 'outside-table' })
    expect(temperatureAt('R-999', 'dewKpa', 500)).toEqual({ ok: false, code: 'no-table' })
    expect(glideAt('R-999', 500)).toEqual({ ok: false, code: 'no-table' })
    expect(tableRange('R-999')).toBeNull()
  })
})
