import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { WirePartner } from '../../shared/api/cylinders'
import { everyPage, fieldsOf, send, trailOf } from '../support/answers'
import { aCustomer, aCylinder, aPartner } from '../support/builders'
import { aDraft } from '../support/drafts'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const draftOf = ({ name, kind, address, certificate }: WirePartner) => ({ name, kind, address, certificate })

describe('trade partners', () => {
  it('are listed each exactly once, narrowed to a kind and found by a word', async () => {
    const { officer } = await aCompany(server)
    for (const [name, kind] of [['A-Test Reclaim', 'reclaimer'], ['B-Test Destroyer', 'destroyer'], ['C-Test Supply', 'supplier'], ['D-Test Supply', 'supplier'], ['E-Test Reclaim', 'reclaimer']] as const)
      await aPartner(officer, { name, kind })
    const names = async (query: string) => (await everyPage<WirePartner>(officer, `/api/partners${query}`, 2)).map(({ name }) => name)
    expect(await names('')).toEqual(['A-Test Reclaim', 'B-Test Destroyer', 'C-Test Supply', 'D-Test Supply', 'E-Test Reclaim'])
    expect(await names('?sort=-name')).toEqual((await names('')).reverse())
    expect((await names('?sort=kind')).sort()).toEqual(await names(''))
    expect(await names('?kind=reclaimer')).toEqual(['A-Test Reclaim', 'E-Test Reclaim'])
    expect(await names('?search=d-test')).toEqual(['D-Test Supply'])
    expect(fieldsOf(await officer.get('/api/partners?kind=friend').expect(422))).toEqual(['kind'])
  })

  it('have an account of their kind from the first: gas can be bought from a supplier, not from a destroyer', async () => {
    const { officer } = await aCompany(server)
    const cylinder = await aCylinder(officer)
    const [supplier, destroyer] = [await aPartner(officer), await aPartner(officer, { kind: 'destroyer' })]
    await send(officer, aDraft({ kind: 'purchase', cylinderId: cylinder.id, partnerId: supplier.id })).expect(201)
    expect(fieldsOf(await send(officer, aDraft({ kind: 'purchase', cylinderId: cylinder.id, partnerId: destroyer.id })).expect(422))).toEqual(['partnerId'])
  })

  it('name every wrong field at once, and a name that is taken', async () => {
    const { officer } = await aCompany(server)
    expect(fieldsOf(await officer.post('/api/partners', { name: '', kind: 'friend', address: 'x'.repeat(501), certificate: null }).expect(422))).toEqual(['address', 'kind', 'name'])
    await aPartner(officer, { name: 'C-Test Supply' })
    expect((await officer.post('/api/partners', { name: 'c-test supply', kind: 'supplier', address: null, certificate: null }).expect(409)).body.code).toBe('name-taken')
  })

  it('are changed by version and keep their kind', async () => {
    const { officer } = await aCompany(server)
    const partner = await aPartner(officer)
    expect(fieldsOf(await officer.patch(`/api/partners/${partner.id}`, { ...draftOf(partner), kind: 'reclaimer' }, 1).expect(422))).toEqual(['kind'])
    const { body } = await officer.patch(`/api/partners/${partner.id}`, { ...draftOf(partner), certificate: 'RC-17' }, 1).expect(200)
    expect(body).toMatchObject({ certificate: 'RC-17', version: 2, may: ['partner.update'] })
    await officer.patch(`/api/partners/${partner.id}`, draftOf(partner), 1).expect(412)
    await officer.patch(`/api/partners/${partner.id}`, draftOf(partner)).expect(428)
    expect(await trailOf(officer, partner.id)).toMatchObject([{ action: 'create' }, { action: 'change', before: { certificate: null }, after: { certificate: 'RC-17' } }])
  })

  it('are the company’s own: hidden from owners, read by technicians, not there for others', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const partner = await aPartner(ours.officer)
    const owner = await ours.owner((await aCustomer(ours.officer)).id)
    for (const path of ['/api/partners', `/api/partners/${partner.id}`]) await owner.get(path).expect(403)
    await ours.technician.get(`/api/partners/${partner.id}`).expect(200)
    await ours.technician.patch(`/api/partners/${partner.id}`, draftOf(partner), 1).expect(403)
    await theirs.officer.get(`/api/partners/${partner.id}`).expect(404)
    await theirs.officer.patch(`/api/partners/${partner.id}`, draftOf(partner), 1).expect(404)
    expect((await theirs.officer.get('/api/partners')).body.rows).toEqual([])
  })
})
