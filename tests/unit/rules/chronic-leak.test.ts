import { describe, expect, it } from 'vitest'
import { plainDate } from '../../../shared/dates/plain-date'
import { lb } from '../../../shared/mass/mass'
import { chronicLeaks } from '../../../shared/rules/chronic-leak'
import { factsOf } from '../../../shared/rules/circuit-facts'
import { PACK_IDS, PACKS } from '../../../shared/rules/packs'

const facts = (refrigerant: string, pounds: string | null) =>
  factsOf({ packIds: PACK_IDS, refrigerant, category: 'commercial', fullChargeKg: pounds === null ? null : lb(pounds), subsectorDecision: null })
const leaks = (losses: [on: string, pounds: string][], refrigerant = 'R-22', pounds: string | null = '100') =>
  chronicLeaks({ circuit: facts(refrigerant, pounds), packs: PACKS, losses: losses.map(([on, lost]) => ({ on: plainDate(on), lostKg: lb(lost) })) })

describe('125 % of the full charge or more in a calendar year, 40 CFR 82.157(j) and 84.106(j), from memory; 100 lb, worked by hand', () => {
  it.each([['124.9999', 0], ['125', 1], ['125.0001', 1]])('%s lb lost in one year: %d reports', (pounds, count) => {
    expect(leaks([['2026-05-01', pounds]])).toHaveLength(count)
  })
  it('is summed over the year, reached on the day that fills it, reported by 1 March of the next', () => {
    const [leak, ...others] = leaks([['2026-11-30', '10'], ['2026-02-01', '80'], ['2026-09-15', '45']])
    expect(others).toEqual([])
    expect(leak).toMatchObject({ packId: 'us-ods', year: 2026, reachedOn: '2026-09-15' })
    expect(leak?.lostKg.equals(lb('135'))).toBe(true)
    expect(leak?.share.toFixed()).toBe('135')
    expect(leak?.duties.map(({ code, dueOn, source }) => [code, dueOn, source.basis])).toEqual([['chronic-leak-report', '2027-03-01', 'memory']])
  })
  it('goes by the calendar year, not by twelve months: 31 December and 1 January are two years', () => {
    expect(leaks([['2025-12-31', '100'], ['2026-01-01', '100']])).toEqual([])
    expect(leaks([['2026-01-01', '100'], ['2026-12-31', '25']])).toMatchObject([{ year: 2026, reachedOn: '2026-12-31' }])
    expect(leaks([['2025-01-01', '130'], ['2026-12-31', '130']]).map(({ year }) => year)).toEqual([2025, 2026])
  })
  it('counts exactly: five times a quarter of 60 lb is 125 %', () => {
    expect(leaks([['2026-01-05', '15'], ['2026-02-05', '15'], ['2026-03-05', '15'], ['2026-04-05', '15'], ['2026-05-05', '15']], 'R-22', '60')).toHaveLength(1)
  })
})

describe('for whom', () => {
  it('only a pack that applies asks for a report, from its first day on', () => {
    expect(leaks([['2026-05-01', '200']], 'R-404A').map(({ packId }) => packId)).toEqual(['us-hfc'])
    expect(leaks([['2025-12-31', '200']], 'R-404A')).toEqual([])
    expect(leaks([['2026-05-01', '200']], 'R-22', '49')).toEqual([])
    expect(leaks([['2026-05-01', '200']], 'R-744')).toEqual([])
  })
  it('without a full charge there is nothing to measure by', () => {
    expect(leaks([['2026-05-01', '200']], 'R-22', null)).toEqual([])
  })
  it('a loss below zero is a mistake', () => {
    expect(() => leaks([['2026-05-01', '-1']])).toThrow(RangeError)
  })
})
