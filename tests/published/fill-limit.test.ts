import { describe, expect, it } from 'vitest'
import { fillLimitOf } from '../../shared/field/fill-limit'
import { LB_KG, lb } from '../../shared/mass/mass'

describe('fill limit: 0.8 × WC × SG at 25 °C over water at 997.05 kg/m³; common practice, no published source', () => {
  // worked by hand with the density rounded to a tenth, hence 0.01 lb
  it.each([
    ['R-22', 45.48], // 0.8 × 47.6 × 1190.7 / 997.05
    ['R-410A', 40.44], // 0.8 × 47.6 × 1058.9 / 997.05
  ])('a cylinder with WC 47.6 lb may hold %s up to %d lb', (refrigerant, pounds) => {
    const limit = fillLimitOf(lb('47.6'), refrigerant)
    expect(Math.abs((limit?.dividedBy(LB_KG).toNumber() ?? 0) - pounds)).toBeLessThan(0.01)
  })

  it('is lower where the cylinder may grow hot, and unknown where the table ends', () => {
    const [cool, hot] = [fillLimitOf(lb('47.6'), 'R-22'), fillLimitOf(lb('47.6'), 'R-22', 60)]
    expect(hot?.lessThan(cool ?? 0)).toBe(true)
    expect(fillLimitOf(lb('47.6'), 'R-744', 60)).toBeNull()
  })
})
