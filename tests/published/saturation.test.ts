import { describe, expect, it } from 'vitest'
import document from '../../shared/refrigerants/data/saturation.json'
import { REFRIGERANTS } from '../../shared/refrigerants/catalogue'
import { curveThrough, readCurve, saturationAt } from '../../shared/refrigerants/saturation'

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
      const rows = rowsOf(id)
      expect([id, rows.length > 10]).toEqual([id, true])
      for (const [celsius = 0, kPa = 0] of rows) expect(Math.abs(bubble(id, celsius) / kPa - 1)).toBeLessThan(1e-9)
    }
  })

  it('hit what lies between the rows to 0.05 % of pressure, for all 61: even rows that are left out, with twice the step', () => {
    // The library's own values at the odd rows are the reference; only the even rows are given to the reader, 4 K apart.
    // The error of a cubic falls with the fourth power of the step, so between the true rows it is far smaller.
    const faults: string[] = []
    for (const { id } of REFRIGERANTS) {
      const rows = rowsOf(id)
      for (const column of [1, 2] as const) {
        const curve = curveThrough(rows.filter((_row, index) => index % 2 === 0).map((row) => [row[0] ?? 0, row[column] ?? 0] as const))
        // the outermost spans have no neighbour on one side, and in the whole table are half as wide
        for (let index = 3; index < rows.length - 4; index += 2) {
          const [celsius = 0, ...values] = rows[index] ?? []
          const step = (rows[index + 1]?.[0] ?? 0) - (rows[index - 1]?.[0] ?? 0)
          const error = Math.abs(readCurve(curve, celsius) / (values[column - 1] ?? 1) - 1)
          if (step === 4 && error > 0.0005) faults.push(`${id} at ${celsius} °C: ${(error * 100).toFixed(4)} %`)
        }
      }
    }
    expect(faults).toEqual([])
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

const rowsOf = (id: string): number[][] => (document.refrigerants as unknown as Record<string, { rows: number[][] }>)[id]?.rows ?? []
