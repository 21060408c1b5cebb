import { describe, expect, it } from 'vitest'
import { kg } from '../../shared/mass/mass'
import { isOzoneDepleting, massShares, refrigerantOf, REFRIGERANTS } from '../../shared/refrigerants/catalogue'
import { AR4, co2eTonnes, gwpOf } from '../../shared/refrigerants/gwp'

describe('GWP, AR4 100-year, single components: 40 CFR part 84 appendix A, from memory', () => {
  it.each([
    ['R-23', '14800'], ['R-32', '675'], ['R-125', '3500'], ['R-134a', '1430'], ['R-143a', '4470'], ['R-152a', '124'], ['R-227ea', '3220'],
    ['R-236fa', '9810'], ['R-245fa', '1030'], ['R-22', '1810'], ['R-123', '77'], ['R-11', '4750'], ['R-12', '10900'], ['R-13', '14400'],
    ['R-114', '10000'], ['R-124', '609'], ['R-744', '1'], ['R-290', '3'], ['R-600a', '3'], ['R-1270', '2'], ['R-717', '0'], ['R-1234yf', '4'],
  ])('%s has %s', (id, gwp) => {
    expect(gwpOf(id)?.toFixed()).toBe(gwp)
  })
})

describe('GWP of blends: mean by mass of the components, worked by hand', () => {
  it.each([
    ['R-410A', '2087.5'], // 0.5 × 675 + 0.5 × 3500
    ['R-404A', '3921.6'], // 0.44 × 3500 + 0.52 × 4470 + 0.04 × 1430
    ['R-407C', '1773.85'], // 0.23 × 675 + 0.25 × 3500 + 0.52 × 1430
    ['R-407A', '2107'], // 0.2 × 675 + 0.4 × 3500 + 0.4 × 1430
    ['R-407F', '1824.5'], // 0.3 × 675 + 0.3 × 3500 + 0.4 × 1430
    ['R-507A', '3985'], // 0.5 × 3500 + 0.5 × 4470
  ])('%s has %s', (id, gwp) => {
    expect(gwpOf(id)?.toFixed()).toBe(gwp)
  })
})

describe('GWP of blends with an HFO: published tables, which round and take different HFO values; within 2', () => {
  it.each([['R-448A', 1387], ['R-449A', 1397], ['R-454B', 466], ['R-452B', 698], ['R-513A', 631]])('%s has about %d', (id, gwp) => {
    expect(Math.abs((gwpOf(id)?.toNumber() ?? 0) - gwp)).toBeLessThanOrEqual(2)
  })
})

describe('the catalogue', () => {
  it('has 61 refrigerants, each with a GWP: none is silently zero', () => {
    expect(REFRIGERANTS).toHaveLength(61)
    for (const { id } of REFRIGERANTS) expect([id, gwpOf(id) === null]).toEqual([id, false])
    expect(REFRIGERANTS.filter(({ id }) => gwpOf(id)?.isZero()).map(({ id }) => id)).toEqual(['R-717'])
  })

  it('says null, not zero, where a set lacks a component', () => {
    expect(gwpOf('R-410A', { ...AR4, values: { 'R-32': '675' } })).toBeNull()
  })

  it('gives tonnes CO2e: 10 kg of R-410A are 20.875 t (10 × 2087.5 / 1000, worked by hand)', () => {
    expect(co2eTonnes(kg('10'), 'R-410A')?.toFixed()).toBe('20.875')
  })

  it.each([['R-22', true], ['R-123', true], ['R-502', true], ['R-500', true], ['R-408A', true], ['R-409A', true], ['R-410A', false], ['R-404A', false], ['R-744', false]])(
    '%s is ozone-depleting: %s (40 CFR part 82 subpart A appendices A and B, from memory)', (id, expected) => {
      expect(isOzoneDepleting(refrigerantOf(id))).toBe(expected)
    })

  it.each([['R-22', 'A1'], ['R-32', 'A2L'], ['R-454B', 'A2L'], ['R-290', 'A3'], ['R-717', 'B2L'], ['R-123', 'B1'], ['R-152a', 'A2'], ['R-410A', 'A1']])(
    '%s is of safety class %s (ASHRAE Standard 34, from memory)', (id, expected) => {
      expect(refrigerantOf(id).safetyClass).toBe(expected)
    })

  it('has blends whose shares sum to 100 %', () => {
    for (const { id, composition } of REFRIGERANTS) {
      const total = Object.values(composition).reduce((sum, share) => sum + Number(share), 0)
      expect([id, Math.round(total * 10) / 10]).toEqual([id, 100])
      expect(massShares(refrigerantOf(id)).length).toBe(Object.keys(composition).length)
    }
  })
})
