import { describe, expect, it } from 'vitest'
import type { PostingDraft, PostingKind } from '../../../shared/api/ledger'
import { addDays, plainDate } from '../../../shared/dates/plain-date'
import { contentsAfter } from '../../../shared/mass/contents'
import { draftFaults } from '../../../shared/mass/draft-faults'
import { lb, type Mass } from '../../../shared/mass/mass'
import { buildPosting } from '../../../shared/mass/postings'
import { refusePosting } from '../../../shared/mass/refusals'
import type { OriginalPosting, PostingStates } from '../../../shared/mass/states'
import { postingWarnings } from '../../../shared/mass/warnings'
import { aCircuit, aCylinder, aDraft, TODAY } from './builders'

type Traits = Partial<PostingStates>
const states = (traits: Traits = {}): PostingStates => ({
  circuit: aCircuit(), cylinder: aCylinder(), toCylinder: aCylinder({ id: 'to-cylinder', contentKg: lb('0') }), ...traits,
})
/** Only the states that a kind touches, as the server reads them. */
const touched = (kind: PostingKind, { circuit, cylinder, toCylinder, original }: PostingStates): PostingStates => ({
  circuit: ['charge', 'recovery', 'loss', 'opening-charge', 'reversal'].includes(kind) ? circuit : undefined,
  cylinder: ['loss', 'opening-charge'].includes(kind) ? undefined : cylinder,
  toCylinder: kind === 'transfer' ? toCylinder : undefined,
  original,
})
const refusal = (kind: PostingKind, mass: Mass, traits: Traits = {}, draft: Partial<PostingDraft> = {}) =>
  refusePosting(aDraft(kind, mass, draft), touched(kind, states(traits)), TODAY)
const codeOf = (kind: PostingKind, mass: Mass, traits: Traits = {}, draft: Partial<PostingDraft> = {}) =>
  refusal(kind, mass, traits, draft)?.code ?? null

const recovery = (traits: Parameters<typeof aCylinder>[0] = {}) =>
  aCylinder({ kind: 'recovery', contents: 'recovered', ownerCustomerId: 'customer-a', ...traits })

describe('what may be posted', () => {
  it.each<PostingKind>(['purchase', 'receipt', 'charge', 'recovery', 'loss', 'transfer', 'return', 'reclaim', 'destruction',
    'variance', 'opening-stock', 'opening-charge'])('an ordinary %s is not refused', (kind) => {
    expect(refusal(kind, lb('2'))).toBeNull()
  })
})

describe('the wrong refrigerant', () => {
  it.each<[string, PostingKind, Traits, string]>([
    ['is not charged from a cylinder of another', 'charge', { cylinder: aCylinder({ refrigerant: 'R-22' }) }, 'cylinder'],
    ['is not charged into a circuit of another', 'charge', { circuit: aCircuit({ refrigerant: 'R-22' }) }, 'circuit'],
    ['is not recovered into a cylinder of another', 'recovery', { cylinder: recovery({ refrigerant: 'R-22' }) }, 'cylinder'],
    ['is not transferred into a cylinder of another', 'transfer',
      { toCylinder: aCylinder({ id: 'to-cylinder', refrigerant: 'R-22' }) }, 'to-cylinder'],
  ])('%s', (_name, kind, traits, where) => {
    expect(refusal(kind, lb('2'), traits)).toEqual({ code: 'wrong-refrigerant', where, holds: 'R-22', offered: 'R-410A' })
  })
})

describe('a cylinder past its test date', () => {
  const past = aCylinder({ testDueOn: plainDate('2026-06-14') })
  it.each<[PostingKind, Traits, string | null]>([
    ['recovery', { cylinder: past }, 'test-date-passed'],
    ['purchase', { cylinder: past }, 'test-date-passed'],
    ['transfer', { toCylinder: { ...past, id: 'to-cylinder', contentKg: lb('0') } }, 'test-date-passed'],
    ['transfer', { cylinder: past }, null],
    ['charge', { cylinder: past }, null],
    ['return', { cylinder: past }, null],
    ['opening-stock', { cylinder: past }, null],
    ['variance', { cylinder: past }, null],
  ])('%s: filling is refused, using up is not', (kind, traits, expected) => {
    expect(codeOf(kind, lb('2'), traits)).toBe(expected)
  })
  it('may still be filled on the day itself', () => {
    expect(codeOf('recovery', lb('2'), { cylinder: aCylinder({ testDueOn: TODAY }) })).toBeNull()
  })
  it('was filled in date, though the line came back a day too late', () => {
    expect(codeOf('recovery', lb('2'), { cylinder: past }, { occurredOn: plainDate('2026-06-14') })).toBeNull()
  })
})

describe('the fill limit, 22 lb with 15 lb in the cylinder', () => {
  it('lets 7 lb in and not a hundredth of an ounce more', () => {
    expect(codeOf('recovery', lb('7'))).toBeNull()
    expect(refusal('recovery', lb('7.000625')))
      .toMatchObject({ code: 'fill-limit-exceeded', roomKg: lb('7'), limitKg: lb('22'), tareKg: lb('17') })
  })
  it('leaves no room rather than less than none where the cylinder is overfull already', () => {
    expect(refusal('recovery', lb('1'), { cylinder: aCylinder({ contentKg: lb('23') }) })).toMatchObject({ roomKg: lb('0') })
  })
  it('lets an overfull cylinder be emptied', () => {
    expect(codeOf('charge', lb('1'), { cylinder: aCylinder({ contentKg: lb('23') }) })).toBeNull()
  })
  it('holds for the receiving cylinder of a transfer', () => {
    const toCylinder = aCylinder({ id: 'to-cylinder', contentKg: lb('20') })
    expect(refusal('transfer', lb('3'), { toCylinder })).toMatchObject({ code: 'fill-limit-exceeded', cylinderId: 'to-cylinder' })
  })
  it('is not known without a water capacity, and does not refuse then', () => {
    expect(codeOf('purchase', lb('100'), { cylinder: aCylinder({ fillLimitKg: null, waterCapacityKg: null }) })).toBeNull()
  })
})

describe('a disposable cylinder', () => {
  const disposable = aCylinder({ kind: 'disposable' })
  it.each<[PostingKind, string | null]>([
    ['recovery', 'disposable-not-refillable'], ['purchase', null], ['receipt', null], ['opening-stock', null], ['charge', null],
  ])('%s: %s', (kind, expected) => {
    expect(codeOf(kind, lb('2'), { cylinder: disposable })).toBe(expected)
  })
  it('does not receive a transfer', () => {
    expect(codeOf('transfer', lb('2'), { toCylinder: { ...disposable, id: 'to-cylinder' } })).toBe('disposable-not-refillable')
  })
})

describe('a cylinder never below zero', () => {
  it.each<PostingKind>(['charge', 'transfer', 'return', 'reclaim', 'destruction'])('%s of all of it, not of more', (kind) => {
    const toCylinder = aCylinder({ id: 'to-cylinder', contentKg: lb('0') })
    expect(codeOf(kind, lb('15'), { toCylinder })).toBeNull()
    expect(refusal(kind, lb('15.01'), { toCylinder }))
      .toEqual({ code: 'cylinder-negative', cylinderId: 'cylinder', contentKg: lb('15'), shortKg: lb('0.01') })
  })
  it('a scale that shows less than nothing is not a variance', () => {
    expect(codeOf('variance', lb('-15'))).toBeNull()
    expect(codeOf('variance', lb('-15.01'))).toBe('cylinder-negative')
  })
})

describe('mixed gas goes to a reclaimer or to destruction', () => {
  const mixed = aCylinder({ contents: 'mixed' })
  it.each<[PostingKind, string | null]>([
    ['charge', 'mixed-not-chargeable'], ['return', 'mixed-not-chargeable'], ['reclaim', null], ['destruction', null], ['recovery', null],
  ])('%s: %s', (kind, expected) => {
    expect(codeOf(kind, lb('2'), { cylinder: mixed })).toBe(expected)
  })
  it('is not transferred onto clean gas, but into an empty or a mixed cylinder', () => {
    const to = (traits: Parameters<typeof aCylinder>[0]) =>
      codeOf('transfer', lb('2'), { cylinder: mixed, toCylinder: aCylinder({ id: 'to-cylinder', ...traits }) })
    expect(to({ contents: 'virgin' })).toBe('mixed-not-chargeable')
    expect(to({ contents: 'virgin', contentKg: lb('0') })).toBeNull()
    expect(to({ contents: 'mixed' })).toBeNull()
  })
})

describe('recovered gas and its owner', () => {
  it.each<[string, PostingKind, Traits, string | null]>([
    ['goes back into a circuit of its owner', 'charge', { cylinder: recovery() }, null],
    ['does not go into a circuit of another', 'charge', { cylinder: recovery({ ownerCustomerId: 'customer-b' }) }, 'recovered-of-another-owner'],
    ['does not go anywhere while nobody knows whose it is', 'charge', { cylinder: recovery({ ownerCustomerId: null }) }, 'recovered-of-another-owner'],
    ['joins gas of the same owner', 'recovery', { cylinder: recovery() }, null],
    ['does not join gas of another', 'recovery', { cylinder: recovery({ ownerCustomerId: 'customer-b' }) }, 'recovered-of-another-owner'],
    ['goes into the emptied cylinder of another', 'recovery', { cylinder: recovery({ ownerCustomerId: 'customer-b', contentKg: lb('0') }) }, null],
    ['is not transferred onto gas of another', 'transfer',
      { cylinder: recovery(), toCylinder: recovery({ id: 'to-cylinder', ownerCustomerId: 'customer-b' }) }, 'recovered-of-another-owner'],
    ['is transferred onto gas of the same owner', 'transfer', { cylinder: recovery(), toCylinder: recovery({ id: 'to-cylinder' }) }, null],
  ])('%s', (_name, kind, traits, expected) => {
    expect(codeOf(kind, lb('2'), traits)).toBe(expected)
  })
  it('once reclaimed it goes to anyone', () => {
    expect(codeOf('charge', lb('2'), { cylinder: aCylinder({ contents: 'reclaimed', ownerCustomerId: 'customer-b' }) })).toBeNull()
  })
})

describe('out of use, retired, empty', () => {
  it.each<[PostingKind, string | null]>([
    ['charge', 'cylinder-out-of-use'], ['recovery', 'cylinder-out-of-use'], ['purchase', 'cylinder-out-of-use'],
    ['return', null], ['variance', null],
  ])('a returned cylinder, %s: %s', (kind, expected) => {
    expect(codeOf(kind, lb('2'), { cylinder: aCylinder({ status: 'returned' }) })).toBe(expected)
  })
  it.each<[PostingKind, string | null]>([['charge', 'circuit-retired'], ['opening-charge', 'circuit-retired'], ['recovery', null], ['loss', null]])(
    'a retired circuit, %s: %s', (kind, expected) => {
      expect(codeOf(kind, lb('2'), { circuit: aCircuit({ status: 'retired' }) })).toBe(expected)
    })
  it('a flat circuit has lost its whole book charge, and cannot lose more', () => {
    expect(codeOf('loss', lb('60'))).toBeNull()
    expect(refusal('loss', lb('60.5'))).toEqual({ code: 'circuit-negative', circuitId: 'circuit', bookKg: lb('60'), shortKg: lb('0.5') })
  })
  it('nothing is posted for tomorrow', () => {
    expect(refusal('charge', lb('2'), {}, { occurredOn: addDays(TODAY, 1) })).toEqual({ code: 'date-in-future', today: TODAY })
  })
})

describe('the most dangerous reason comes first', () => {
  it('a cylinder with everything wrong is refused for its refrigerant, then its date, then its fill', () => {
    const wrong = aCylinder({
      refrigerant: 'R-22', testDueOn: plainDate('2020-01-31'), kind: 'disposable', contents: 'recovered',
      ownerCustomerId: 'customer-b', status: 'scrapped',
    })
    const inOrder = [
      wrong, { ...wrong, refrigerant: 'R-410A' }, { ...wrong, refrigerant: 'R-410A', testDueOn: null },
      { ...wrong, refrigerant: 'R-410A', testDueOn: null, fillLimitKg: null },
      { ...wrong, refrigerant: 'R-410A', testDueOn: null, fillLimitKg: null, kind: 'refillable' as const },
      { ...wrong, refrigerant: 'R-410A', testDueOn: null, fillLimitKg: null, kind: 'refillable' as const, ownerCustomerId: 'customer-a' },
    ].map((cylinder) => codeOf('recovery', lb('30'), { cylinder }))
    expect(inOrder).toEqual(['wrong-refrigerant', 'test-date-passed', 'fill-limit-exceeded', 'disposable-not-refillable',
      'recovered-of-another-owner', 'cylinder-out-of-use'])
  })
})

describe('a reversal', () => {
  const original = (kind: PostingKind, mass: Mass, traits: Partial<OriginalPosting> = {}): OriginalPosting => ({
    id: 'original', kind, entries: buildPosting(aDraft(kind, mass), states()).entries, reversedById: null, ...traits,
  })
  it('of a charge puts the gas back into a cylinder, even one that is past its date, disposable or returned', () => {
    const cylinder = aCylinder({ testDueOn: plainDate('2020-01-31'), kind: 'disposable', status: 'returned' })
    expect(codeOf('reversal', lb('2'), { original: original('charge', lb('2')), cylinder })).toBeNull()
  })
  it('does not put back more than the cylinder may hold', () => {
    expect(codeOf('reversal', lb('8'), { original: original('charge', lb('8')) })).toBe('fill-limit-exceeded')
  })
  it('does not take out of a cylinder what has left it since', () => {
    expect(codeOf('reversal', lb('2'), { original: original('purchase', lb('2')), cylinder: aCylinder({ contentKg: lb('1') }) }))
      .toBe('cylinder-negative')
  })
  it('is made once, and the second time says so before anything else', () => {
    const reversed = original('purchase', lb('2'), { reversedById: 'the-first' })
    expect(refusal('reversal', lb('2'), { original: reversed, cylinder: aCylinder({ contentKg: lb('0') }) }))
      .toEqual({ code: 'already-reversed', reversedById: 'the-first' })
  })
  it('is not itself taken back', () => {
    expect(codeOf('reversal', lb('2'), { original: { ...original('purchase', lb('2')), kind: 'reversal' } })).toBe('reversal-of-reversal')
  })
})

describe('warnings', () => {
  const warnings = (kind: PostingKind, mass: Mass, traits: Traits = {}, draft: Partial<PostingDraft> = {}) =>
    postingWarnings(aDraft(kind, mass, draft), touched(kind, states(traits)), TODAY)
  it('nothing is odd about a partial charge into a circuit in service', () => {
    expect(warnings('charge', lb('5'))).toEqual([])
  })
  it('more in one charge than the circuit holds', () => {
    expect(warnings('charge', lb('65'))).toEqual([{ code: 'above-full-charge', fullChargeKg: lb('60'), overKg: lb('5') }])
  })
  it('a charge into a mothballed circuit of unknown full charge', () => {
    expect(warnings('charge', lb('5'), { circuit: aCircuit({ status: 'mothballed', fullChargeKg: null }) }).map(({ code }) => code))
      .toEqual(['full-charge-unknown', 'circuit-mothballed'])
  })
  it('a recovery of more than the book knew', () => {
    expect(warnings('recovery', lb('7'), { circuit: aCircuit({ bookKg: lb('5') }) }))
      .toEqual([{ code: 'more-than-booked', bookKg: lb('5'), excessKg: lb('2') }, { code: 'contents-change', from: 'virgin', to: 'recovered' }])
  })
  it('an event of more than thirty days ago', () => {
    expect(warnings('charge', lb('5'), {}, { occurredOn: addDays(TODAY, -30) })).toEqual([])
    expect(warnings('charge', lb('5'), {}, { occurredOn: addDays(TODAY, -31) })).toEqual([{ code: 'date-long-past', days: 31 }])
  })
  it('a reversal that leaves less than nothing in a circuit', () => {
    const original = { id: 'original', kind: 'opening-charge' as const, entries: buildPosting(aDraft('opening-charge', lb('60')), states()).entries, reversedById: null }
    expect(warnings('reversal', lb('60'), { original, circuit: aCircuit({ bookKg: lb('50') }) }))
      .toMatchObject([{ code: 'circuit-below-zero', bookKg: lb('-10') }])
  })
})

describe('what a filled cylinder holds afterwards', () => {
  const after = (kind: PostingKind, traits: Traits) => contentsAfter(aDraft(kind, lb('2')), touched(kind, states(traits)))
  it.each<[string, PostingKind, Traits, ReturnType<typeof contentsAfter>]>([
    ['an empty cylinder takes the owner of what is recovered into it', 'recovery',
      { cylinder: recovery({ contentKg: lb('0'), ownerCustomerId: null }) }, { contents: 'recovered', ownerCustomerId: 'customer-a' }],
    ['recovered gas on virgin gas makes all of it recovered', 'recovery', { cylinder: aCylinder() }, { contents: 'recovered', ownerCustomerId: 'customer-a' }],
    ['recovered gas on gas of the same owner changes nothing', 'recovery', { cylinder: recovery() }, null],
    ['what is marked mixed stays mixed', 'recovery', { cylinder: aCylinder({ contents: 'mixed' }) }, null],
    ['an empty cylinder takes the class of a transfer', 'transfer',
      { cylinder: aCylinder({ contents: 'reclaimed' }), toCylinder: recovery({ id: 'to-cylinder', contentKg: lb('0') }) }, { contents: 'reclaimed', ownerCustomerId: null }],
    ['virgin gas on recovered gas stays recovered', 'transfer', { toCylinder: recovery({ id: 'to-cylinder' }) }, null],
    ['a charge changes no class', 'charge', {}, null],
  ])('%s', (_name, kind, traits, expected) => {
    expect(after(kind, traits)).toEqual(expected)
  })
})

describe('faults of a draft', () => {
  it('all of them at once, each under its field', () => {
    expect(draftFaults(aDraft('charge', lb('0'), { cylinderId: null, circuitId: null }))).toEqual([
      { code: 'account-missing', field: 'cylinderId' }, { code: 'account-missing', field: 'circuitId' }, { code: 'mass-zero', field: 'massKg' },
    ])
  })
  it.each<[string, Partial<PostingDraft>, string]>([
    ['a transfer into itself', { kind: 'transfer', toCylinderId: 'cylinder' }, 'same-cylinder'],
    ['a negative charge', { kind: 'charge', massKg: '-1' }, 'mass-negative'],
    ['a mass in words', { kind: 'charge', massKg: 'ten' }, 'mass-unreadable'],
    ['a mass finer than storage keeps', { kind: 'charge', massKg: '0.000000000000001' }, 'mass-unreadable'],
    ['a reversal without a reason', { kind: 'reversal', reversesId: 'original', reason: ' ' }, 'reason-missing'],
  ])('%s', (_name, traits, code) => {
    expect(draftFaults(aDraft('charge', lb('1'), traits)).map((fault) => fault.code)).toEqual([code])
  })
  it('a negative variance is none', () => {
    expect(draftFaults(aDraft('variance', lb('-1')))).toEqual([])
  })
})
