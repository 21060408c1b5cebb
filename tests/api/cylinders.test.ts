import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { CylinderDraft, WireCylinder } from '../../shared/api/cylinders'
import { plainDate } from '../../shared/dates/plain-date'
import { kg, lb, toKgText } from '../../shared/mass/mass'
import { post as postInTransaction } from '../../server/modules/ledger/ledger.service'
import { everyPage, fieldsOf, send, trailOf } from '../support/answers'
import { aCustomer, aCylinder, aPartner, cylinderDraft } from '../support/builders'
import { asAdmin } from '../support/database'
import { aDraft } from '../support/drafts'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const pounds = (text: string): string => toKgText(lb(text))
const ids = (rows: { id: string }[]): string[] => rows.map(({ id }) => id)
const draftOf = (cylinder: WireCylinder): CylinderDraft => {
  const { number, kind, refrigerant, contents, tareKg, waterCapacityKg, testDueOn, status, holderId, place, ownerCustomerId } = cylinder
  return { number, kind, refrigerant, contents, tareKg, waterCapacityKg, testDueOn, status, holderId, place, ownerCustomerId }
}

describe('the list of cylinders', () => {
  it('gives each one exactly once, also those without a test date', async () => {
    const { officer } = await aCompany(server)
    for (const [number, testDueOn] of [['C-1', '2030-05-01'], ['C-2', null], ['C-3', '2027-05-01'], ['C-4', null], ['C-5', '2030-05-01']] as const)
      await aCylinder(officer, { number, testDueOn: testDueOn && plainDate(testDueOn) })
    const numbers = async (sort: string) => (await everyPage<WireCylinder>(officer, `/api/cylinders?sort=${sort}`, 2)).map(({ number }) => number)
    expect(await numbers('number')).toEqual(['C-1', 'C-2', 'C-3', 'C-4', 'C-5'])
    expect((await numbers('test'))[0]).toBe('C-3')
    expect((await numbers('test')).slice(3).sort()).toEqual(['C-2', 'C-4'])
    expect(await numbers('-test')).toEqual((await numbers('test')).reverse())
  })

  it('is narrowed to the holder, oneself by "me", to a refrigerant and a status', async () => {
    const { officer, technician } = await aCompany(server)
    const held = await aCylinder(officer, { holderId: technician.personId, place: null, refrigerant: 'R-410A' })
    const returned = await aCylinder(officer, { status: 'returned' })
    const found = async (query: string) => ids((await technician.get(`/api/cylinders?${query}`).expect(200)).body.rows)
    expect(await found('holderId=me')).toEqual([held.id])
    expect(await found(`holderId=${technician.personId}`)).toEqual([held.id])
    expect(await found('refrigerant=R-410A')).toEqual([held.id])
    expect(await found('status=returned')).toEqual([returned.id])
    expect(await found('search=test technician')).toEqual([held.id])
    expect(held.holderName).toBe('Test technician')
    expect(fieldsOf(await technician.get('/api/cylinders?refrigerant=R-0&status=lost').expect(422))).toEqual(['refrigerant', 'status'])
  })
})

describe('a cylinder', () => {
  it('has a fill limit from its water capacity, and what it holds by the book', async () => {
    const { officer } = await aCompany(server)
    const cylinder = await aCylinder(officer)
    // 0.8 × 47.6 lb × 1190.7 / 997.05 = 45.476 lb, worked by hand with the liquid density of R-22 at 77 °F rounded to a tenth
    expect(kg(cylinder.fillLimitKg ?? '0').dividedBy('0.45359237').toNumber()).toBeCloseTo(45.476, 2)
    expect(cylinder).toMatchObject({ contentKg: '0', isPastTest: false, version: 1 })
    const supplier = await aPartner(officer)
    await send(officer, aDraft({ kind: 'purchase', pounds: '30', cylinderId: cylinder.id, partnerId: supplier.id })).expect(201)
    expect((await officer.get(`/api/cylinders/${cylinder.id}`)).body.contentKg).toBe(pounds('30'))
    const disposable = await aCylinder(officer, { kind: 'disposable', waterCapacityKg: null, testDueOn: null })
    expect(disposable).toMatchObject({ fillLimitKg: null, isPastTest: false })
  })

  it('is past its test from the day after', async () => {
    const { officer } = await aCompany(server)
    const cylinder = await aCylinder(officer, { testDueOn: plainDate('2027-03-10') })
    const isPastOn = async (today: string): Promise<boolean> => {
      server.setNow(`${today}T12:00:00Z`)
      return (await officer.get(`/api/cylinders/${cylinder.id}`).expect(200)).body.isPastTest as boolean
    }
    try {
      expect(await isPastOn('2027-03-10')).toBe(false)
      expect(await isPastOn('2027-03-11')).toBe(true)
    } finally {
      server.setNow(null)
    }
  })

  it('names every wrong field at once, and every stranger among the ids', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const bad = { ...cylinderDraft(), number: '', kind: 'box', refrigerant: 'R-0', contents: 'air', tareKg: '-1', waterCapacityKg: '0', testDueOn: '2026-13-01', status: 'lost' }
    expect(fieldsOf(await ours.officer.post('/api/cylinders', bad).expect(422))).toEqual(['contents', 'kind', 'number', 'refrigerant', 'status', 'tareKg', 'testDueOn', 'waterCapacityKg'])
    const foreign = cylinderDraft({ holderId: theirs.technician.personId, ownerCustomerId: (await aCustomer(theirs.officer)).id, waterCapacityKg: null })
    expect(fieldsOf(await ours.officer.post('/api/cylinders', foreign).expect(422))).toEqual(['holderId', 'ownerCustomerId', 'waterCapacityKg'])
    expect(fieldsOf(await ours.officer.post('/api/cylinders', cylinderDraft({ kind: 'disposable', contents: 'recovered' })).expect(422))).toEqual(['contents'])
    expect((await ours.officer.get('/api/cylinders')).body.rows).toEqual([])
  })

  it('has a number of its own within the company', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    await aCylinder(ours.officer, { number: 'B-100' })
    expect((await ours.officer.post('/api/cylinders', cylinderDraft({ number: 'b-100' })).expect(409)).body.code).toBe('name-taken')
    await aCylinder(theirs.officer, { number: 'B-100' })
  })

  it('is changed by version, with what was before in the trail', async () => {
    const { officer, technician } = await aCompany(server)
    const cylinder = await aCylinder(officer)
    const { body } = await officer.patch(`/api/cylinders/${cylinder.id}`, { ...draftOf(cylinder), holderId: technician.personId }, 1).expect(200)
    expect(body).toMatchObject({ holderId: technician.personId, holderName: 'Test technician', version: 2 })
    expect((await officer.patch(`/api/cylinders/${cylinder.id}`, draftOf(cylinder), 1).expect(412)).body.code).toBe('changed-meanwhile')
    expect(await trailOf(officer, cylinder.id)).toMatchObject([{ action: 'create' }, { action: 'change', before: { holderId: null }, after: { holderId: technician.personId } }])
  })

  it('keeps its refrigerant once it has a ledger, and is not scrapped with gas in it', async () => {
    const { officer } = await aCompany(server)
    const cylinder = await aCylinder(officer)
    await officer.patch(`/api/cylinders/${cylinder.id}`, { ...draftOf(cylinder), refrigerant: 'R-407C' }, 1).expect(200)
    await send(officer, aDraft({ kind: 'opening-stock', refrigerant: 'R-407C', pounds: '5', cylinderId: cylinder.id })).expect(201)
    const refused = await officer.patch(`/api/cylinders/${cylinder.id}`, { ...draftOf(cylinder), refrigerant: 'R-22', status: 'scrapped' }, 2).expect(422)
    expect(fieldsOf(refused)).toEqual(['refrigerant', 'status'])
    await send(officer, aDraft({ kind: 'variance', refrigerant: 'R-407C', massKg: `-${pounds('5')}`, cylinderId: cylinder.id, note: 'Empty on the scale' })).expect(201)
    await officer.patch(`/api/cylinders/${cylinder.id}`, { ...draftOf(cylinder), refrigerant: 'R-407C', status: 'scrapped' }, 2).expect(200)
  })

  it('is not scrapped while gas is being posted into it', async () => {
    const { id: companyId, officer } = await aCompany(server)
    const cylinder = await aCylinder(officer)
    const supplier = await aPartner(officer)
    const who = { companyId, customerIds: null, personId: officer.personId, sessionId: uuid(), name: '', email: '', role: 'officer', locale: 'en' } as const
    const { answer } = await server.house.database.inCompany(who, async (tx) => {
      await postInTransaction(tx, who, aDraft({ kind: 'purchase', pounds: '10', cylinderId: cylinder.id, partnerId: supplier.id }), new Date())
      const change = officer.patch(`/api/cylinders/${cylinder.id}`, { ...draftOf(cylinder), status: 'scrapped' }, 1).then((response) => response)
      await Promise.race([change, expect.poll(waitingStatements).toBeGreaterThan(0)])
      return { answer: change }
    })
    expect(fieldsOf(await answer)).toEqual(['status'])
  })

  it('is read by the company’s own people and changed by the officer and the administrator', async () => {
    const { officer, administrator, technician, auditor, owner } = await aCompany(server)
    const customer = await aCustomer(officer)
    const cylinder = await aCylinder(officer, { ownerCustomerId: customer.id })
    for (const client of [technician, auditor]) {
      await client.get(`/api/cylinders/${cylinder.id}`).expect(200)
      await client.patch(`/api/cylinders/${cylinder.id}`, draftOf(cylinder), 1).expect(403)
      await client.post('/api/cylinders', cylinderDraft()).expect(403)
    }
    const client = await owner(customer.id)
    for (const path of ['/api/cylinders', `/api/cylinders/${cylinder.id}`]) await client.get(path).expect(403)
    await administrator.patch(`/api/cylinders/${cylinder.id}`, draftOf(cylinder), 1).expect(200)
  })

  it('of another company is not there', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const cylinder = await aCylinder(theirs.officer)
    await ours.officer.get(`/api/cylinders/${cylinder.id}`).expect(404)
    await ours.officer.patch(`/api/cylinders/${cylinder.id}`, draftOf(cylinder), 1).expect(404)
    expect((await ours.officer.get('/api/cylinders')).body.rows).toEqual([])
  })
})

const waitingStatements = (): Promise<number> => asAdmin(server.database, async (client) =>
  Number((await client.query(`select count(*) from pg_stat_activity where datname = current_database() and wait_event_type = 'Lock'`)).rows[0].count))
