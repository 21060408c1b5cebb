import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { CalculationDraft, VisitDraft, WireVisit } from '../../shared/api/places'
import { plainDate } from '../../shared/dates/plain-date'
import { everyPage, fieldsOf, send, trailOf } from '../support/answers'
import { aCircuit, aCylinder, aSite } from '../support/builders'
import { aDraft } from '../support/drafts'
import { aCompany, aServer, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const visitDraft = (siteId: string, given: Partial<VisitDraft> = {}): VisitDraft => ({ id: uuid(), siteId, visitedOn: plainDate('2026-11-20'), remark: null, ...given })
const aVisit = async (client: Client, siteId: string, given: Partial<VisitDraft> = {}): Promise<WireVisit> =>
  (await client.post('/api/visits', visitDraft(siteId, given)).expect(201)).body
const calculation = (given: Partial<CalculationDraft> = {}): CalculationDraft =>
  ({ id: uuid(), calculator: 'superheat', title: 'Superheat', lines: [{ label: 'Superheat', value: '10.2 °F' }], ...given })
const ids = (rows: { id: string }[]): string[] => rows.map(({ id }) => id)

describe('the list of visits', () => {
  it('gives each one exactly once, newest first, also where many fall on one day', async () => {
    const { officer, technician } = await aCompany(server)
    const site = await aSite(officer)
    const days = ['2026-11-18', '2026-11-20', '2026-11-20', '2026-11-20', '2026-11-19'] as const
    for (const day of days) await aVisit(technician, site.id, { visitedOn: plainDate(day) })
    const rows = await everyPage<WireVisit>(technician, '/api/visits', 2)
    expect(rows.map(({ visitedOn }) => visitedOn)).toEqual(['2026-11-20', '2026-11-20', '2026-11-20', '2026-11-19', '2026-11-18'])
    expect(new Set(ids(rows)).size).toBe(5)
    expect(ids(await everyPage<WireVisit>(technician, '/api/visits?sort=date', 2))).toEqual(ids(rows).reverse())
  })

  it('is narrowed to a site and to the circuits that were worked on', async () => {
    const { officer, technician } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const cylinder = await aCylinder(officer)
    const [visit, idle] = [await aVisit(technician, circuit.siteId), await aVisit(technician, circuit.siteId)]
    const elsewhere = await aVisit(technician, (await aSite(officer)).id)
    await send(officer, aDraft({ kind: 'opening-stock', pounds: '5', cylinderId: cylinder.id })).expect(201)
    await send(technician, aDraft({ kind: 'charge', cylinderId: cylinder.id, circuitId: circuit.id, visitId: visit.id, purpose: 'leak' })).expect(201)
    const found = async (query: string) => ids((await officer.get(`/api/visits?${query}`).expect(200)).body.rows)
    expect((await found(`siteId=${circuit.siteId}`)).sort()).toEqual([visit.id, idle.id].sort())
    expect(await found(`circuitId=${circuit.id}`)).toEqual([visit.id])
    expect(await found(`siteId=${elsewhere.siteId}`)).toEqual([elsewhere.id])
    expect((await officer.get(`/api/visits/${visit.id}`)).body.postingCount).toBe(1)
  })
})

describe('a visit', () => {
  it('is begun once, however often the device sends it, also at the same moment', async () => {
    const { officer, technician } = await aCompany(server)
    const site = await aSite(officer)
    const draft = visitDraft(site.id, { remark: 'Roof hatch is stiff' })
    const answers = await Promise.all([draft, draft, draft].map((each) => technician.post('/api/visits', each)))
    expect(answers.map(({ status }) => status)).toEqual([201, 201, 201])
    expect((await officer.get('/api/visits')).body.rows).toMatchObject([{ ...draft, siteName: site.name, personName: 'Test technician', postingCount: 0, calculations: [] }])
    expect(await trailOf(officer, draft.id)).toMatchObject([{ action: 'create', subject: 'visit' }])
  })

  it('keeps its id to its own site', async () => {
    const { officer, technician } = await aCompany(server)
    const [site, other] = [await aSite(officer), await aSite(officer)]
    const visit = await aVisit(technician, site.id)
    expect(fieldsOf(await technician.post('/api/visits', visitDraft(other.id, { id: visit.id })).expect(422))).toEqual(['id'])
  })

  it('names every wrong field at once, and a site of another company', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const bad = { id: '0', siteId: 'x', visitedOn: '20.11.2026', remark: 'x'.repeat(2001) }
    expect(fieldsOf(await ours.technician.post('/api/visits', bad).expect(422))).toEqual(['id', 'remark', 'siteId', 'visitedOn'])
    const foreign = await aSite(theirs.officer)
    for (const siteId of [foreign.id, uuid()]) expect(fieldsOf(await ours.technician.post('/api/visits', visitDraft(siteId)).expect(422))).toEqual(['siteId'])
  })

  it('takes the results of calculators, each once and each in one visit', async () => {
    const { officer, technician } = await aCompany(server)
    const site = await aSite(officer)
    const [visit, other] = [await aVisit(technician, site.id), await aVisit(technician, site.id)]
    const draft = calculation()
    const answers = await Promise.all([draft, draft].map((each) => technician.post(`/api/visits/${visit.id}/calculations`, each)))
    expect(answers.map(({ status }) => status)).toEqual([201, 201])
    expect((await officer.get(`/api/visits/${visit.id}`)).body.calculations).toMatchObject([{ ...draft, personName: 'Test technician' }])
    expect(fieldsOf(await technician.post(`/api/visits/${other.id}/calculations`, draft).expect(422))).toEqual(['id'])
    expect(fieldsOf(await technician.post(`/api/visits/${visit.id}/calculations`, { ...calculation(), id: 'x', title: '', lines: [{ label: '', value: 'x' }] }).expect(422))).toEqual(['id', 'lines.0.label', 'title'])
  })

  it('is seen by its own customer’s owner, written by technicians and officers', async () => {
    const { officer, technician, auditor, administrator, owner } = await aCompany(server)
    const [site, other] = [await aSite(officer), await aSite(officer)]
    const [visit, hidden] = [await aVisit(technician, site.id), await aVisit(officer, other.id)]
    const client = await owner(site.customerId)
    expect(ids((await client.get('/api/visits')).body.rows)).toEqual([visit.id])
    expect((await client.get(`/api/visits/${visit.id}`)).body).toMatchObject({ personName: 'Test technician', may: [] })
    await client.get(`/api/visits/${hidden.id}`).expect(404)
    for (const each of [client, auditor, administrator]) {
      await each.post('/api/visits', visitDraft(site.id)).expect(403)
      await each.post(`/api/visits/${visit.id}/calculations`, calculation()).expect(403)
    }
  })

  it('of another company is not there, and its id is free here', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const visit = await aVisit(theirs.technician, (await aSite(theirs.officer)).id)
    await ours.technician.get(`/api/visits/${visit.id}`).expect(404)
    await ours.technician.post(`/api/visits/${visit.id}/calculations`, calculation()).expect(404)
    await aVisit(ours.technician, (await aSite(ours.officer)).id, { id: visit.id })
  })
})
