import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { WireCustomer } from '../../shared/api/places'
import { everyPage, fieldsOf, trailOf } from '../support/answers'
import { aCustomer, aSite, customerDraft } from '../support/builders'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const names = (rows: WireCustomer[]): string[] => rows.map(({ name }) => name)

describe('the list of customers', () => {
  it('gives each one exactly once, page by page, in both directions', async () => {
    const { officer } = await aCompany(server)
    for (let index = 0; index < 7; index++) await aCustomer(officer, { name: `Grocer ${index}` })
    const ascending = ['Grocer 0', 'Grocer 1', 'Grocer 2', 'Grocer 3', 'Grocer 4', 'Grocer 5', 'Grocer 6']
    expect(names(await everyPage<WireCustomer>(officer, '/api/customers', 3))).toEqual(ascending)
    expect(names(await everyPage<WireCustomer>(officer, '/api/customers?sort=-name', 2))).toEqual([...ascending].reverse())
  })

  it('finds by words in any column, in any order, and takes wildcards literally', async () => {
    const { officer } = await aCompany(server)
    await aCustomer(officer, { name: 'Quince Market', contactName: 'Wren Abel', address: '12 Pier Road' })
    await aCustomer(officer, { name: 'Reed Market' })
    const found = async (search: string) => names((await officer.get(`/api/customers?search=${encodeURIComponent(search)}`).expect(200)).body.rows)
    expect(await found('pier WREN')).toEqual(['Quince Market'])
    expect(await found('market')).toEqual(['Quince Market', 'Reed Market'])
    expect(await found('%')).toEqual([])
    expect(await found('Qui_ce')).toEqual([])
  })

  it('names a sort, a place or a length that it does not know', async () => {
    const { officer } = await aCompany(server)
    const cursor = (value: unknown) => Buffer.from(JSON.stringify(value)).toString('base64url')
    for (const [query, field] of [['sort=password', 'sort'], ['after=nowhere', 'after'], [`after=${cursor(['x', 'not an id'])}`, 'after'], ['limit=201', 'limit'], ['limit=0', 'limit']] as const)
      expect(fieldsOf(await officer.get(`/api/customers?${query}`).expect(422))).toEqual([field])
  })
})

describe('a customer', () => {
  it('is added with what was typed, trimmed, and noted in the trail', async () => {
    const { officer } = await aCompany(server)
    const draft = customerDraft({ name: '  Test Foods ', contactName: '', email: 'desk@test-foods.example', note: 'Key at the gate' })
    const { body, headers } = await officer.post('/api/customers', draft).expect(201)
    expect(body).toMatchObject({ name: 'Test Foods', contactName: null, email: 'desk@test-foods.example', note: 'Key at the gate', siteCount: 0, version: 1, may: ['customer.update'] })
    expect(headers.etag).toBe('"1"')
    expect(await trailOf(officer, body.id)).toMatchObject([{ action: 'create', subject: 'customer', before: null, after: { name: 'Test Foods' } }])
  })

  it('counts its sites', async () => {
    const { officer } = await aCompany(server)
    const customer = await aCustomer(officer)
    for (let index = 0; index < 2; index++) await aSite(officer, { customerId: customer.id })
    expect((await officer.get(`/api/customers/${customer.id}`).expect(200)).body.siteCount).toBe(2)
  })

  it('names every wrong field at once, and leaves nothing behind', async () => {
    const { officer } = await aCompany(server)
    const bad = { name: ' ', contactName: 'x'.repeat(121), email: 'nobody', phone: 5, address: 'a\0b', note: null, colour: 'red' }
    expect(fieldsOf(await officer.post('/api/customers', bad).expect(422))).toEqual(['address', 'colour', 'contactName', 'email', 'name', 'phone'])
    expect((await officer.get('/api/customers')).body.rows).toEqual([])
    expect((await officer.get('/api/trail')).body.rows).toEqual([])
  })

  it('has a name of its own within the company, whatever the case; another company may use it too', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    await aCustomer(ours.officer, { name: 'Test Store' })
    expect((await ours.officer.post('/api/customers', customerDraft({ name: 'TEST STORE' })).expect(409)).body.code).toBe('name-taken')
    await aCustomer(theirs.officer, { name: 'Test Store' })
  })

  it('names the field that is taken or too long', async () => {
    const { officer } = await aCompany(server)
    await aCustomer(officer, { name: 'Grocer' })
    const taken = await officer.post('/api/customers', customerDraft({ name: 'Grocer' })).expect(409)
    expect(taken.body).toMatchObject({ code: 'name-taken', errors: [{ field: 'name', message: 'This one is taken: choose another.' }] })
    const long = await officer.post('/api/customers', customerDraft({ name: 'x'.repeat(121) })).expect(422)
    expect(long.body.errors).toEqual([{ field: 'name', message: 'At most 120 characters.' }])
  })

  it('is changed by version: who comes second is told, and nothing of the first is lost', async () => {
    const { officer, administrator } = await aCompany(server)
    const customer = await aCustomer(officer)
    const changed = await officer.patch(`/api/customers/${customer.id}`, customerDraft({ name: 'First change' }), customer.version).expect(200)
    expect(changed.headers.etag).toBe('"2"')
    expect((await administrator.patch(`/api/customers/${customer.id}`, customerDraft({ name: 'Second change' }), customer.version).expect(412)).body.code).toBe('changed-meanwhile')
    expect((await administrator.patch(`/api/customers/${customer.id}`, customerDraft()).expect(428)).body.code).toBe('version-missing')
    expect((await officer.get(`/api/customers/${customer.id}`)).body.name).toBe('First change')
    expect(await trailOf(officer, customer.id)).toMatchObject([{ action: 'create' }, { action: 'change', before: { name: customer.name }, after: { name: 'First change' } }])
  })

  it('is changed by two at once for one of them only', async () => {
    const { officer, administrator } = await aCompany(server)
    const customer = await aCustomer(officer)
    const answers = await Promise.all([officer, administrator].map((client, index) => client.patch(`/api/customers/${customer.id}`, customerDraft({ name: `Change ${index}` }), customer.version)))
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 412])
  })

  it('is for the officer and the administrator to change, for nobody else', async () => {
    const { officer, administrator, technician, auditor, owner } = await aCompany(server)
    const customer = await aCustomer(officer)
    for (const client of [technician, auditor, await owner(customer.id)]) {
      await client.post('/api/customers', customerDraft()).expect(403)
      await client.patch(`/api/customers/${customer.id}`, customerDraft(), 1).expect(403)
      expect((await client.get(`/api/customers/${customer.id}`).expect(200)).body.may).toEqual([])
    }
    await administrator.post('/api/customers', customerDraft()).expect(201)
  })

  it('of another company, of another owner and of nowhere look alike', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const [own, other] = [await aCustomer(ours.officer), await aCustomer(ours.officer)]
    const foreign = await aCustomer(theirs.officer)
    const owner = await ours.owner(own.id)
    await owner.get(`/api/customers/${own.id}`).expect(200)
    const answers = await Promise.all([other.id, foreign.id, uuid(), 'no-id'].map((id) => owner.get(`/api/customers/${id}`)))
    for (const answer of answers) expect({ status: answer.status, code: answer.body.code }).toEqual({ status: 404, code: 'not-found' })
    expect(new Set(answers.slice(0, 3).map(({ body }) => body.detail)).size).toBe(1)
    expect((await owner.get('/api/customers')).body.rows.map(({ id }: WireCustomer) => id)).toEqual([own.id])
    await ours.officer.patch(`/api/customers/${foreign.id}`, customerDraft(), 1).expect(404)
  })

  it('is seen by its owner without the company’s own note', async () => {
    const { officer, owner } = await aCompany(server)
    const customer = await aCustomer(officer, { note: 'Pays late' })
    const client = await owner(customer.id)
    expect((await client.get(`/api/customers/${customer.id}`)).body.note).toBeNull()
    expect((await client.get('/api/customers')).body.rows[0].note).toBeNull()
  })
})
