import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { WireTrailRow } from '../../shared/api/ledger-check'
import { everyPage, fieldsOf } from '../support/answers'
import { aCustomer, aCylinder, aSite, customerDraft } from '../support/builders'
import { asAdmin } from '../support/database'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

describe('the trail', () => {
  it('tells who changed what, newest first, each exactly once', async () => {
    const { officer, administrator, auditor } = await aCompany(server)
    for (let index = 0; index < 3; index++) await aCustomer(officer, { name: `Grocer ${index}` })
    await aCylinder(administrator, { number: 'B-7' })
    const rows = await everyPage<WireTrailRow>(auditor, '/api/trail', 1)
    expect(rows.map(({ personName, action, subject, subjectName }) => [personName, action, subject, subjectName])).toEqual([
      ['Test administrator', 'create', 'cylinder', 'B-7'], ...[2, 1, 0].map((index) => ['Test officer', 'create', 'customer', `Grocer ${index}`]),
    ])
    expect((await everyPage<WireTrailRow>(auditor, '/api/trail?sort=at', 3)).map(({ id }) => id)).toEqual(rows.map(({ id }) => id).reverse())
    for (const row of rows) expect(Number.isNaN(Date.parse(row.at))).toBe(false)
  })

  it('is narrowed to a kind of record, to one record, and to words', async () => {
    const { officer } = await aCompany(server)
    const customer = await aCustomer(officer, { name: 'Quill Test' })
    const site = await aSite(officer, { customerId: customer.id })
    const subjects = async (query: string) => (await officer.get(`/api/trail?${query}`).expect(200)).body.rows.map(({ subjectId }: WireTrailRow) => subjectId)
    expect(await subjects('subject=site')).toEqual([site.id])
    expect(await subjects(`subjectId=${customer.id}`)).toEqual([customer.id])
    expect(await subjects('search=quill create')).toEqual([customer.id])
    expect(fieldsOf(await officer.get('/api/trail?subjectId=x&sort=name').expect(422))).toEqual(['subjectId'])
  })

  it('notes only what differs, and nothing where nothing does', async () => {
    const { officer } = await aCompany(server)
    const draft = customerDraft({ phone: '555-0100' })
    const { body } = await officer.post('/api/customers', draft).expect(201)
    await officer.patch(`/api/customers/${body.id}`, draft, 1).expect(200)
    await officer.patch(`/api/customers/${body.id}`, { ...draft, phone: null }, 2).expect(200)
    const [newest, ...older] = (await officer.get(`/api/trail?subjectId=${body.id}`)).body.rows as WireTrailRow[]
    expect(newest).toMatchObject({ action: 'change', before: { phone: '555-0100' }, after: { phone: null } })
    expect(older.map(({ action }) => action)).toEqual(['create'])
  })

  it('has nothing of a change that was refused', async () => {
    const { officer } = await aCompany(server)
    const [customer, other] = [await aCustomer(officer), await aCustomer(officer)]
    await officer.patch(`/api/customers/${customer.id}`, customerDraft({ name: other.name }), 1).expect(409)
    await officer.patch(`/api/customers/${customer.id}`, customerDraft(), 7).expect(412)
    expect((await officer.get(`/api/trail?subjectId=${customer.id}`)).body.rows).toHaveLength(1)
  })

  it('is read by officer, auditor and administrator; not by technician and owner, and never across companies', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const customer = await aCustomer(ours.officer)
    for (const client of [ours.officer, ours.auditor, ours.administrator]) expect((await client.get('/api/trail').expect(200)).body.rows).toHaveLength(1)
    for (const client of [ours.technician, await ours.owner(customer.id)]) await client.get('/api/trail').expect(403)
    expect((await theirs.auditor.get(`/api/trail?subjectId=${customer.id}`)).body.rows).toEqual([])
  })

  it('is changed by nobody, the owner of its table included', async () => {
    const { id: companyId, officer } = await aCompany(server)
    await aCustomer(officer)
    for (const sql of [`update trail set action = 'x'`, 'delete from trail', 'truncate trail']) {
      await expect(server.house.database.inCompany({ companyId, customerIds: null }, (tx) => tx.query(sql))).rejects.toThrow(/permission denied/)
      await expect(asAdmin(server.database, (client) => client.query(sql))).rejects.toThrow(/append-only/)
    }
  })
})
