import { describe, expect, it } from 'vitest'
import type { WirePackDecision } from '../../../shared/api/places'
import { plainDate } from '../../../shared/dates/plain-date'
import { percent } from '../../../shared/leak-rate/percent'
import { lb } from '../../../shared/mass/mass'
import { dutiesOfAddition, packsFor } from '../../../shared/rules/engine'
import { factsFromWire } from '../../../shared/rules/facts-from-wire'
import { PACKS } from '../../../shared/rules/packs'

const ON = plainDate('2026-12-01')
const wire = (packs: WirePackDecision[], refrigerant = 'R-22') => ({ packs, refrigerant, category: 'comfort-cooling' as const })
const decided = (packId: string, applies: WirePackDecision['applies'], ...codes: string[]): WirePackDecision =>
  ({ packId, applies, reasons: codes.map((code) => ({ code, params: {} })) })

describe('what the rules need to know, read out of the decisions on the wire', () => {
  it('a pack that the site has switched off stays off', () => {
    const facts = factsFromWire(wire([decided('us-ods', 'yes', 'ozone-depleting', 'charge-reached'), decided('us-hfc', 'no', 'switched-off')]), lb('60'))
    expect(facts.packIds).toEqual(['us-ods'])
    expect(packsFor(facts, PACKS, ON).map(({ packId, applies }) => [packId, applies])).toEqual([['us-ods', 'yes'], ['us-hfc', 'no']])
  })
  it.each([
    ['subsector-excepted', 'no'],
    ['subsector-not-excepted', 'yes'],
    ['subsector-undecided', 'undecided'],
  ])('a decision of %s gives the same answer again: %s', (code, applies) => {
    const facts = factsFromWire(wire([decided('us-hfc', 'yes', code)], 'R-410A'), lb('60'))
    expect(packsFor(facts, PACKS, ON).find(({ packId }) => packId === 'us-hfc')?.applies).toBe(applies)
  })
  it('an addition at the threshold of 10 % starts nothing, one above it the repair clock of 30 days (40 CFR 82.157(d))', () => {
    const circuit = factsFromWire(wire([decided('us-ods', 'yes', 'ozone-depleting', 'charge-reached')]), lb('60'))
    expect(dutiesOfAddition({ circuit, packs: PACKS, rate: percent('10'), on: ON })).toEqual([])
    const repair = dutiesOfAddition({ circuit, packs: PACKS, rate: percent('10.0001'), on: ON }).find(({ code }) => code === 'leak-repair')
    expect(repair?.dueOn).toBe('2026-12-31')
  })
})
