import { describe, expect, it } from 'vitest'
import { estimateCharge } from '../../shared/field/charge-estimate'
import { expectedAbsoluteKpa, judgeStandingTest } from '../../shared/field/standing-test'
import { againstBand, subcooling, superheat } from '../../shared/field/superheat'
import { judgeVacuumDecay } from '../../shared/field/vacuum-decay'
import { glideAt, saturationAt, temperatureAt } from '../../shared/refrigerants/saturation'
import { fromKpa, toKpa } from '../../shared/units/pressure'
import { toCelsius } from '../../shared/units/temperature'

const ATMOSPHERE_PSI = 14.696
const psig = (value: number): number => toKpa(value + ATMOSPHERE_PSI, 'psi')
const known = (looked: { ok: boolean; value?: number }): number => {
  if (!looked.ok || looked.value === undefined) throw new Error(JSON.stringify(looked))
  return looked.value
}

describe('standing pressure, p2 = p1 × T2 / T1, worked by hand', () => {
  const start = { absoluteKpa: psig(400), celsius: toCelsius(75, 'F') }

  it('400 psig at 75 °F is 388.4 psig at 60 °F: 414.696 × 519.67 / 534.67 − 14.696', () => {
    expect(fromKpa(expectedAbsoluteKpa(start, toCelsius(60, 'F')), 'psi') - ATMOSPHERE_PSI).toBeCloseTo(388.37, 1)
  })

  it.each([
    [388.4, 'holds'], [387.5, 'holds'], [385, 'falls'], [392, 'rises'],
  ])('%d psig at 60 °F, read on a gauge of 1 psi, %s', (reading, verdict) => {
    expect(judgeStandingTest(start, { absoluteKpa: psig(reading), celsius: toCelsius(60, 'F') }, toKpa(1, 'psi')).verdict).toBe(verdict)
  })
})

describe('vacuum decay: below 500 µm, under 1,000 µm after 10 min and levelling; common practice, no published source', () => {
  const watch = (...microns: number[]) => microns.map((value, index) => ({ minutes: index * 10 / (microns.length - 1), microns: value }))
  it.each([
    ['levels under 1,000 µm', watch(350, 600, 700), 'passes'],
    ['levels above 1,000 µm', watch(400, 1500, 1700), 'moisture'],
    ['rises straight on', watch(400, 1500, 2600), 'leak'],
    ['rises straight, still under 1,000 µm', watch(300, 550, 800), 'leak'],
    ['was not pulled deep enough', watch(900, 950, 960), 'not-deep-enough'],
  ])('a circuit that %s', (_what, readings, verdict) => {
    expect(judgeVacuumDecay(readings)).toBe(verdict)
  })
  it('needs ten minutes, or what the equipment maker says, which goes first', () => {
    const readings = [{ minutes: 0, microns: 300 }, { minutes: 2, microns: 340 }, { minutes: 5, microns: 350 }]
    expect(judgeVacuumDecay(readings)).toBe('too-short')
    expect(judgeVacuumDecay(readings, { watchMinutes: 5 })).toBe('passes')
    expect(judgeVacuumDecay(readings, { watchMinutes: 5, passBelow: 320 })).toBe('moisture')
  })
  it('refuses readings out of order', () => {
    expect(() => judgeVacuumDecay([{ minutes: 1, microns: 300 }, { minutes: 1, microns: 310 }])).toThrow(RangeError)
  })
})

describe('superheat by dew, subcooling by bubble', () => {
  it('R-134a at 292.8 kPa boils at 0 °C (ASHRAE Handbook Fundamentals, from memory): a line of 6 °C has 6 K of superheat', () => {
    expect(Math.abs(known(superheat('R-134a', 292.8, 6)) - 6)).toBeLessThan(0.05)
    expect(Math.abs(known(subcooling('R-134a', 1016.6, 35)) - 5)).toBeLessThan(0.05)
  })
  it('is judged by the maker’s band alone', () => {
    expect([2, 4, 8, 9].map((kelvins) => againstBand(kelvins, { lowest: 4, highest: 8 }))).toEqual(['below', 'within', 'within', 'above'])
  })
})

describe('the table read backwards', () => {
  it.each(['R-134a', 'R-410A', 'R-407C', 'R-744', 'R-717'])('gives back the temperature of %s', (id) => {
    for (const celsius of [-35, -10.5, 0.1, 12.34, 25])
      for (const column of ['bubbleKpa', 'dewKpa', 'liquidDensity'] as const)
        expect(known(temperatureAt(id, column, known(saturationAt(id, column, celsius))))).toBeCloseTo(celsius, 4)
  })
  it('has a glide of 4 to 7 K for R-407C and next to none for R-410A (common knowledge of the trade, from memory)', () => {
    expect(known(glideAt('R-407C', 600))).toBeGreaterThan(4)
    expect(known(glideAt('R-407C', 600))).toBeLessThan(7)
    expect(known(glideAt('R-410A', 900))).toBeLessThan(0.3)
    expect(known(glideAt('R-134a', 600))).toBeLessThan(0.01)
  })
  it('says the range of pressures where it ends', () => {
    expect(temperatureAt('R-134a', 'bubbleKpa', 99_999)).toMatchObject({ ok: false, code: 'outside-table' })
  })
})

describe('charge estimate, worked by hand', () => {
  it('30 m of liquid line of 12 mm inside with R-22 at 25 °C: π × 0.006² × 30 × 1190.7 = 4.040 kg', () => {
    const estimate = estimateCharge('R-22', [{ lengthM: 30, innerDiameterM: 0.012, holds: 'liquid', celsius: 25 }], [1.5])
    if (!estimate.ok) throw new Error(estimate.code)
    expect(estimate.runsKg[0]).toBeCloseTo(4.04, 2)
    expect(estimate.kg).toBeCloseTo(5.54, 2)
  })
  it('names the run whose temperature the table does not reach', () => {
    expect(estimateCharge('R-744', [{ lengthM: 1, innerDiameterM: 0.01, holds: 'liquid', celsius: 60 }], [])).toEqual({ ok: false, code: 'outside-table', run: 0 })
  })
})
