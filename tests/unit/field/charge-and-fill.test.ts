import { describe, expect, it } from 'vitest'
import { estimateCharge } from '../../../shared/field/charge-estimate'
import { fillLimitOf } from '../../../shared/field/fill-limit'
import { kg, lb, LB_KG, scaled } from '../../../shared/mass/mass'

describe('fill limit by temperature', () => {
  it('47.6 lb of water capacity at 60 °C hold 39.2 lb of R-22 (1,026 kg/m³, ASHRAE Handbook, from memory, hence 0.5 %): 0.8 × 47.6 × 1026 / 997.05', () => {
    const pounds = fillLimitOf(lb('47.6'), 'R-22', 60)?.dividedBy(LB_KG).toNumber() ?? 0
    expect(Math.abs(pounds / 39.19 - 1)).toBeLessThan(0.005)
  })
  it('falls with every ten kelvins', () => {
    const limits = [-20, -10, 0, 10, 20, 30, 40, 50, 60].map((celsius) => fillLimitOf(kg('20'), 'R-134a', celsius)?.toNumber() ?? 0)
    expect(limits).toEqual([...limits].sort((a, b) => b - a))
    expect(new Set(limits).size).toBe(limits.length)
  })
  it('doubles with the water capacity, exactly', () => {
    const single = fillLimitOf(kg('10'), 'R-410A') ?? kg('0')
    expect(fillLimitOf(kg('20'), 'R-410A')?.minus(scaled(single, '2')).abs().lessThan('0.0000000000001')).toBe(true)
  })
  it('is unknown for a refrigerant without a table', () => {
    expect(fillLimitOf(kg('20'), 'R-999')).toBeNull()
  })
})

describe('charge estimate', () => {
  it('of nothing is nothing, of components alone their sum', () => {
    expect(estimateCharge('R-22', [], [])).toEqual({ ok: true, kg: 0, runsKg: [] })
    expect(estimateCharge('R-22', [], [2.5, 1.25])).toEqual({ ok: true, kg: 3.75, runsKg: [] })
  })
  it('a run of vapour holds a small share of the same run of liquid: R-134a at 25 °C, 32.4 against 1,206.7 kg/m³ (ASHRAE Handbook, from memory, hence 1 %)', () => {
    const run = { lengthM: 10, innerDiameterM: 0.02, celsius: 25 }
    const estimate = estimateCharge('R-134a', [{ ...run, holds: 'liquid' }, { ...run, holds: 'vapour' }], [])
    if (!estimate.ok) throw new Error(estimate.code)
    const volume = Math.PI * 0.01 ** 2 * 10 // [m³]
    expect(Math.abs((estimate.runsKg[0] ?? 0) / (volume * 1206.7) - 1)).toBeLessThan(0.01)
    expect(Math.abs((estimate.runsKg[1] ?? 0) / (volume * 32.4) - 1)).toBeLessThan(0.01)
  })
  it('refuses a length, a diameter or a mass below zero', () => {
    const run = { lengthM: 1, innerDiameterM: 0.01, holds: 'liquid', celsius: 25 } as const
    expect(() => estimateCharge('R-22', [{ ...run, lengthM: -1 }], [])).toThrow(RangeError)
    expect(() => estimateCharge('R-22', [{ ...run, innerDiameterM: Number.NaN }], [])).toThrow(RangeError)
    expect(() => estimateCharge('R-22', [run], [-0.1])).toThrow(RangeError)
  })
})
