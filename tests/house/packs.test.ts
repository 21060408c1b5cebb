import { describe, expect, it } from 'vitest'
import { en } from '../../shared/language/en'
import { CATEGORIES } from '../../shared/rules/categories'
import type { Dated } from '../../shared/rules/dated'
import { PACKS } from '../../shared/rules/packs'
import type { RulePack } from '../../shared/rules/pack'

const valuesOf = (pack: RulePack): Dated<unknown>[] => [
  pack.scope.leastChargeKg, pack.threshold, pack.retention, ...pack.duties.map((duty) => duty.due),
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
        expect(index === 0 || (parameter.values[index - 1]?.from ?? '') < value.from).toBe(true)
      })
    }
  })

  it('has a threshold for every category', () => {
    for (const { value } of pack.threshold.values) expect(Object.keys(value).sort()).toEqual([...CATEGORIES].sort())
  })

  it('has words for its title and for every duty', () => {
    expect(Object.keys(en.rules.packs)).toContain(id)
    for (const duty of pack.duties) expect(Object.keys(en.rules.duties)).toContain(duty.code)
  })
})
