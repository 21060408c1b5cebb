import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { SiteDraft, WireSite } from '../../shared/api/places'
import { everyPage, fieldsOf, send, trailOf } from '../support/answers'
import { aCircuit, aCustomer, aCylinder, aPartner, aSite, aSystem, siteDraft } from '../support/builders'
import { aDraft } from '../support/drafts'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const ids = (rows: { id: string }[]): string[] => rows.map(({ id }) => id)
/** The draft of a site as it stands, to change one thing of it. */
const draftOf = (site: WireSite): SiteDraft => {
  const { customerId, name, street, city, region, postalCode, country, timeZone, elevationM, jurisdiction, leakRateMethod, rulePacks } = site
  return { customerId, name, street, city, region, postalCode, country, timeZone, elevationM, jurisdiction, leakRateMethod, rulePacks }
}

describe('the list of sites', () => {
  it('gives each one exactly once, also where many share one city', async () => {
    const { officer } = await aCompany(server)
    const customer = await aCustomer(officer)
    const made: string[] = []
    for (let index = 0; index < 5; index++) made.push((await aSite(officer, { customerId: customer.id, city: index === 4 ? 'Alderby' : 'Testville' })).id)
    const seen = ids(await everyPage(officer, '/api/sites?sort=city', 2))
    expect(seen[0]).toBe(made[4])
    expect([...seen].sort()).toEqual([...made].sort())
    expect(ids(await everyPage(officer, '/api/sites?sort=-city', 2))).toEqual([...seen].reverse())
  })

  it('is narrowed to a customer and found by city and customer name', async () => {
    const { officer } = await aCompany(server)
    const [first, second] = [await aCustomer(officer, { name: 'Quill Test' }), await aCustomer(officer)]
    const [a, b] = [await aSite(officer, { customerId: first.id, city: 'Fernby' }), await aSite(officer, { customerId: second.id })]
    expect(ids((await officer.get(`/api/sites?customerId=${second.id}`)).body.rows)).toEqual([b.id])
    expect(ids((await officer.get('/api/sites?search=fernby quill')).body.rows)).toEqual([a.id])
  })
})

describe('a site', () => {
  it('names every wrong field at once, a customer of another company among them', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const bad = { ...siteDraft(uuid()), timeZone: 'Mars/Olympus', country: 'usa', elevationM: 1.5, rulePacks: ['no-such-pack'], leakRateMethod: 'guessing', surprise: 1 }
    expect(fieldsOf(await ours.officer.post('/api/sites', bad).expect(422))).toEqual(['country', 'elevationM', 'leakRateMethod', 'rulePacks', 'surprise', 'timeZone'])
    expect(fieldsOf(await ours.officer.post('/api/sites', { ...siteDraft(uuid()), country: 'XX' }).expect(422))).toContain('country')
    const foreign = await aCustomer(theirs.officer)
    for (const customerId of [uuid(), foreign.id]) expect(fieldsOf(await ours.officer.post('/api/sites', siteDraft(customerId)).expect(422))).toEqual(['customerId'])
    expect((await ours.officer.get('/api/sites')).body.rows).toEqual([])
  })

  it('stays with its customer, and is changed by version', async () => {
    const { officer } = await aCompany(server)
    const site = await aSite(officer)
    const other = await aCustomer(officer)
    expect(fieldsOf(await officer.patch(`/api/sites/${site.id}`, { ...draftOf(site), customerId: other.id }, site.version).expect(422))).toEqual(['customerId'])
    const { body } = await officer.patch(`/api/sites/${site.id}`, { ...draftOf(site), city: 'Newtown' }, site.version).expect(200)
    expect(body).toMatchObject({ city: 'Newtown', version: 2, may: ['site.update', 'system.update'] })
    await officer.patch(`/api/sites/${site.id}`, { ...draftOf(site), city: 'Oldtown' }, site.version).expect(412)
    expect(await trailOf(officer, site.id)).toMatchObject([{ action: 'create' }, { action: 'change', before: { city: 'Testville' }, after: { city: 'Newtown' } }])
  })

  it('rates all its circuits anew by the method and the packs it is given', async () => {
    const { officer } = await aCompany(server)
    const site = await aSite(officer)
    const system = await aSystem(officer, { siteId: site.id })
    const circuit = await aCircuit(officer, { systemId: system.id, pounds: '100' })
    const cylinder = await aCylinder(officer)
    const supplier = await aPartner(officer)
    await send(officer, aDraft({ kind: 'purchase', pounds: '20', cylinderId: cylinder.id, partnerId: supplier.id, on: '2026-08-01' })).expect(201)
    await send(officer, aDraft({ kind: 'opening-charge', pounds: '100', circuitId: circuit.id, on: '2026-08-01' })).expect(201)
    for (const [pounds, on] of [['1', '2026-08-22'], ['8', '2026-11-20']] as const)
      await send(officer, aDraft({ kind: 'charge', pounds, cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak', on })).expect(201)
    const standing = async () => (await officer.get(`/api/circuits/${circuit.id}`).expect(200)).body as { ratePercent: string; standing: string; thresholdPercent: string | null }
    const counts = async () => (await officer.get(`/api/sites/${site.id}`).expect(200)).body as WireSite

    // annualizing: 8 lb of 100 lb, 90 days after the last addition: 8/100 × 365/90 = 32.4444 %, above 10 %; worked by hand
    expect(Number((await standing()).ratePercent)).toBeCloseTo(32.4444, 4)
    expect(await counts()).toMatchObject({ systemCount: 1, circuitCount: 1, overCount: 1, nearCount: 0 })

    // rolling: 1 lb and 8 lb within 365 days: 9 % of the charge, not above 10 % and over 70 % of it; worked by hand
    await officer.patch(`/api/sites/${site.id}`, { ...draftOf(site), leakRateMethod: 'rolling' }, 1).expect(200)
    expect(await standing()).toMatchObject({ ratePercent: '9', standing: 'near' })
    expect(await counts()).toMatchObject({ overCount: 0, nearCount: 1 })

    await officer.patch(`/api/sites/${site.id}`, { ...draftOf(site), leakRateMethod: 'rolling', rulePacks: [] }, 2).expect(200)
    expect(await standing()).toMatchObject({ ratePercent: '9', standing: 'none', thresholdPercent: null })
  })

  it('is seen by its owner and changed by none of the others', async () => {
    const { officer, technician, auditor, owner } = await aCompany(server)
    const [site, other] = [await aSite(officer), await aSite(officer)]
    const client = await owner(site.customerId)
    expect(ids((await client.get('/api/sites')).body.rows)).toEqual([site.id])
    expect(ids((await client.get(`/api/sites?customerId=${other.customerId}`)).body.rows)).toEqual([])
    await client.get(`/api/sites/${other.id}`).expect(404)
    for (const each of [client, technician, auditor]) {
      await each.patch(`/api/sites/${site.id}`, draftOf(site), site.version).expect(403)
      expect((await each.get(`/api/sites/${site.id}`).expect(200)).body.may).toEqual([])
    }
  })

  it('of another company is not there, neither to read nor to change', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const site = await aSite(theirs.officer)
    await ours.officer.get(`/api/sites/${site.id}`).expect(404)
    await ours.officer.patch(`/api/sites/${site.id}`, draftOf(site), site.version).expect(404)
    expect((await ours.officer.get(`/api/sites?customerId=${site.customerId}`)).body.rows).toEqual([])
  })
})
