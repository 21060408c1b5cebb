import { describe, expect, it } from 'vitest'
import document from '../../shared/refrigerants/data/saturation.json'
import { REFRIGERANTS } from '../../shared/refrigerants/catalogue'
import { saturationAt } from '../../shared/refrigerants/saturation'

const bubble = (id: string, celsius: number): number => {
  const looked = saturationAt(id, 'bubbleKpa', celsius)
  if (!looked.ok) throw new Error(looked.code)
  return looked.value
}

describe('saturation pressure [kPa absolute]: ASHRAE Handbook Fundamentals, refrigerant tables, saturated; from memory', () => {
  // 0.2 % where the handbook gives a figure; 1 % where the value is remembered as "about", or rounded to the kilopascal
  it.each([
    ['R-134a', 0, 292.8, 0.002], ['R-134a', 25, 665.4, 0.002], ['R-134a', 40, 1016.6, 0.002],
    ['R-22', 0, 498, 0.002], ['R-22', 25, 1043.9, 0.002], ['R-22', 40, 1533.6, 0.002],
    ['R-290', 0, 474.5, 0.002], ['R-744', 0, 3485, 0.002], ['R-744', 20, 5729, 0.002], ['R-717', 0, 429.4, 0.002], ['R-32', 0, 813.1, 0.002],
    ['R-410A', 25, 1657, 0.01], ['R-404A', 25, 1255, 0.01],
  ])('of %s at %d °C is %d', (id, celsius, kPa, tolerance) => {
    expect(Math.abs(bubble(id, celsius) / kPa - 1)).toBeLessThan(tolerance)
  })
})

describe('the tables', () => {
  it('stand for all 61 refrigerants and come back at their own rows', () => {
    for (const { id } of REFRIGERANTS) {
      const rows = (document.refrigerants as unknown as Record<string, { rows: number[][] }>)[id]?.rows ?? []
      expect([id, rows.length > 10]).toEqual([id, true])
      for (const [celsius = 0, kPa = 0] of rows) expect(Math.abs(bubble(id, celsius) / kPa - 1)).toBeLessThan(1e-9)
    }
  })

  it('hit a row that is left out to 0.05 % of pressure, with rows 4 K apart instead of 2 K', () => {
    // Every second row of R-134a is computed from its neighbours; the true step is half as wide, and the error far smaller.
    const rows = (document.refrigerants as unknown as Record<string, { rows: number[][] }>)['R-134a']?.rows ?? []
    for (let index = 3; index < rows.length - 3; index += 2) {
      const [left, here, right] = [rows[index - 1], rows[index], rows[index + 1]]
      const [before, after] = [rows[index - 3], rows[index + 3]]
      if (!left || !here || !right || !before || !after) continue
      expect(Math.abs(Math.exp(cubicThrough([before, left, right, after], here[0] ?? 0)) / (here[1] ?? 1) - 1)).toBeLessThan(0.0005)
    }
  })

  it('are never extrapolated: beyond their ends stands the range', () => {
    expect(saturationAt('R-134a', 'bubbleKpa', 150)).toMatchObject({ ok: false, code: 'outside-table' })
    expect(saturationAt('R-134a', 'bubbleKpa', Number.NaN)).toMatchObject({ ok: false })
    expect(saturationAt('R-999', 'bubbleKpa', 0)).toEqual({ ok: false, code: 'no-table' })
  })

  it('have dew below bubble, and the two alike for a pure fluid', () => {
    for (const { id, composition } of REFRIGERANTS) {
      const dew = saturationAt(id, 'dewKpa', 0)
      const at = saturationAt(id, 'bubbleKpa', 0)
      if (!dew.ok || !at.ok) continue
      expect(dew.value).toBeLessThanOrEqual(at.value * 1.0001)
      if (Object.keys(composition).length === 1) expect(Math.abs(dew.value / at.value - 1)).toBeLessThan(1e-4)
    }
  })
})

/** Lagrange's cubic of ln p over 1/T through four rows: another way than the reader's own. */
function cubicThrough(rows: number[][], celsius: number): number {
  const x = 1 / (celsius + 273.15)
  const points = rows.map(([t = 0, p = 1]) => [1 / (t + 273.15), Math.log(p)] as const)
  return points.reduce((sum, [xi, yi], i) => sum + yi * points.reduce((product, [xj], j) => (i === j ? product : product * (x - xj) / (xi - xj)), 1), 0)
}
