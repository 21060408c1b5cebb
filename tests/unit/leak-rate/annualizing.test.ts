import { describe, expect, it } from 'vitest'
import { plainDate } from '../../../shared/dates/plain-date'
import { rateAdditions } from '../../../shared/leak-rate/rated-additions'
import { lb } from '../../../shared/mass/mass'
import { added, aHistory, removed, rowOf } from './builders'

const rows = (...given: Parameters<typeof aHistory>) => rateAdditions(aHistory(...given)).map(rowOf)
const last = (...given: Parameters<typeof aHistory>) => rows(...given).at(-1)

describe('which days count, 100 lb charge; days and rates worked by hand', () => {
  it('from the last addition to this one', () => {
    // 2026-01-01 to 2026-04-01: 31 + 28 + 31 = 90 days; 10/100 × 365/90 = 40.5556 %
    expect(last([added('2026-01-01', '5'), added('2026-04-01', '10')]))
      .toEqual({ counted: '10', added: '10', days: 90, rate: '40.5556', exempt: null, basis: [] })
  })
  it('365 at most', () => {
    expect(last([added('2024-01-01', '5'), added('2026-04-01', '10')])).toMatchObject({ days: 365, rate: '10' })
  })
  it('over the leap day', () => {
    expect(last([added('2024-02-28', '5'), added('2024-03-01', '10')])).toMatchObject({ days: 2 })
  })
  it('from commissioning, where nothing was added before', () => {
    expect(last([added('2026-04-01', '10')], { commissionedOn: plainDate('2026-01-01') }))
      .toMatchObject({ days: 90, rate: '40.5556', basis: ['counted-from-commissioning'] })
  })
  it('365, where neither an earlier addition nor commissioning is known', () => {
    expect(last([added('2026-04-01', '10')])).toMatchObject({ days: 365, rate: '10', basis: ['no-earlier-addition-365'] })
  })
  it('365, where the commissioning date lies after the addition and so cannot be right', () => {
    expect(last([added('2026-04-01', '10')], { commissionedOn: plainDate('2026-05-01') })).toMatchObject({ days: 365 })
  })
  it('from the installation, since refrigerant was added on that day', () => {
    expect(rows([added('2026-01-01', '100', { purpose: 'installation' }), added('2026-04-01', '10')])).toEqual([
      { counted: '0', added: '0', days: null, rate: null, exempt: 'installation', basis: [] },
      { counted: '10', added: '10', days: 90, rate: '40.5556', exempt: null, basis: [] },
    ])
  })
})

describe('several additions for one leak', () => {
  it('are summed, and the days count from the last addition before that leak', () => {
    // last before: 2026-01-01; to 2026-02-20 are 50 days; 5/100 × 365/50 = 36.5 %
    const history = [added('2026-01-01', '9'), added('2026-02-01', '3', { leakId: 'coil' }), added('2026-02-20', '2', { leakId: 'coil' })]
    expect(rows(history).slice(1)).toEqual([
      { counted: '3', added: '3', days: 31, rate: '35.3226', exempt: null, basis: [] }, // 3/100 × 365/31
      { counted: '2', added: '5', days: 50, rate: '36.5', exempt: null, basis: ['same-leak-summed'] },
    ])
  })
  it('are summed though another leak was topped up in between', () => {
    const history = [added('2026-01-01', '9'), added('2026-02-01', '3', { leakId: 'coil' }), added('2026-02-10', '1', { leakId: 'valve' }),
      added('2026-02-20', '2', { leakId: 'coil' })]
    expect(rows(history).slice(2)).toMatchObject([{ added: '1', days: 9 }, { added: '5', days: 50 }])
  })
  it('an addition on the day of the last one belongs to the same leak, whatever leak is named', () => {
    const history = [added('2026-01-01', '9'), added('2026-02-20', '3', { leakId: 'coil' }), added('2026-02-20', '2', { leakId: 'valve', hour: 15 })]
    expect(last(history)).toEqual({ counted: '2', added: '5', days: 50, rate: '36.5', exempt: null, basis: ['same-day'] })
  })
  it('two leaks that met on one day are one from then on', () => {
    const history = [added('2026-01-01', '9'), added('2026-02-01', '1', { leakId: 'coil' }), added('2026-02-10', '1', { leakId: 'valve' }),
      added('2026-02-15', '1', { leakId: 'coil' }), added('2026-02-15', '1', { leakId: 'valve', hour: 15 }), added('2026-02-20', '1', { leakId: 'valve' })]
    expect(last(history)).toMatchObject({ added: '5', days: 50, basis: ['same-leak-summed'] })
  })
  it('two first additions on one day never divide by zero days', () => {
    expect(rows([added('2026-02-20', '3'), added('2026-02-20', '2', { hour: 15 })])).toMatchObject([
      { added: '3', days: 365, rate: '3' }, { added: '5', days: 365, rate: '5', basis: ['same-day', 'no-earlier-addition-365'] },
    ])
  })
  it('a later addition leaves the rate of an earlier one as it was', () => {
    const before = rows([added('2026-01-01', '9'), added('2026-02-01', '3', { leakId: 'coil' })])
    const after = rows([added('2026-01-01', '9'), added('2026-02-01', '3', { leakId: 'coil' }), added('2026-02-02', '2', { leakId: 'coil' })])
    expect(after.slice(0, 2)).toEqual(before)
  })
})

describe('installation and retrofit', () => {
  it('an addition on the day of commissioning belongs to the installation', () => {
    expect(last([added('2026-04-01', '10')], { commissionedOn: plainDate('2026-04-01') }))
      .toMatchObject({ rate: null, exempt: 'installation', basis: ['same-day'] })
  })
  it('a second addition on the day of a retrofit belongs to it, the day after no longer', () => {
    const retrofit = added('2026-04-01', '90', { purpose: 'retrofit' })
    expect(rows([retrofit, added('2026-04-01', '5', { hour: 15 }), added('2026-04-02', '1')])).toMatchObject([
      { exempt: 'retrofit' }, { exempt: 'retrofit', basis: ['same-day'] }, { exempt: null, days: 1, rate: '365' },
    ])
  })
  it('with a retrofit every leak begins anew', () => {
    const history = [added('2026-01-01', '3', { leakId: 'coil' }), added('2026-04-01', '90', { purpose: 'retrofit' }), added('2026-04-11', '2', { leakId: 'coil' })]
    expect(last(history)).toMatchObject({ added: '2', days: 10 })
  })
  it('gas recovered before a retrofit does not come back uncounted after it', () => {
    const history = [removed('2026-04-01', '40'), added('2026-04-02', '90', { purpose: 'retrofit' }), added('2026-05-02', '10')]
    expect(last(history)).toMatchObject({ counted: '10' })
  })
})

describe('seasonal variance', () => {
  const out = removed('2025-10-01', '20', { purpose: 'seasonal' })
  const back = (on: string, pounds: string) => added(on, pounds, { purpose: 'seasonal' })
  it('has no rate up to what was removed', () => {
    expect(last([out, back('2026-04-01', '20')])).toMatchObject({ counted: '0', rate: null, exempt: 'seasonal' })
  })
  it('counts what goes beyond', () => {
    expect(last([out, back('2026-04-01', '25')])).toEqual(
      { counted: '5', added: '5', days: 365, rate: '5', exempt: null, basis: ['no-earlier-addition-365', 'seasonal-excess'] })
  })
  it.each([['2026-10-01', '0'], ['2026-10-02', '20']])('within 12 months of the removal; on %s %s lb count', (on, counted) => {
    expect(last([out, back(on, '20')])).toMatchObject({ counted })
  })
  it('is used once', () => {
    expect(last([out, back('2026-04-01', '15'), back('2026-04-20', '15')])).toMatchObject({ counted: '10', days: 19 })
  })
  it('does not excuse an addition for a leak', () => {
    expect(last([out, added('2026-04-01', '20')])).toMatchObject({ counted: '20' })
  })
  it('without a removal everything counts', () => {
    expect(last([back('2026-04-01', '20')])).toMatchObject({ counted: '20', exempt: null, rate: '20' })
  })
})

describe('recovered gas put back', () => {
  it('recovered 40 lb of 60, put back 60: 20 lb were lost', () => {
    expect(last([removed('2026-04-01', '40'), added('2026-04-02', '60')], { fullLb: '60' })).toEqual(
      { counted: '20', added: '20', days: 365, rate: '33.3333', exempt: null, basis: ['no-earlier-addition-365', 'recovered-returned'] })
  })
  it('in two weighings, the second counts the shortfall', () => {
    expect(rows([removed('2026-04-01', '40'), added('2026-04-02', '40'), added('2026-04-02', '20', { hour: 15 })], { fullLb: '60' }))
      .toMatchObject([{ counted: '0', exempt: 'returned', rate: null }, { counted: '20', exempt: null, days: 365 }])
  })
  it('that only came back is no addition: the days to the next leak do not count from it', () => {
    const history = [added('2026-01-01', '5'), removed('2026-03-01', '40'), added('2026-03-02', '40'), added('2026-04-01', '10')]
    expect(last(history)).toMatchObject({ days: 90 })
  })
  it('of a retired charge is not put back', () => {
    expect(last([removed('2026-04-01', '40', { purpose: 'retirement' }), added('2026-04-02', '60')])).toMatchObject({ counted: '60' })
  })
  it('taken out after the addition excuses nothing', () => {
    expect(last([removed('2026-04-01', '40', { hour: 13 }), added('2026-04-01', '60')])).toMatchObject({ counted: '60' })
  })
})

describe('the full charge in force', () => {
  const revisions = [{ effectiveOn: plainDate('2026-01-01'), massKg: lb('100') }, { effectiveOn: plainDate('2026-06-01'), massKg: lb('50') }]
  it.each([['2026-05-31', '10'], ['2026-06-01', '20']])('on %s gives %s %%', (on, rate) => {
    expect(last([added(on, '10')], { fullCharges: revisions })).toMatchObject({ rate })
  })
  it('of two from one day the later recorded counts', () => {
    expect(last([added('2026-02-01', '10')], { fullCharges: [...revisions, { effectiveOn: plainDate('2026-01-01'), massKg: lb('40') }] }))
      .toMatchObject({ rate: '25' })
  })
  it('before the first there is no rate, and what was added still counts for its leak', () => {
    const history = [added('2025-12-31', '10', { leakId: 'coil' }), added('2026-01-31', '10', { leakId: 'coil' })]
    expect(rows(history, { fullCharges: revisions })).toMatchObject([{ rate: null, exempt: 'no-full-charge', added: '10' }, { added: '20', rate: '20' }])
  })
})
