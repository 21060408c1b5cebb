import { describe, expect, it } from 'vitest'
import type { PostingDraft } from '../../../shared/api/ledger'
import type { WireCircuit } from '../../../shared/api/places'
import { plainDate } from '../../../shared/dates/plain-date'
import { kg, lb, toKgText } from '../../../shared/mass/mass'
import { circuitStateOf } from '../../../shared/mass/states-from-wire'
import { outlookOf } from '../../../src/composables/weigh-in-outlook'
import { draftOf, enteredOf, type WeighInEntry } from '../../../src/composables/weigh-in-entry'

const kgOf = (pounds: string): string => toKgText(lb(pounds))
const LAST = plainDate('2026-09-02')
const ON = plainDate('2026-12-01') // 90 days later

/** 100 lb of R-22 for comfort cooling, last added to 90 days before, full by the book. */
function aCircuit(traits: Partial<WireCircuit> = {}): WireCircuit {
  return {
    id: 'circuit', name: 'Circuit 1', systemId: 'system', systemTag: 'RTU-1', systemName: 'Roof-top unit', siteId: 'site', siteName: 'Site', customerId: 'customer', customerName: 'Customer',
    refrigerant: 'R-22', category: 'comfort-cooling', status: 'in-service', fullChargeKg: kgOf('100'), bookChargeKg: kgOf('100'), ratePercent: '2', ratedOn: LAST, thresholdPercent: '10',
    roomKg: kgOf('2.4'), standing: 'far', commissionedOn: plainDate('2020-05-01'), siteTimeZone: 'America/Chicago', siteElevationM: 200, leakRateMethod: 'annualizing', fullCharges: [], thresholds: [],
    packs: [{ packId: 'us-ods', applies: 'yes', reasons: [{ code: 'ozone-depleting', params: {} }, { code: 'charge-reached', params: {} }] }, { packId: 'us-hfc', applies: 'no', reasons: [{ code: 'switched-off', params: {} }] }],
    rates: [], components: [], marks: [], leaks: [], verifications: [], sisters: [], version: 1, may: [],
    history: {
      method: 'annualizing', commissionedOn: plainDate('2020-05-01'), fullCharges: [{ effectiveOn: plainDate('2020-05-01'), massKg: kgOf('100') }],
      events: [{ kind: 'addition', postingId: 'earlier', occurredOn: LAST, occurredAt: '2026-09-02T15:00:00Z', massKg: kgOf('1'), leakId: null, purpose: 'leak' }],
    },
    ...traits,
  }
}
const anEntry = (traits: Partial<WeighInEntry> = {}): WeighInEntry => ({
  id: 'posting', visitId: null, kind: 'charge', cylinderId: 'cylinder', isNet: false, unit: 'lb', before: '40', after: '30', amount: '', isWholeLoss: true, isComplete: false, purpose: 'leak', leakId: null,
  part: ' ', workDone: null, note: null, occurredOn: ON, time: '08:30', ...traits,
})
function outlook(entry: WeighInEntry, pounds: string, circuit = aCircuit()) {
  const draft = draftOf(entry, { circuit, cylinder: null, massKg: lb(pounds) })
  if (!draft) throw new Error('The entry makes no draft.')
  return outlookOf(circuit, circuitStateOf(circuit, draft.occurredOn), draft)
}

describe('what a weigh-in will do, annualizing method of 40 CFR 82.152; worked by hand', () => {
  it.each([
    // [lb] added, [%] rate, above 10 %, duties start: 10/100 × 365/90; the room is 10 % × 100 lb × 90/365 = 2.4657 lb
    ['10', '40.5556', true, 'over'],
    ['2.4657', '9.9998', false, 'near'],
    ['2.4658', '10.0002', true, 'over'],
    ['1', '4.0556', false, 'far'],
  ])('%s lb give %s %%, above: %s, then %s', (pounds, rate, isAbove, standing) => {
    const { rate: given, ahead, duties, beam } = outlook(anEntry(), pounds)
    expect(given?.toFixed(4)).toBe(rate)
    expect(ahead?.isAbove).toBe(isAbove)
    expect(duties.length > 0).toBe(isAbove)
    expect(beam.standing).toBe(standing)
  })
  it('30 days for the repair run from the addition that passes the threshold (40 CFR 82.157(d))', () => {
    expect(outlook(anEntry(), '10').duties[0]).toMatchObject({ code: 'leak-repair', dueOn: '2026-12-31' })
  })
  it('an addition for a new installation gives no rate and starts nothing', () => {
    const { rate, ahead, duties, rated } = outlook(anEntry({ purpose: 'installation' }), '10')
    expect([rate, ahead, duties, rated?.exempt]).toEqual([null, null, [], 'installation'])
  })
  it('a complete weigh-in of 10 lb into a circuit that the book believed full reveals 10 lb lost', () => {
    const { bookKg, lossKg } = outlook(anEntry({ isComplete: true }), '10')
    expect([toKgText(bookKg), toKgText(lossKg)]).toEqual([kgOf('100'), kgOf('10')])
  })
  it('a circuit found flat has lost its whole book charge and keeps its rate', () => {
    const { beam, lossKg, rated } = outlook(anEntry({ kind: 'loss' }), '100')
    expect([beam.bookChargeKg, beam.standing, toKgText(lossKg), rated]).toEqual(['0', 'flat', kgOf('100'), null])
  })
  it('a partial recovery of 30 lb leaves 70 lb in the book', () => {
    expect(toKgText(outlook(anEntry({ kind: 'recovery', purpose: 'repair' }), '30').bookKg)).toBe(kgOf('70'))
  })
})

describe('the posting that an entry makes', () => {
  const draft = (traits: Partial<WeighInEntry>): PostingDraft | null => draftOf(anEntry(traits), { circuit: aCircuit(), cylinder: null, massKg: kg('1') })

  it('half past eight at a site in Chicago in December is half past two in UTC', () => {
    expect(draft({})?.occurredAt).toBe('2026-12-01T14:30:00.000Z')
  })
  it('keeps the readings as they were typed, and a net amount without them', () => {
    expect(enteredOf(anEntry())).toEqual({ unit: 'lb', before: '40', after: '30', amount: null })
    expect(enteredOf(anEntry({ isNet: true, amount: '10' }))).toEqual({ unit: 'lb', before: null, after: null, amount: '10' })
  })
  it('has no readings where the whole book charge was lost', () => {
    expect(draft({ kind: 'loss' })?.entered).toBeNull()
  })
  it('names a leak only where the gas is for a leak, and no empty words', () => {
    expect(draft({ leakId: 'leak' })?.leakId).toBe('leak')
    expect(draft({ leakId: 'leak', purpose: 'seasonal' })).toMatchObject({ leakId: null, part: null })
  })
  it.each([{ time: '24:00' }, { time: '' }, { occurredOn: null }])('is none without a day and a time: %o', (traits) => {
    expect(draft(traits)).toBeNull()
  })
})
