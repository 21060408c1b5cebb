import { describe, expect, it } from 'vitest'
import document from '../../../shared/refrigerants/data/saturation.json'
import {
  CATALOGUE_SOURCES, containsHfc, containsUnsaturated, isBlend, isFlammable, ozoneClass, refrigerantById, refrigerantOf, REFRIGERANTS,
  type Refrigerant,
} from '../../../shared/refrigerants/catalogue'
import { AR4 } from '../../../shared/refrigerants/gwp'

const idsThat = (holds: (refrigerant: Refrigerant) => boolean): string[] => REFRIGERANTS.filter(holds).map(({ id }) => id)
interface Entry { kind: string; composition?: Record<string, number>; estimated?: boolean }
const tables: Record<string, Entry> = document.refrigerants as unknown as Record<string, Entry>

describe('classes of the Clean Air Act; 40 CFR part 82 subpart A, appendices A and B, from memory', () => {
  it('class I: the CFCs and the blends that contain one', () => {
    expect(idsThat((each) => ozoneClass(each) === 'I')).toEqual(['R-11', 'R-12', 'R-13', 'R-114', 'R-500', 'R-502'])
  })
  it('class II: the HCFCs and the blends that contain one', () => {
    expect(idsThat((each) => ozoneClass(each) === 'II')).toEqual(['R-22', 'R-123', 'R-124', 'R-401A', 'R-402A', 'R-402B', 'R-408A', 'R-409A'])
  })
})

describe('safety groups of ASHRAE Standard 34, from memory', () => {
  it('what burns', () => {
    expect(idsThat(isFlammable)).toEqual([
      'R-32', 'R-143a', 'R-152a', 'R-290', 'R-452B', 'R-454A', 'R-454B', 'R-454C', 'R-455A', 'R-600a', 'R-717', 'R-1234yf', 'R-1234ze(E)', 'R-1270',
    ])
  })
  it('what is of higher toxicity', () => {
    expect(idsThat(({ safetyClass }) => safetyClass.startsWith('B'))).toEqual(['R-123', 'R-245fa', 'R-514A', 'R-717'])
  })
})

describe('what the rules ask of a refrigerant', () => {
  it.each(['R-11', 'R-22', 'R-409A', 'R-502', 'R-290', 'R-514A', 'R-600a', 'R-717', 'R-744', 'R-1233zd(E)', 'R-1234yf', 'R-1234ze(E)', 'R-1270', 'R-1336mzz(Z)'])(
    '%s contains no regulated HFC (42 U.S.C. 7675(c)(1), from memory)', (id) => {
      expect(containsHfc(refrigerantOf(id))).toBe(false)
    })
  it.each(['R-32', 'R-410A', 'R-401A', 'R-408A', 'R-500', 'R-454B', 'R-513A', 'R-515B', 'R-508B', 'R-466A'])('%s contains one', (id) => {
    expect(containsHfc(refrigerantOf(id))).toBe(true)
  })
  it('the unsaturated ones (Regulation (EU) 2024/573, Annex II section 1, from memory)', () => {
    expect(idsThat(containsUnsaturated)).toEqual([
      'R-448A', 'R-449A', 'R-450A', 'R-452A', 'R-452B', 'R-454A', 'R-454B', 'R-454C', 'R-455A', 'R-513A', 'R-514A', 'R-515B',
      'R-1233zd(E)', 'R-1234yf', 'R-1234ze(E)', 'R-1336mzz(E)', 'R-1336mzz(Z)',
    ])
  })
})

describe('catalogue and saturation tables', () => {
  it('name the same refrigerants, with the same compositions, and call the same ones estimated', () => {
    expect(Object.keys(tables).sort()).toEqual(REFRIGERANTS.map(({ id }) => id).sort())
    for (const refrigerant of REFRIGERANTS) {
      const table = tables[refrigerant.id]
      const numbers = Object.fromEntries(Object.entries(refrigerant.composition).map(([component, share]) => [component, Number(share)]))
      expect([refrigerant.id, table?.kind]).toEqual([refrigerant.id, isBlend(refrigerant) ? 'blend' : 'pure'])
      if (isBlend(refrigerant)) expect([refrigerant.id, table?.composition]).toEqual([refrigerant.id, numbers])
      expect([refrigerant.id, table?.estimated ?? false]).toEqual([refrigerant.id, refrigerant.isEstimated ?? false])
    }
  })
  it('has no refrigerant twice and knows what it does not have', () => {
    expect(new Set(REFRIGERANTS.map(({ id }) => id)).size).toBe(REFRIGERANTS.length)
    expect(refrigerantById('R-999')).toBeNull()
    expect(() => refrigerantOf('R-999')).toThrow('R-999')
  })
  it('says of every kind of entry where it is from', () => {
    for (const { cite, basis } of Object.values(CATALOGUE_SOURCES)) {
      expect(cite).not.toBe('')
      expect(['read', 'memory']).toContain(basis)
    }
  })
  it('names where a GWP is from that the set itself does not list', () => {
    for (const component of Object.keys(AR4.added)) expect(AR4.values).toHaveProperty([component])
    for (const component of Object.keys(AR4.values).filter((each) => /^R-(1\d{3}|6\d\d|290|717)/.test(each))) expect(AR4.added).toHaveProperty([component])
  })
})
