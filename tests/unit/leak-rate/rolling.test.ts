import { describe, expect, it } from 'vitest'
import { rateAdditions } from '../../../shared/leak-rate/rated-additions'
import { added, aHistory, followUp, removed, rowOf } from './builders'

const last = (events: Parameters<typeof aHistory>[0], traits: Parameters<typeof aHistory>[1] = {}) =>
  rateAdditions(aHistory(events, { method: 'rolling', ...traits })).map(rowOf).at(-1)

describe('the window of the rolling method, 100 lb charge; worked by hand', () => {
  it('sums what was added over the previous 365 days', () => {
    expect(last([added('2025-09-01', '4'), added('2026-01-01', '5'), added('2026-04-01', '10')]))
      .toEqual({ counted: '10', added: '19', days: 365, rate: '19', exempt: null, basis: [] })
  })
  it.each([
    ['2025-04-01', '10'], // 365 days before 2026-04-01: outside
    ['2025-04-02', '15'], // 364 days before: inside
  ])('with an addition on %s before, the sum on 1 April 2026 is %s lb', (on, sum) => {
    expect(last([added(on, '5'), added('2026-04-01', '10')])).toMatchObject({ added: sum })
  })
  it('leaves out installation, season and what only came back', () => {
    expect(last([
      added('2025-06-01', '100', { purpose: 'installation' }), removed('2025-10-01', '20', { purpose: 'seasonal' }),
      added('2026-03-01', '22', { purpose: 'seasonal' }), removed('2026-03-31', '40'), added('2026-04-01', '50'),
    ])).toMatchObject({ counted: '10', added: '12', rate: '12' })
  })
})

describe('a follow-up test that showed all leaks repaired', () => {
  it('begins the sum anew', () => {
    expect(last([added('2026-01-01', '5'), followUp('2026-01-10'), added('2026-04-01', '10')]))
      .toEqual({ counted: '10', added: '10', days: 81, rate: '10', exempt: null, basis: ['since-follow-up'] }) // 21 + 28 + 31 + 1
  })
  it('on the day of the repair charge comes after it, when its hour says so or is not known', () => {
    expect(last([added('2026-01-10', '5'), followUp('2026-01-10', 16), added('2026-04-01', '10')])).toMatchObject({ added: '10' })
    expect(last([added('2026-01-10', '5'), followUp('2026-01-10', null), added('2026-04-01', '10')])).toMatchObject({ added: '10' })
  })
  it('in the morning leaves what was added in the afternoon in the sum', () => {
    expect(last([followUp('2026-01-10', 8), added('2026-01-10', '5'), added('2026-04-01', '10')])).toMatchObject({ added: '15' })
  })
  it('of more than a year ago does not lengthen the window', () => {
    expect(last([followUp('2024-01-10'), added('2024-02-01', '5'), added('2026-04-01', '10')])).toMatchObject({ added: '10', days: 365, basis: [] })
  })
  it('leaves the rate of the addition before it as it was', () => {
    const rates = rateAdditions(aHistory([added('2026-01-01', '5'), added('2026-01-05', '5'), followUp('2026-01-10')], { method: 'rolling' }))
    expect(rowOf(rates[1] ?? expect.fail())).toMatchObject({ added: '10', rate: '10' })
  })
  it('changes nothing in the annualizing method', () => {
    const events = [added('2026-01-01', '5', { leakId: 'coil' }), followUp('2026-01-10'), added('2026-04-01', '10', { leakId: 'coil' })]
    expect(last(events, { method: 'annualizing' })).toMatchObject({ added: '15', days: 365 })
  })
})
