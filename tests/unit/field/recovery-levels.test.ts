import { describe, expect, it } from 'vitest'
import { pressureClassOf, RECOVERY_LEVELS, RECOVERY_LEVELS_SOURCE, recoveryLevelFor } from '../../../shared/field/recovery-levels'
import { lb } from '../../../shared/mass/mass'
import { REFRIGERANTS } from '../../../shared/refrigerants/catalogue'

describe('pressure classes by the saturated liquid at 104 °F, 40 CFR 82.152, from memory', () => {
  it.each([
    // saturation pressure at 40 °C as the trade knows it, psi absolute
    ['R-123', 'low'], // 22
    ['R-11', 'low'], // 25
    ['R-245fa', 'low'], // 36
    ['R-114', 'medium'], // 49
    ['R-12', 'medium'], // 139
    ['R-134a', 'medium'], // 147
    ['R-22', 'high'], // 222
    ['R-404A', 'high'], // 265
    ['R-410A', 'high'], // 351
    ['R-13', 'very-high'], // above its critical point
    ['R-744', 'very-high'], // above its critical point
  ])('%s is of %s pressure', (refrigerant, expected) => {
    expect(pressureClassOf(refrigerant)).toBe(expected)
  })
  it('every refrigerant has one, an unknown one has none', () => {
    for (const { id } of REFRIGERANTS) expect([id, pressureClassOf(id) !== null]).toEqual([id, true])
    expect(pressureClassOf('R-999')).toBeNull()
  })
})

describe('levels of evacuation, 40 CFR 82.156(a) table 1, equipment made on or after 15 November 1993, from memory', () => {
  it.each([
    ['R-744', '10', { kind: 'vacuum', inHg: 0 }],
    ['R-22', '199.9999', { kind: 'vacuum', inHg: 0 }],
    ['R-22', '200', { kind: 'vacuum', inHg: 10 }],
    ['R-22', '200.0001', { kind: 'vacuum', inHg: 10 }],
    ['R-134a', '199.9999', { kind: 'vacuum', inHg: 10 }],
    ['R-134a', '200', { kind: 'vacuum', inHg: 15 }],
    ['R-123', '50', { kind: 'absolute', mmHg: 25 }],
    ['R-123', '900', { kind: 'absolute', mmHg: 25 }],
  ] as const)('%s with a full charge of %s lb: %j', (refrigerant, pounds, level) => {
    expect(recoveryLevelFor({ refrigerant, fullChargeKg: lb(pounds) })?.level).toEqual(level)
  })
  it('one row answers for each class and charge, and says where it is from', () => {
    expect(RECOVERY_LEVELS).toHaveLength(6)
    expect(RECOVERY_LEVELS_SOURCE).toEqual({ cite: '40 CFR 82.156(a), table 1', basis: 'memory' })
    expect(recoveryLevelFor({ refrigerant: 'R-999', fullChargeKg: lb('50') })).toBeNull()
  })
})
