import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { PostingDraft, WirePosting } from '../../shared/api/ledger'
import { lb, toKgText } from '../../shared/mass/mass'
import { sealCompany } from '../../server/modules/ledger/seal.service'
import { asAdmin } from '../support/database'
import { aDraft } from '../support/drafts'
import { aCircuitRow, aCylinderRow, aPartnerRow, aWorld } from '../support/rows'
import { aCompany, aServer, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const post = (client: Client, draft: PostingDraft) => client.post('/api/postings', draft).set('Idempotency-Key', draft.id)
const balanceOf = async (accountId: string): Promise<string> =>
  asAdmin(server.database, async (client) => String((await client.query('select coalesce(sum(mass_kg), 0)::text as kg from balance where account_id = $1', [accountId])).rows[0].kg))
const pounds = (text: string): string => toKgText(lb(text))
const sameKg = (a: string, b: string): boolean => Number(a) === Number(b)

/** A company with a filled cylinder of 30 lb R-22 and a full circuit of 60 lb. */
async function aStockedCompany() {
  const company = await aCompany(server)
  const world = await aWorld(server, company.id)
  const supplierId = await aPartnerRow(server, company.id)
  const cylinderId = await aCylinderRow(server, company.id)
  const circuitId = await aCircuitRow(server, world)
  await post(company.officer, aDraft({ kind: 'purchase', pounds: '30', cylinderId, partnerId: supplierId, on: '2026-01-05' })).expect(201)
  await post(company.officer, aDraft({ kind: 'opening-charge', pounds: '60', circuitId, on: '2026-01-05' })).expect(201)
  return { ...company, world, supplierId, cylinderId, circuitId }
}

describe('posting a charge', () => {
  it('moves mass from the cylinder to the circuit, and what it reveals as lost to the air', async () => {
    const { technician, cylinderId, circuitId } = await aStockedCompany()
    const draft = aDraft({ kind: 'charge', pounds: '12.5', cylinderId, circuitId, purpose: 'leak' })
    const { body } = await post(technician, draft).expect(201) as { body: WirePosting }
    expect(body.entries.map((entry) => [entry.accountKind, Number(entry.massKg)])).toEqual([
      ['cylinder', -Number(pounds('12.5'))], ['circuit', Number(pounds('12.5'))], ['circuit', -Number(pounds('12.5'))], ['air', Number(pounds('12.5'))],
    ])
    expect(sameKg(await balanceOf(cylinderId), pounds('17.5'))).toBe(true)
    expect(sameKg(await balanceOf(circuitId), pounds('60'))).toBe(true)
  })

  it('gives the first answer again to a repeat, and refuses the same id with other content', async () => {
    const { technician, cylinderId, circuitId } = await aStockedCompany()
    const draft = aDraft({ kind: 'charge', pounds: '2', cylinderId, circuitId, purpose: 'leak' })
    const first = await post(technician, draft).expect(201)
    const second = await post(technician, draft).expect(200)
    expect(second.body).toEqual(first.body)
    const other = await post(technician, { ...draft, massKg: pounds('3') }).expect(422)
    expect(other.body.code).toBe('posting-id-reused')
    expect(sameKg(await balanceOf(cylinderId), pounds('28'))).toBe(true)
  })

  it('posts once when the same charge arrives a hundred times at once', async () => {
    const { technician, cylinderId, circuitId } = await aStockedCompany()
    const draft = aDraft({ kind: 'charge', pounds: '1', cylinderId, circuitId, purpose: 'leak' })
    const answers = await Promise.all(Array.from({ length: 100 }, () => post(technician, draft)))
    expect(answers.filter((answer) => answer.status === 201)).toHaveLength(1)
    expect(answers.filter((answer) => answer.status === 200)).toHaveLength(99)
    expect(sameKg(await balanceOf(cylinderId), pounds('29'))).toBe(true)
  })

  it('lets fifty clients at one cylinder take what is in it and not an ounce more', async () => {
    const { technician, cylinderId, circuitId } = await aStockedCompany()
    const answers = await Promise.all(Array.from({ length: 50 }, () =>
      post(technician, aDraft({ kind: 'charge', pounds: '1', cylinderId, circuitId, purpose: 'leak' }))))
    expect(answers.filter((answer) => answer.status === 201)).toHaveLength(30)
    const refused = answers.filter((answer) => answer.status !== 201)
    expect(new Set(refused.map((answer) => answer.body.code))).toEqual(new Set(['cylinder-negative']))
    expect(Number(await balanceOf(cylinderId))).toBe(0)
  })

  it('needs its key, and names every wrong field at once', async () => {
    const { technician, cylinderId, circuitId } = await aStockedCompany()
    const draft = aDraft({ kind: 'charge', pounds: '1', cylinderId, circuitId })
    expect((await technician.post('/api/postings', draft)).body.code).toBe('idempotency-key-missing')
    const bad = { ...draft, massKg: '0', occurredOn: '2026-02-30', circuitId: 'x' }
    const { body } = await technician.post('/api/postings', bad).set('Idempotency-Key', draft.id).expect(422)
    expect(body.errors.map((error: { field: string }) => error.field).sort()).toEqual(['circuitId', 'massKg', 'occurredOn'])
  })
})

describe('refusals', () => {
  it('says how much still fits when a cylinder would be overfilled', async () => {
    // 0.8 × 47.6 lb × 1190.7 / 997.05 = 45.476 lb, worked by hand with the density rounded to a tenth; 30 lb are in it
    const { officer, cylinderId, supplierId } = await aStockedCompany()
    const { body } = await post(officer, aDraft({ kind: 'purchase', pounds: '16', cylinderId, partnerId: supplierId })).expect(422)
    expect(body.code).toBe('fill-limit-exceeded')
    expect(body.detail).toMatch(/may hold 45\.4[78] lb/)
    expect(body.detail).toMatch(/15\.4[78] lb .* still fit/)
  })

  it('refuses another refrigerant, a passed test date, and a refill of a disposable cylinder', async () => {
    const { technician, world, circuitId, cylinderId, id } = await aStockedCompany()
    const otherCircuit = await aCircuitRow(server, world, { refrigerant: 'R-410A' })
    const wrong = await post(technician, aDraft({ kind: 'charge', cylinderId, circuitId: otherCircuit }))
    expect(wrong.body.code).toBe('wrong-refrigerant')
    const late = await aCylinderRow(server, id, { kind: 'recovery', testDueOn: '2026-11-01' })
    expect((await post(technician, aDraft({ kind: 'recovery', cylinderId: late, circuitId }))).body.code).toBe('test-date-passed')
    const disposable = await aCylinderRow(server, id, { kind: 'disposable', waterCapacityPounds: null, testDueOn: null })
    expect((await post(technician, aDraft({ kind: 'recovery', cylinderId: disposable, circuitId }))).body.code).toBe('disposable-not-refillable')
  })

  it('refuses a foreign cylinder as if it were not there', async () => {
    const ours = await aStockedCompany()
    const theirs = await aStockedCompany()
    const { body } = await post(ours.technician, aDraft({ kind: 'charge', cylinderId: theirs.cylinderId, circuitId: ours.circuitId })).expect(422)
    expect(body.errors.map((error: { field: string }) => error.field)).toEqual(['cylinderId'])
    expect(sameKg(await balanceOf(theirs.cylinderId), pounds('30'))).toBe(true)
  })

  it('keeps stock to the officer, reversals to the officer, and everything from the auditor', async () => {
    const { technician, auditor, cylinderId, circuitId, supplierId } = await aStockedCompany()
    await post(technician, aDraft({ kind: 'purchase', cylinderId, partnerId: supplierId })).expect(403)
    const charged = await post(technician, aDraft({ kind: 'charge', cylinderId, circuitId })).expect(201)
    await post(technician, aDraft({ kind: 'reversal', reversesId: charged.body.id, reason: 'wrong scale' })).expect(403)
    await post(auditor, aDraft({ kind: 'charge', cylinderId, circuitId })).expect(403)
  })
})

describe('a reversal', () => {
  it('restores every balance, names its reason, and happens once', async () => {
    const { technician, officer, cylinderId, circuitId } = await aStockedCompany()
    const charged = await post(technician, aDraft({ kind: 'charge', pounds: '9.75', cylinderId, circuitId, purpose: 'leak' })).expect(201)
    await post(officer, aDraft({ kind: 'reversal', reversesId: charged.body.id, reason: ' ' })).expect(422)
    const reversal = aDraft({ kind: 'reversal', reversesId: charged.body.id, reason: 'The scale was not zeroed' })
    await post(officer, reversal).expect(201)
    await post(officer, reversal).expect(200)
    expect(sameKg(await balanceOf(cylinderId), pounds('30'))).toBe(true)
    expect(sameKg(await balanceOf(circuitId), pounds('60'))).toBe(true)
    const again = await post(officer, aDraft({ kind: 'reversal', reversesId: charged.body.id, reason: 'again' })).expect(422)
    expect(again.body.code).toBe('already-reversed')
    const { body } = await officer.get(`/api/postings/${charged.body.id}`).expect(200)
    expect(body.reversedById).toBe(reversal.id)
  })
})

describe('the seal over the ledger, and its check', () => {
  const check = async (company: { auditor: Client }) => (await company.auditor.get('/api/ledger/check').expect(200)).body
  const seal = (companyId: string) => server.house.database.inCompany({ companyId, customerIds: null }, (tx) => sealCompany(tx, companyId))
  /** A change that only a superuser with the triggers off can make. */
  const tamper = (sql: string, values: unknown[]) => asAdmin(server.database, async (client) => {
    await client.query('set session_replication_role = replica')
    await client.query(sql, values)
  })

  it('finds nothing wrong in an honest ledger', async () => {
    const company = await aStockedCompany()
    await post(company.technician, aDraft({ kind: 'charge', pounds: '3', cylinderId: company.cylinderId, circuitId: company.circuitId })).expect(201)
    await seal(company.id)
    expect(await check(company)).toMatchObject({ postings: 3, sealed: 3, waiting: 0, seals: 1, faults: [] })
  })

  it.each([
    ['a changed amount', 'update posting set mass_kg = mass_kg + 0.00000000000001 where id = $1', 'content-changed'],
    ['a changed person', 'update posting set person_id = gen_random_uuid() where id = $1', 'seal-broken'],
    ['a changed instant of recording', `update posting set recorded_at = recorded_at + interval '1 microsecond' where id = $1`, 'seal-broken'],
    ['a changed note', `update posting set note = 'x' where id = $1`, 'content-changed'],
    ['a changed entry', 'update entry set mass_kg = mass_kg * 2 where posting_id = $1 and line = 1', 'unbalanced'],
    ['a deleted posting', 'delete from posting where id = $1', 'posting-missing'],
    ['a seal taken off', 'delete from sealed_posting where posting_id = $1', 'posting-missing'],
    ['a changed balance', 'update balance set mass_kg = mass_kg + 1 where account_id = (select cylinder_id from posting where id = $1)', 'balance-differs'],
  ])('finds %s', async (_what, sql, code) => {
    const company = await aStockedCompany()
    const { body } = await post(company.technician, aDraft({ kind: 'charge', pounds: '3', cylinderId: company.cylinderId, circuitId: company.circuitId })).expect(201)
    await seal(company.id)
    await tamper(sql, [body.id])
    const { faults } = await check(company)
    expect(faults.map((fault: { code: string }) => fault.code)).toContain(code)
  })

  it('is refused to change by the database, whoever asks through the application', async () => {
    const company = await aStockedCompany()
    for (const sql of ['update posting set note = null', 'delete from entry', 'truncate seal', 'delete from posting'])
      await expect(server.house.database.inCompany({ companyId: company.id, customerIds: null }, (tx) => tx.query(sql))).rejects.toThrow(/permission denied|append-only/)
  })
})
