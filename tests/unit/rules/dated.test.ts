import { describe, expect, it } from 'vitest'
import { plainDate } from '../../../shared/dates/plain-date'
import { dated, valueOn, valueOnOrNone, type DatedValue } from '../../../shared/rules/dated'

const value = (from: string, number: number, until?: string): DatedValue<number> => ({
  from: plainDate(from), ...(until ? { until: plainDate(until) } : {}), value: number, source: { cite: 'invented', basis: 'ours' }, checkedOn: plainDate('2026-12-01'),
})
/** In force 2019 and 2020, then from 2022 on, raised in 2024. */
const parameter = dated({ name: 'invented figure', values: [value('2019-01-01', 1, '2020-12-31'), value('2022-01-01', 2), value('2024-07-01', 3)] })

describe('a value of the law over time', () => {
  it.each([
    ['2018-12-31', null], ['2019-01-01', 1], ['2020-12-31', 1], ['2021-01-01', null], ['2021-12-31', null], ['2022-01-01', 2],
    ['2024-06-30', 2], ['2024-07-01', 3], ['2099-01-01', 3],
  ])('on %s is %s', (on, expected) => {
    expect(valueOnOrNone(parameter, plainDate(on))?.value ?? null).toBe(expected)
  })
  it('asked for before its first day or in a gap, is an error with its name', () => {
    for (const on of ['2018-12-31', '2021-06-30']) expect(() => valueOn(parameter, plainDate(on))).toThrow(new RangeError(`invented figure is not in force on ${on}.`))
  })
  it.each([
    ['has no value', []],
    ['does not ascend', [value('2022-01-01', 1), value('2019-01-01', 2)]],
    ['has two on one day', [value('2022-01-01', 1), value('2022-01-01', 2)]],
    ['overlaps', [value('2019-01-01', 1, '2022-01-01'), value('2022-01-01', 2)]],
    ['ends before it begins', [value('2019-01-01', 1, '2018-12-31')]],
  ])('is refused when it %s', (_what, values) => {
    expect(() => dated({ name: 'invented figure', values })).toThrow(RangeError)
  })
})
