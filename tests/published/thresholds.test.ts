import { describe, expect, it } from 'vitest'
import { plainDate } from '../../shared/dates/plain-date'
import { percent } from '../../shared/leak-rate/percent'
import { lb } from '../../shared/mass/mass'
import type { Category } from '../../shared/rules/categories'
import { factsOf } from '../../shared/rules/circuit-facts'
import { dutiesOfAddition, dutiesStarted, lowestThreshold, packsFor, thresholdsFor, type CircuitFacts } from '../../shared/rules/engine'
import { PACK_IDS, PACKS } from '../../shared/rules/packs'

const ON = plainDate('2026-03-03')
const circuit = (given: { refrigerant?: string; pounds?: string | null; category?: Category; decision?: CircuitFacts['subsectorDecision']; packs?: readonly string[] } = {}): CircuitFacts =>
  factsOf({
    packIds: given.packs ?? PACK_IDS, refrigerant: given.refrigerant ?? 'R-22', category: given.category ?? 'commercial',
    fullChargeKg: given.pounds === null ? null : lb(given.pounds ?? '100'), subsectorDecision: given.decision ?? null,
  })
const applies = (facts: CircuitFacts, on = ON) => Object.fromEntries(packsFor(facts, PACKS, on).map((decision) => [decision.packId, decision.applies]))
const reasons = (facts: CircuitFacts, packId: string, on = ON) => packsFor(facts, PACKS, on).find((decision) => decision.packId === packId)?.reasons.map(({ code }) => code)

describe('thresholds, 40 CFR 82.157(c)(2), read; 40 CFR 84.106(c)(2), from memory', () => {
  it.each([
    ['industrial-process', '30'], ['commercial', '20'], ['comfort-cooling', '10'], ['other', '10'],
  ] as const)('%s: %s %%', (category, expected) => {
    for (const refrigerant of ['R-22', 'R-404A']) {
      const thresholds = thresholdsFor(circuit({ category, refrigerant, decision: 'not-excepted' }), PACKS, ON)
      expect(thresholds.map(({ threshold }) => threshold.toFixed())).toEqual([expected])
    }
  })

  it.each([
    ['industrial-process', '29.9999', false], ['industrial-process', '30', false], ['industrial-process', '30.0001', true],
    ['commercial', '19.9999', false], ['commercial', '20', false], ['commercial', '20.0001', true],
    ['comfort-cooling', '9.9999', false], ['comfort-cooling', '10', false], ['comfort-cooling', '10.0001', true],
    ['other', '9.9999', false], ['other', '10', false], ['other', '10.0001', true],
  ] as const)('%s at %s %%: duties start: %s', (category, rate, starts) => {
    for (const refrigerant of ['R-22', 'R-404A']) {
      const duties = dutiesOfAddition({ circuit: circuit({ category, refrigerant, decision: 'not-excepted' }), packs: PACKS, rate: percent(rate), on: ON })
      expect(duties.length > 0).toBe(starts)
    }
  })

  it('an addition without a rate starts nothing', () => {
    expect(dutiesOfAddition({ circuit: circuit(), packs: PACKS, rate: null, on: ON })).toEqual([])
  })

  it('the lowest of several decides, and none of none', () => {
    const both = thresholdsFor(circuit({ refrigerant: 'R-408A' }), PACKS, ON)
    expect(both.map(({ packId }) => packId)).toEqual(['us-ods', 'us-hfc'])
    const [first] = both
    if (!first) throw new Error('no threshold')
    expect(lowestThreshold([first, { ...first, packId: 'stricter', threshold: percent('5') }])?.packId).toBe('stricter')
    expect(lowestThreshold([])).toBeNull()
  })
})

describe('to which appliances the packs apply', () => {
  it('ozone-depleting, 50 lb or more: 40 CFR 82.157(a), read', () => {
    expect(applies(circuit({ pounds: '49.9999' }))['us-ods']).toBe('no')
    expect(applies(circuit({ pounds: '50' }))['us-ods']).toBe('yes')
    expect(applies(circuit({ pounds: '500', refrigerant: 'R-404A' }))['us-ods']).toBe('no')
    expect(applies(circuit({ refrigerant: 'R-408A' }))['us-ods']).toBe('yes') // a blend with R-22
    expect(reasons(circuit({ pounds: '49' }), 'us-ods')).toEqual(['charge-below'])
  })

  it('from 1 January 2019 and 1 January 2026 on', () => {
    expect(applies(circuit(), plainDate('2018-12-31'))['us-ods']).toBe('no')
    expect(applies(circuit(), plainDate('2019-01-01'))['us-ods']).toBe('yes')
    const hfc = circuit({ refrigerant: 'R-404A' })
    expect(reasons(hfc, 'us-hfc', plainDate('2025-12-31'))).toEqual(['not-in-force'])
    expect(applies(hfc, plainDate('2026-01-01'))['us-hfc']).toBe('yes')
  })

  it('HFC or substitute above GWP 53, 15 lb or more: 40 CFR 84.106(a), from memory', () => {
    expect(applies(circuit({ refrigerant: 'R-404A', pounds: '14.9999' }))['us-hfc']).toBe('no')
    expect(applies(circuit({ refrigerant: 'R-404A', pounds: '15' }))['us-hfc']).toBe('yes')
    expect(applies(circuit({ refrigerant: 'R-744' }))['us-hfc']).toBe('no')
    expect(applies(circuit({ refrigerant: 'R-1234yf' }))['us-hfc']).toBe('no')
    expect(applies(circuit({ refrigerant: 'R-22' }))['us-hfc']).toBe('no') // no HFC, and not a substitute
    expect(reasons(circuit({ refrigerant: 'R-22' }), 'us-hfc')).toEqual(['ozone-depleting'])
  })

  it('a blend of an HCFC and an HFC goes by what it contains: below 50 lb by the HFC alone', () => {
    const small = circuit({ refrigerant: 'R-401A', pounds: '30' }) // R-22, R-152a, R-124
    expect(applies(small)).toEqual({ 'us-ods': 'no', 'us-hfc': 'yes' })
    expect(reasons(small, 'us-hfc')).toEqual(['contains-hfc', 'charge-reached'])
    expect(applies(circuit({ refrigerant: 'R-401A', pounds: '50' }))).toEqual({ 'us-ods': 'yes', 'us-hfc': 'yes' })
    expect(applies(circuit({ refrigerant: 'R-409A', pounds: '30' }))).toEqual({ 'us-ods': 'no', 'us-hfc': 'no' }) // HCFCs only
  })

  it('a substitute without an HFC goes by its GWP: 53 is not above 53; unknown counts as above', () => {
    const invented = (gwp: string | null): CircuitFacts => ({ ...circuit({ refrigerant: 'R-1234yf' }), refrigerant: { isOzoneDepleting: false, containsHfc: false, gwp } })
    expect(['52.9999', '53', '53.0001', null].map((gwp) => applies(invented(gwp))['us-hfc'])).toEqual(['no', 'no', 'yes', 'yes'])
    expect(reasons(invented(null), 'us-hfc')).toEqual(['gwp-unknown', 'charge-reached'])
  })

  it('a pack that has ended says until when it was in force', () => {
    const ended = PACKS.map((pack) => ({
      ...pack,
      scope: { ...pack.scope, leastChargeKg: { ...pack.scope.leastChargeKg, values: pack.scope.leastChargeKg.values.map((value) => ({ ...value, until: plainDate('2026-03-02') })) } },
    }))
    const [decision] = packsFor(circuit(), ended, ON)
    expect(decision).toMatchObject({ applies: 'no', reasons: [{ code: 'no-longer-in-force', params: { until: '2026-03-02' } }] })
    expect(thresholdsFor(circuit(), ended, ON)).toEqual([])
  })

  it('asks for comfort cooling whether the excepted subsector holds it, and never decides', () => {
    const rooftop = { refrigerant: 'R-410A', pounds: '24', category: 'comfort-cooling' } as const
    expect(applies(circuit(rooftop))['us-hfc']).toBe('undecided')
    expect(applies(circuit({ ...rooftop, decision: 'excepted' }))['us-hfc']).toBe('no')
    expect(applies(circuit({ ...rooftop, decision: 'not-excepted' }))['us-hfc']).toBe('yes')
    expect(thresholdsFor(circuit(rooftop), PACKS, ON)).toHaveLength(1) // watched until it is settled
  })

  it('says that a full charge is needed, and what a site has not switched on', () => {
    expect(applies(circuit({ pounds: null }))['us-ods']).toBe('undecided')
    expect(reasons(circuit({ packs: [] }), 'us-ods')).toEqual(['switched-off'])
    expect(thresholdsFor(circuit({ packs: [] }), PACKS, ON)).toEqual([])
  })
})

describe('what starts to run, 40 CFR 82.157(d)-(j), from memory', () => {
  const due = (facts: CircuitFacts, code: string) => dutiesOfAddition({ circuit: facts, packs: PACKS, rate: percent('50'), on: ON }).find((duty) => duty.code === code)

  it('repair and initial test within 30 days of the addition, 120 where a process must be shut down', () => {
    expect(due(circuit(), 'leak-repair')).toMatchObject({ dueOn: '2026-04-02', days: 30, dueWithProcessShutdownOn: null })
    expect(due(circuit({ category: 'industrial-process' }), 'leak-repair')).toMatchObject({ dueOn: '2026-04-02', dueWithProcessShutdownOn: '2026-07-01' })
    expect(due(circuit(), 'initial-test')).toMatchObject({ dueOn: '2026-04-02' })
  })

  it('inspections every quarter from 500 lb in commercial and process refrigeration, else once a calendar year', () => {
    expect(due(circuit({ pounds: '500' }), 'inspection-quarterly')).toMatchObject({ dueOn: '2026-06-03' })
    expect(due(circuit({ pounds: '499.9999' }), 'inspection-quarterly')).toBeUndefined()
    expect(due(circuit({ pounds: '499.9999' }), 'inspection-yearly')).toMatchObject({ dueOn: '2027-12-31' })
    expect(due(circuit({ pounds: '900', category: 'comfort-cooling' }), 'inspection-yearly')).toMatchObject({ dueOn: '2027-12-31' })
    expect(due(circuit({ pounds: '900', category: 'comfort-cooling' }), 'inspection-quarterly')).toBeUndefined()
  })

  it.each([
    ['initial-test-passed', 'follow-up-test', '2026-03-13'],
    ['follow-up-failed', 'plan', '2026-04-02'],
    ['plan-made', 'plan-completion', '2027-03-03'],
    ['chronic-leak', 'chronic-leak-report', '2027-03-01'],
  ] as const)('%s starts %s, due %s', (trigger, code, dueOn) => {
    expect(dutiesStarted({ circuit: circuit(), packs: PACKS, trigger, on: ON }).map((duty) => [duty.code, duty.dueOn])).toEqual([[code, dueOn]])
  })

  it('one year from a leap day ends on 28 February', () => {
    const [duty] = dutiesStarted({ circuit: circuit(), packs: PACKS, trigger: 'plan-made', on: plainDate('2028-02-29') })
    expect(duty?.dueOn).toBe('2029-02-28')
  })
})
