import { describe, expect, it } from 'vitest'
import { en } from '../../shared/language/en'
import { CATEGORIES } from '../../shared/rules/categories'
import { valueOnOrNone, type Dated } from '../../shared/rules/dated'
import { REASON_CODES } from '../../shared/rules/engine'
import { PACKS } from '../../shared/rules/packs'
import type { RulePack } from '../../shared/rules/pack'

const valuesOf = (pack: RulePack): Dated<unknown>[] => [
  pack.scope.leastChargeKg, pack.threshold, pack.chronicLoss, pack.retention, ...pack.duties.map((duty) => duty.due),
  ...(pack.scope.refrigerants.kind === 'hfc-or-substitute' ? [pack.scope.refrigerants.gwpAbove] : []),
]

describe.each(PACKS.map((pack) => [pack.id, pack] as const))('the pack %s', (id, pack) => {
  it('has a source, its basis and the day it was checked on every value, in ascending order', () => {
    for (const parameter of valuesOf(pack)) {
      expect(parameter.values.length).toBeGreaterThan(0)
      parameter.values.forEach((value, index) => {
        expect(value.source.cite).toMatch(/\d+ (CFR|CCR)|Regulation/)
        expect(['read', 'memory', 'ours']).toContain(value.source.basis)
        expect(value.checkedOn >= '2026-01-01').toBe(true)
        expect(value.checkedOn >= value.from).toBe(true)
        expect(index === 0 || (parameter.values[index - 1]?.from ?? '') < value.from).toBe(true)
      })
    }
  })

  it('has every value from its first day on, so that no day of it is without an answer', () => {
    const [first] = pack.scope.leastChargeKg.values
    if (!first) throw new Error(id)
    for (const parameter of valuesOf(pack)) expect([parameter.name, valueOnOrNone(parameter, first.from) !== null]).toEqual([parameter.name, true])
  })

  it('has a threshold for every category', () => {
    for (const { value } of pack.threshold.values) expect(Object.keys(value).sort()).toEqual([...CATEGORIES].sort())
  })

  it('has words for its title, its values and every duty', () => {
    expect(Object.keys(en.rules.packs)).toContain(id)
    expect(Object.keys(en.rules.values)).toEqual(expect.arrayContaining(['threshold', 'leastCharge', 'chronicLoss', 'retention', 'gwpAbove']))
    for (const duty of pack.duties) expect(Object.keys(en.rules.duties)).toContain(duty.code)
  })
})

describe('the words of the rules', () => {
  it('say every reason, and name and define every category', () => {
    expect(Object.keys(en.rules.reasons).sort()).toEqual([...REASON_CODES].sort())
    expect(Object.keys(en.rules.categories).sort()).toEqual([...CATEGORIES].sort())
    expect(Object.keys(en.rules.definitions).sort()).toEqual([...CATEGORIES].sort())
  })
  it('say who decides', () => {
    expect(en.rules.caution).toContain('Local regulation and licensed practice decide')
  })
})
