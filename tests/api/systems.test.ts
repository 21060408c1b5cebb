import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { SystemDraft, WireSystem } from '../../shared/api/places'
import { everyPage, fieldsOf, trailOf } from '../support/answers'
import { aCircuit, aSite, aSystem, systemDraft } from '../support/builders'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const draftOf = (system: WireSystem): SystemDraft => {
  const { siteId, tag, name, location, maker, model, serial, category, installedOn, subsectorDecision, subsectorDecidedBy, subsectorReason } = system
  return { siteId, tag, name, location, maker, model, serial, category, installedOn, subsectorDecision, subsectorDecidedBy, subsectorReason }
}

describe('the list of systems', () => {
  it('gives each one exactly once, with its own circuits', async () => {
    const { officer } = await aCompany(server)
    const site = await aSite(officer)
    for (let index = 0; index < 5; index++) {
      const system = await aSystem(officer, { siteId: site.id, tag: `RTU-${index}` })
      for (const name of ['Circuit 1', 'Circuit 2'].slice(0, index % 3)) await aCircuit(officer, { systemId: system.id, name })
    }
    const rows = await everyPage<WireSystem>(officer, '/api/systems', 2)
    expect(rows.map(({ tag, circuits }) => [tag, circuits.map(({ name }) => name)])).toEqual([
      ['RTU-0', []], ['RTU-1', ['Circuit 1']], ['RTU-2', ['Circuit 1', 'Circuit 2']], ['RTU-3', []], ['RTU-4', ['Circuit 1']],
    ])
    expect((await everyPage<WireSystem>(officer, '/api/systems?sort=-site', 2)).map(({ id }) => id).sort()).toEqual(rows.map(({ id }) => id).sort())
  })

  it('is narrowed to a site and found by tag, maker and serial number', async () => {
    const { officer } = await aCompany(server)
    const system = await aSystem(officer, { tag: 'CH-7', maker: 'Testmaker', serial: 'SN-4711' })
    await aSystem(officer)
    const tags = async (query: string) => (await officer.get(`/api/systems?${query}`).expect(200)).body.rows.map(({ tag }: WireSystem) => tag)
    expect(await tags(`siteId=${system.siteId}`)).toEqual(['CH-7'])
    expect(await tags('search=4711 testmaker')).toEqual(['CH-7'])
    expect(fieldsOf(await officer.get('/api/systems?siteId=x').expect(422))).toEqual(['siteId'])
  })
})

describe('a system', () => {
  it('names every wrong field at once', async () => {
    const { officer } = await aCompany(server)
    const bad = { ...systemDraft(uuid()), tag: '', category: 'domestic', installedOn: '2026-02-30', subsectorDecision: 'perhaps' }
    expect(fieldsOf(await officer.post('/api/systems', bad).expect(422))).toEqual(['category', 'installedOn', 'subsectorDecision', 'tag'])
  })

  it('stands at a site of this company, with a tag of its own there', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const foreign = await aSite(theirs.officer)
    for (const siteId of [foreign.id, uuid()]) expect(fieldsOf(await ours.officer.post('/api/systems', systemDraft(siteId)).expect(422))).toEqual(['siteId'])
    const system = await aSystem(ours.officer, { tag: 'RTU-1' })
    expect((await ours.officer.post('/api/systems', systemDraft(system.siteId, { tag: 'rtu-1' })).expect(409)).body.code).toBe('name-taken')
    expect((await aSystem(ours.officer, { tag: 'RTU-1' })).siteId).not.toBe(system.siteId)
  })

  it('stays at its site, and is changed by version', async () => {
    const { officer } = await aCompany(server)
    const system = await aSystem(officer)
    const elsewhere = await aSite(officer)
    expect(fieldsOf(await officer.patch(`/api/systems/${system.id}`, { ...draftOf(system), siteId: elsewhere.id }, 1).expect(422))).toEqual(['siteId'])
    const { body } = await officer.patch(`/api/systems/${system.id}`, { ...draftOf(system), location: 'Yard' }, 1).expect(200)
    expect(body).toMatchObject({ location: 'Yard', version: 2, may: ['system.update', 'circuit.update'] })
    expect((await officer.patch(`/api/systems/${system.id}`, draftOf(system), 1).expect(412)).body.code).toBe('changed-meanwhile')
    expect(await trailOf(officer, system.id)).toMatchObject([{ action: 'create' }, { action: 'change', before: { location: 'Roof' }, after: { location: 'Yard' } }])
  })

  it('asks who decided a subsector exception and why; the decision then settles which rules hold (40 CFR 84.106)', async () => {
    const { officer } = await aCompany(server)
    const system = await aSystem(officer)
    const circuit = await aCircuit(officer, { systemId: system.id, refrigerant: 'R-410A', pounds: '20' })
    const decided: SystemDraft = { ...draftOf(system), subsectorDecision: 'not-excepted' }
    expect(fieldsOf(await officer.patch(`/api/systems/${system.id}`, decided, 1).expect(422))).toEqual(['subsectorDecidedBy', 'subsectorReason'])
    const packs = async () => (await officer.get(`/api/circuits/${circuit.id}`)).body.packs.map(({ packId, applies }: { packId: string; applies: string }) => [packId, applies])
    expect(await packs()).toEqual([['us-ods', 'no'], ['us-hfc', 'undecided']])
    await officer.patch(`/api/systems/${system.id}`, { ...decided, subsectorDecidedBy: 'Ida Wren, owner', subsectorReason: 'Serves a food plant' }, 1).expect(200)
    expect(await packs()).toEqual([['us-ods', 'no'], ['us-hfc', 'yes']])
  })

  it('is seen by its own customer’s owner and is changed by none of the others', async () => {
    const { officer, technician, auditor, owner } = await aCompany(server)
    const [system, other] = [await aSystem(officer), await aSystem(officer)]
    const client = await owner(system.customerId)
    expect((await client.get('/api/systems')).body.rows.map(({ id }: WireSystem) => id)).toEqual([system.id])
    await client.get(`/api/systems/${other.id}`).expect(404)
    for (const each of [client, technician, auditor]) await each.patch(`/api/systems/${system.id}`, draftOf(system), 1).expect(403)
  })

  it('of another company is not there', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const system = await aSystem(theirs.officer)
    await ours.officer.get(`/api/systems/${system.id}`).expect(404)
    await ours.officer.patch(`/api/systems/${system.id}`, draftOf(system), 1).expect(404)
    expect((await ours.officer.get(`/api/systems?siteId=${system.siteId}`)).body.rows).toEqual([])
  })
})
