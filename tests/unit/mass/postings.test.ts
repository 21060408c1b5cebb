import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { POSTING_KINDS, type PostingKind } from '../../../shared/api/ledger'
import { equalMass, kg, lb, negated, plus, sumMass, toKgText, ZERO_MASS, type Mass } from '../../../shared/mass/mass'
import { buildPosting, isSameAccount } from '../../../shared/mass/postings'
import type { AccountRef, Entry, PostingStates } from '../../../shared/mass/states'
import { aCircuit, aCylinder, aDraft, poundsOf } from './builders'

const states = (traits: Partial<PostingStates> = {}): PostingStates => ({
  circuit: aCircuit(), cylinder: aCylinder(), toCylinder: aCylinder({ id: 'to-cylinder' }), ...traits,
})

describe('entries of each kind in pounds, worked by hand from the table of kinds', () => {
  it.each<[PostingKind, string, Record<string, string>]>([
    ['purchase', '10', { PARTNER: '-10', CYLINDER: '10' }],
    ['receipt', '10', { PARTNER: '-10', CYLINDER: '10' }],
    ['recovery', '10', { CIRCUIT: '-10', CYLINDER: '10' }],
    ['loss', '60', { CIRCUIT: '-60', AIR: '60' }],
    ['transfer', '4', { CYLINDER: '-4', TO_CYLINDER: '4' }],
    ['return', '4', { CYLINDER: '-4', PARTNER: '4' }],
    ['reclaim', '4', { CYLINDER: '-4', PARTNER: '4' }],
    ['destruction', '4', { CYLINDER: '-4', PARTNER: '4' }],
    ['variance', '0.5', { CYLINDER: '0.5', VARIANCE: '-0.5' }],
    ['variance', '-0.5', { CYLINDER: '-0.5', VARIANCE: '0.5' }],
    ['opening-stock', '12', { VARIANCE: '-12', CYLINDER: '12' }],
    ['opening-charge', '60', { VARIANCE: '-60', CIRCUIT: '60' }],
  ])('a %s of %s lb', (kind, pounds, expected) => {
    expect(poundsOf(buildPosting(aDraft(kind, lb(pounds)), states()))).toEqual(expected)
  })
})

describe('a charge and the loss that it reveals, 60 lb full charge, worked by hand', () => {
  it.each<[string, string, string, boolean, Record<string, string>]>([
    // book, charged, complete, entries; a complete charge ends at 60 lb, a partial one at 60 lb at most
    ['into a circuit that the book believed full reveals what had leaked', '60', '10', true, { CYLINDER: '-10', AIR: '10' }],
    ['that is partial and overtops the book reveals a loss as well', '55', '10', false, { CYLINDER: '-10', CIRCUIT: '5', AIR: '5' }],
    ['that is partial and stays below the full charge reveals nothing', '20', '10', false, { CYLINDER: '-10', CIRCUIT: '10' }],
    ['into a flat circuit, complete, adds what went in', '0', '60', true, { CYLINDER: '-60', CIRCUIT: '60' }],
    ['that fills a circuit with less than the book lacked shows gas the book did not know', '40', '15', true,
      { CYLINDER: '-15', CIRCUIT: '20', VARIANCE: '-5' }],
  ])('a charge %s', (_name, book, charged, isComplete, expected) => {
    const circuit = aCircuit({ bookKg: lb(book) })
    expect(poundsOf(buildPosting(aDraft('charge', lb(charged), { isComplete }), states({ circuit })))).toEqual(expected)
  })

  it('without a known full charge the book takes what went in, complete or not', () => {
    const circuit = aCircuit({ bookKg: lb('50'), fullChargeKg: null })
    expect(poundsOf(buildPosting(aDraft('charge', lb('20'), { isComplete: true }), states({ circuit }))))
      .toEqual({ CYLINDER: '-20', CIRCUIT: '20' })
  })
})

describe('a recovery, worked by hand', () => {
  it.each<[string, string, string, boolean, Record<string, string>]>([
    ['40 of 60 lb from a circuit left empty: 20 lb were lost', '60', '40', true, { CIRCUIT: '-60', CYLINDER: '40', AIR: '20' }],
    ['40 of 60 lb from a circuit not emptied: 20 lb remain', '60', '40', false, { CIRCUIT: '-40', CYLINDER: '40' }],
    ['more than the book knew: the excess was never booked', '30', '40', false, { CIRCUIT: '-30', CYLINDER: '40', VARIANCE: '-10' }],
    ['more than the book knew, left empty', '30', '40', true, { CIRCUIT: '-30', CYLINDER: '40', VARIANCE: '-10' }],
  ])('%s', (_name, book, recovered, isComplete, expected) => {
    const circuit = aCircuit({ bookKg: lb(book) })
    expect(poundsOf(buildPosting(aDraft('recovery', lb(recovered), { isComplete }), states({ circuit })))).toEqual(expected)
  })
})

describe('mistakes of ours are refused loudly', () => {
  it('a posting whose circuit was not read throws', () => {
    expect(() => buildPosting(aDraft('charge', lb('1')), states({ circuit: undefined }))).toThrow(RangeError)
  })
  it('a posting that names another cylinder than the one read throws', () => {
    expect(() => buildPosting(aDraft('charge', lb('1'), { cylinderId: 'another' }), states())).toThrow(/cylinder another/)
  })
  it('a reversal of entries that do not balance throws', () => {
    const entries: Entry[] = [{ account: { kind: 'air' }, refrigerant: 'R-22', massKg: lb('1') }]
    const original = { id: 'original', kind: 'loss' as const, entries, reversedById: null }
    expect(() => buildPosting(aDraft('reversal', lb('1')), { original })).toThrow(/R-22 sum to/)
  })
  it('masses of two refrigerants do not balance each other', () => {
    const entries: Entry[] = [
      { account: { kind: 'air' }, refrigerant: 'R-22', massKg: lb('1') },
      { account: { kind: 'variance' }, refrigerant: 'R-410A', massKg: lb('-1') },
    ]
    const original = { id: 'original', kind: 'loss' as const, entries, reversedById: null }
    expect(() => buildPosting(aDraft('reversal', lb('1')), { original })).toThrow(RangeError)
  })
})

describe('laws of the ledger', () => {
  const grams = (least: number) => fc.integer({ min: least, max: 500_000_000 }).map((milligrams) => kg((milligrams / 1e6).toFixed(6)))
  const someDraft = fc.record({
    kind: fc.constantFrom(...POSTING_KINDS.filter((kind) => kind !== 'reversal')),
    mass: grams(1), isComplete: fc.boolean(), isShort: fc.boolean(), book: grams(0), full: fc.option(grams(1)),
  }).map(({ kind, mass, isComplete, isShort, book, full }) => ({
    draft: aDraft(kind, kind === 'variance' && isShort ? negated(mass) : mass, { isComplete }),
    states: states({ circuit: aCircuit({ bookKg: book, fullChargeKg: full }) }),
  }))

  it('whatever is posted, the entries sum to exactly zero and none is zero', () => {
    fc.assert(fc.property(someDraft, ({ draft, states: read }) => {
      const { entries } = buildPosting(draft, read)
      expect(toKgText(sumMass(entries.map((entry) => entry.massKg)))).toBe('0')
      expect(entries.every((entry) => !entry.massKg.isZero())).toBe(true)
    }))
  })

  it('whatever is posted, a circuit that is not above its full charge does not get above it', () => {
    fc.assert(fc.property(someDraft, ({ draft, states: read }) => {
      const circuit = read.circuit
      fc.pre(draft.kind === 'charge' && circuit?.fullChargeKg !== null && circuit !== undefined)
      const balances = applied([[{ kind: 'circuit', id: 'circuit' }, circuit.bookKg]], buildPosting(draft, read).entries)
      expect(circuit.fullChargeKg?.lessThan(balances.get('circuit circuit') ?? ZERO_MASS)).toBe(false)
    }))
  })

  it('whatever is posted, reversal restores every balance', () => {
    fc.assert(fc.property(fc.array(someDraft, { minLength: 1, maxLength: 8 }), (steps) => {
      const posted = steps.map(({ draft, states: read }) => buildPosting(draft, read))
      const reversals = posted.map(({ entries }, index) => {
        const original = { id: 'original', kind: steps[index]?.draft.kind ?? 'loss', entries, reversedById: null }
        return buildPosting(aDraft('reversal', lb('1')), { original })
      })
      const opening: [AccountRef, Mass][] = [[{ kind: 'cylinder', id: 'cylinder' }, lb('15')], [{ kind: 'circuit', id: 'circuit' }, lb('60')]]
      const before = applied(opening, [])
      const after = applied(opening, [...posted, ...reversals].flatMap((posting) => posting.entries))
      for (const [account, balance] of after) expect(equalMass(balance, before.get(account) ?? ZERO_MASS)).toBe(true)
    }))
  })

  it('two references mean one account only by kind and id', () => {
    expect(isSameAccount({ kind: 'air' }, { kind: 'air' })).toBe(true)
    expect(isSameAccount({ kind: 'air' }, { kind: 'variance' })).toBe(false)
    expect(isSameAccount({ kind: 'cylinder', id: 'a' }, { kind: 'circuit', id: 'a' })).toBe(false)
    expect(isSameAccount({ kind: 'cylinder', id: 'a' }, { kind: 'cylinder', id: 'b' })).toBe(false)
  })
})

function applied(opening: [AccountRef, Mass][], entries: Entry[]): Map<string, Mass> {
  const nameOf = (account: AccountRef) => `${account.kind} ${'id' in account ? account.id : ''}`
  const balances = new Map(opening.map(([account, mass]) => [nameOf(account), mass]))
  for (const { account, massKg } of entries) {
    balances.set(nameOf(account), plus(balances.get(nameOf(account)) ?? ZERO_MASS, massKg))
  }
  return balances
}
