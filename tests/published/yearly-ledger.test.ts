import { parse } from 'csv-parse/sync'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PostingDraft } from '../../shared/api/ledger'
import { lb } from '../../shared/mass/mass'
import { Exact } from '../../shared/units/decimal'
import { aDraft } from '../support/drafts'
import { aCircuitRow, aCylinderRow, aPartnerRow, aWorld } from '../support/rows'
import { aCompany, aServer, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => {
  server = await aServer()
  server.setNow('2027-03-01T18:00:00Z')
})
afterAll(async () => { await server.close() })

type Given = Parameters<typeof aDraft>[0]
const COLUMNS = [
  'Opening stock', 'Bought', 'Recovered', 'Received', 'Transferred in', 'Opening stock entered in the year', 'Variance (scale minus book: minus is lost)',
  'Charged', 'Returned', 'Sent to reclaim', 'Destroyed', 'Transferred out', 'Closing stock',
]

async function aYear() {
  const company = await aCompany(server)
  const world = await aWorld(server, company.id)
  const post = async (given: Given): Promise<PostingDraft> => {
    const draft = aDraft(given)
    await company.officer.post('/api/postings', draft).set('Idempotency-Key', draft.id).expect(201)
    return draft
  }
  const reverse = (draft: PostingDraft, on: string): Promise<PostingDraft> => post({ kind: 'reversal', reversesId: draft.id, reason: 'Entered twice', on })
  const [a, b, d] = [await aCylinderRow(server, company.id), await aCylinderRow(server, company.id), await aCylinderRow(server, company.id)]
  const c = await aCylinderRow(server, company.id, { kind: 'recovery', contents: 'recovered' })
  const e = await aCylinderRow(server, company.id, { refrigerant: 'R-410A' })
  const [supplier, reclaimer, destroyer] = [await aPartnerRow(server, company.id), await aPartnerRow(server, company.id, 'reclaimer'), await aPartnerRow(server, company.id, 'destroyer')]
  const circuit = await aCircuitRow(server, world)
  await post({ kind: 'opening-charge', circuitId: circuit, pounds: '60', on: '2025-12-30' })
  await post({ kind: 'opening-stock', cylinderId: a, pounds: '20', on: '2025-12-31' })
  await post({ kind: 'purchase', cylinderId: a, partnerId: supplier, pounds: '15.25', on: '2026-01-01' })
  await post({ kind: 'receipt', cylinderId: a, partnerId: supplier, pounds: '2.5', on: '2026-02-01' })
  const charged = await post({ kind: 'charge', cylinderId: a, circuitId: circuit, pounds: '12.5', purpose: 'leak', on: '2026-03-01' })
  await reverse(await post({ kind: 'charge', cylinderId: a, circuitId: circuit, pounds: '3', purpose: 'leak', on: '2026-03-02' }), '2026-03-03')
  await post({ kind: 'transfer', cylinderId: a, toCylinderId: b, pounds: '5', on: '2026-04-01' })
  await reverse(await post({ kind: 'transfer', cylinderId: a, toCylinderId: b, pounds: '1', on: '2026-04-02' }), '2026-04-03')
  await post({ kind: 'variance', cylinderId: a, massKg: lb('-0.12').toFixed(), on: '2026-05-01' })
  await post({ kind: 'return', cylinderId: a, partnerId: supplier, pounds: '1.13', on: '2026-06-01' })
  await post({ kind: 'recovery', circuitId: circuit, cylinderId: c, pounds: '7.75', purpose: 'repair', isComplete: false, on: '2026-07-01' })
  await post({ kind: 'reclaim', cylinderId: c, partnerId: reclaimer, pounds: '4', on: '2026-08-01' })
  await post({ kind: 'destruction', cylinderId: c, partnerId: destroyer, pounds: '1.5', on: '2026-09-01' })
  await post({ kind: 'opening-stock', cylinderId: d, pounds: '8', on: '2026-10-01' })
  await post({ kind: 'purchase', cylinderId: e, partnerId: supplier, massKg: '4.5', refrigerant: 'R-410A', on: '2026-12-31' })
  await post({ kind: 'charge', cylinderId: a, circuitId: circuit, pounds: '2', purpose: 'leak', on: '2027-01-01' })
  await reverse(charged, '2027-02-01')
  return { ...company, numbers: numbersOf({ a, b, c, d, e }) }
}

/** As tests/support/rows.ts numbers its cylinders. */
const numbersOf = (ids: Record<string, string>): Record<string, string> =>
  Object.fromEntries(Object.entries(ids).map(([name, id]) => [name, `C-${id.slice(-8)}`]))

type Row = Record<string, string>
const ledgerOf = async (client: Client, year: number): Promise<Row[]> => {
  const { text } = await client.get(`/api/papers/cylinder-ledger.csv?year=${year}`).expect(200)
  return parse(text, { columns: true })
}
const pick = (row: Row | undefined, unit: 'kg' | 'lb'): string[] => COLUMNS.map((column) => row?.[`${column} [${unit}]`] ?? 'absent')
const of = (rows: Row[], cylinder: string | undefined): Row | undefined => rows.find((row) => row.Cylinder === cylinder)
const total = (rows: Row[], refrigerant: string): Row | undefined => rows.find((row) => row.Row === 'total' && row.Refrigerant === refrigerant)

describe('yearly cylinder ledger per refrigerant and cylinder: opening + in = out + closing to the last 0.01 lb; worked by hand', () => {
  it('puts each kind of posting into its column, and a reversal into the column of what it takes back', async () => {
    const { auditor, numbers } = await aYear()
    const rows = await ledgerOf(auditor, 2026)
    //                                            open     bought   recov.  recv.   t. in   entered variance charged  return  reclaim destr.  t. out  closing
    expect(pick(of(rows, numbers.a), 'lb')).toEqual(['20.00', '15.25', '0.00', '2.50', '0.00', '0.00', '-0.12', '12.50', '1.13', '0.00', '0.00', '5.00', '19.00'])
    expect(pick(of(rows, numbers.b), 'lb')).toEqual(['0.00', '0.00', '0.00', '0.00', '5.00', '0.00', '0.00', '0.00', '0.00', '0.00', '0.00', '0.00', '5.00'])
    expect(pick(of(rows, numbers.c), 'lb')).toEqual(['0.00', '0.00', '7.75', '0.00', '0.00', '0.00', '0.00', '0.00', '0.00', '4.00', '1.50', '0.00', '2.25'])
    expect(pick(of(rows, numbers.d), 'lb')).toEqual(['0.00', '0.00', '0.00', '0.00', '0.00', '8.00', '0.00', '0.00', '0.00', '0.00', '0.00', '0.00', '8.00'])
    expect(pick(total(rows, 'R-22'), 'lb')).toEqual(['20.00', '15.25', '7.75', '2.50', '5.00', '8.00', '-0.12', '12.50', '1.13', '4.00', '1.50', '5.00', '34.25'])
    expect(pick(total(rows, 'R-410A'), 'kg')).toEqual(['0', '4.5', '0', '0', '0', '0', '0', '0', '0', '0', '0', '0', '4.5'])
  })

  it('adds up exactly in kilograms, each row and each total', async () => {
    const { auditor } = await aYear()
    const rows = await ledgerOf(auditor, 2026)
    expect(rows).toHaveLength(7) // five cylinders and two totals
    for (const row of rows) {
      const masses = pick(row, 'kg').map((mass) => new Exact(mass))
      const sum = (part: Exact[]): Exact => part.reduce((all, mass) => all.plus(mass), new Exact(0))
      expect(sum(masses.slice(0, 7)).toFixed()).toBe(sum(masses.slice(7)).toFixed())
    }
    // 20 lb = 9.0718474 kg: 20 × 0.45359237
    expect(total(rows, 'R-22')?.['Opening stock [kg]']).toBe('9.0718474')
  })

  it('leaves a closed year as it was when one of its postings is taken back in the next', async () => {
    const { auditor, numbers } = await aYear()
    const rows = await ledgerOf(auditor, 2027)
    // 2.00 charged in 2027, 12.50 of 2026 taken back in 2027: 2.00 - 12.50; 19.00 + 10.50 left
    expect(pick(of(rows, numbers.a), 'lb')).toEqual(['19.00', '0.00', '0.00', '0.00', '0.00', '0.00', '0.00', '-10.50', '0.00', '0.00', '0.00', '0.00', '29.50'])
    expect(total(rows, 'R-22')?.['Opening stock [lb]']).toBe('34.25')
    expect(await ledgerOf(auditor, 2024)).toEqual([])
  })
})
