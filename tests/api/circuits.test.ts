import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { CircuitDraft, CircuitStanding, FullChargeDraft, LeakDraft, VerificationDraft, WireCircuit, WireRate } from '../../shared/api/places'
import { plainDate } from '../../shared/dates/plain-date'
import { lb, toKgText } from '../../shared/mass/mass'
import { post as postInTransaction } from '../../server/modules/ledger/ledger.service'
import { everyPage, fieldsOf, send, trailOf } from '../support/answers'
import { aCircuit, aCylinder, aPartner, aSystem, circuitDraft } from '../support/builders'
import { asAdmin } from '../support/database'
import { aDraft } from '../support/drafts'
import { aCompany, aServer, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const pounds = (text: string): string => toKgText(lb(text))
const draftOf = ({ systemId, name, refrigerant, category, status, commissionedOn }: WireCircuit): Omit<CircuitDraft, 'fullCharge'> =>
  ({ systemId, name, refrigerant, category, status, commissionedOn })
const aFullCharge = (given: Partial<FullChargeDraft> = {}): FullChargeDraft =>
  ({ method: 'measured', massKg: pounds('64'), rangeLowKg: null, rangeHighKg: null, effectiveOn: plainDate('2026-01-01'), note: null, ...given })
const aLeak = (given: Partial<LeakDraft> = {}): LeakDraft =>
  ({ id: uuid(), componentId: null, foundOn: plainDate('2026-11-02'), cause: 'vibration-rub', method: 'electronic', position: 'Suction line', note: null, ...given })
const aTest = (given: Partial<VerificationDraft> = {}): VerificationDraft =>
  ({ id: uuid(), kind: 'initial', leakId: null, testedOn: plainDate('2026-11-04'), type: 'Bubbles', passed: true, showsAllRepaired: false, note: null, ...given })

/** A cylinder with 40 lb R-22 in it. */
async function stock(officer: Client) {
  const cylinder = await aCylinder(officer)
  const supplier = await aPartner(officer)
  await send(officer, aDraft({ kind: 'purchase', pounds: '40', cylinderId: cylinder.id, partnerId: supplier.id, on: '2026-06-01' })).expect(201)
  return cylinder
}
/** A circuit of 100 lb that was charged with some pounds on 22 August and 20 November 2026. */
async function aLeakingCircuit(officer: Client, cylinderId: string, last: string) {
  const circuit = await aCircuit(officer, { pounds: '100' })
  await send(officer, aDraft({ kind: 'opening-charge', pounds: '100', circuitId: circuit.id, on: '2026-08-01' })).expect(201)
  for (const [amount, on] of [['1', '2026-08-22'], [last, '2026-11-20']] as const)
    await send(officer, aDraft({ kind: 'charge', pounds: amount, cylinderId, circuitId: circuit.id, purpose: 'leak', on })).expect(201)
  return circuit
}

describe('the list of circuits', () => {
  it('leads from the worst to the best, each exactly once, however short the pages', async () => {
    const { officer } = await aCompany(server)
    const cylinder = await stock(officer)
    // 10, 6, 3, 2 of 100 lb after 90 days are 40.6, 24.3, 12.2 and 8.1 % against 10 %; worked by hand
    const made: string[] = []
    for (const amount of ['10', '6', '3', '2']) made.push((await aLeakingCircuit(officer, cylinder.id, amount)).id)
    const flat = await aCircuit(officer, { pounds: '100' })
    const mothballed = await aCircuit(officer, { pounds: '100', status: 'mothballed' })
    const expected = [...made.slice(0, 3), flat.id, made[3], mothballed.id]
    for (const limit of [1, 2, 4]) {
      const rows = await everyPage<CircuitStanding>(officer, '/api/circuits', limit)
      expect(rows.map(({ id }) => id)).toEqual(expected)
      expect(rows.map(({ standing }) => standing)).toEqual(['over', 'over', 'over', 'flat', 'near', 'none'])
    }
    expect((await everyPage<CircuitStanding>(officer, '/api/circuits?standing=over', 2)).map(({ id }) => id)).toEqual(made.slice(0, 3))
    expect((await everyPage<CircuitStanding>(officer, '/api/circuits?sort=rate', 2)).map(({ id }) => id).slice(-4)).toEqual([...made].reverse())
    for (const sort of ['name', '-name', 'site', '-site'])
      expect((await everyPage<CircuitStanding>(officer, `/api/circuits?sort=${sort}`, 2)).map(({ id }) => id).sort()).toEqual([...expected].sort())
  })

  it('is narrowed to a site and a system and found by tag and refrigerant', async () => {
    const { officer } = await aCompany(server)
    const system = await aSystem(officer, { tag: 'WC-1' })
    const circuit = await aCircuit(officer, { systemId: system.id, refrigerant: 'R-404A' })
    await aCircuit(officer)
    for (const query of [`siteId=${system.siteId}`, `systemId=${system.id}`, `customerId=${system.customerId}`, 'search=wc-1', 'search=404a'])
      expect((await officer.get(`/api/circuits?${query}`).expect(200)).body.rows.map(({ id }: CircuitStanding) => id)).toEqual([circuit.id])
    expect(fieldsOf(await officer.get('/api/circuits?standing=bad').expect(422))).toEqual(['standing'])
  })
})

describe('a circuit', () => {
  it('names every wrong field at once, down into its full charge', async () => {
    const { officer } = await aCompany(server)
    const bad = { ...circuitDraft(uuid()), name: '', refrigerant: 'R-0', status: 'gone', fullCharge: { ...aFullCharge(), massKg: '-1', effectiveOn: 'today' } }
    expect(fieldsOf(await officer.post('/api/circuits', bad).expect(422))).toEqual(['fullCharge.effectiveOn', 'fullCharge.massKg', 'name', 'refrigerant', 'status'])
    const foreign = await aSystem((await aCompany(server)).officer)
    for (const systemId of [foreign.id, uuid()]) expect(fieldsOf(await officer.post('/api/circuits', circuitDraft(systemId)).expect(422))).toEqual(['systemId'])
    expect((await officer.get('/api/circuits')).body.rows).toEqual([])
  })

  it('has a name of its own in its system, an account and a standing from the first', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aCircuit(officer, { name: 'Circuit 1' })
    expect(circuit).toMatchObject({ bookChargeKg: '0', fullChargeKg: pounds('60'), standing: 'flat', version: 1 })
    expect((await officer.post('/api/circuits', circuitDraft(circuit.systemId, { name: 'circuit 1' })).expect(409)).body.code).toBe('name-taken')
    await send(officer, aDraft({ kind: 'opening-charge', pounds: '60', circuitId: circuit.id })).expect(201)
    expect((await officer.get(`/api/circuits/${circuit.id}`)).body).toMatchObject({ bookChargeKg: pounds('60'), standing: 'none' })
  })

  it('is changed by version; its system stays, and so does its refrigerant once it has a ledger', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const { body } = await officer.patch(`/api/circuits/${circuit.id}`, { ...draftOf(circuit), refrigerant: 'R-407C' }, 1).expect(200)
    expect(body).toMatchObject({ refrigerant: 'R-407C', version: 2 })
    expect((await officer.patch(`/api/circuits/${circuit.id}`, draftOf(circuit), 1).expect(412)).body.code).toBe('changed-meanwhile')
    await send(officer, aDraft({ kind: 'opening-charge', refrigerant: 'R-407C', circuitId: circuit.id })).expect(201)
    const other = await aSystem(officer)
    expect(fieldsOf(await officer.patch(`/api/circuits/${circuit.id}`, { ...draftOf(circuit), systemId: other.id, refrigerant: 'R-22' }, 2).expect(422))).toEqual(['refrigerant', 'systemId'])
    expect(await trailOf(officer, circuit.id)).toMatchObject([{ action: 'create' }, { action: 'change', before: { refrigerant: 'R-22' }, after: { refrigerant: 'R-407C' } }])
  })

  it('is rated anew when its category or status changes', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aLeakingCircuit(officer, (await stock(officer)).id, '6')
    const change = async (given: Partial<CircuitDraft>, version: number) =>
      (await officer.patch(`/api/circuits/${circuit.id}`, { ...draftOf(circuit), ...given }, version).expect(200)).body
    // 24.33 % (worked by hand) against 30 % for industrial process refrigeration and 20 % for commercial, 40 CFR 82.157(c)(2)
    expect(await change({ category: 'industrial-process' }, 1)).toMatchObject({ standing: 'near', thresholdPercent: '30' })
    expect(await change({ category: 'commercial' }, 2)).toMatchObject({ standing: 'over', thresholdPercent: '20' })
    expect(await change({ category: 'commercial', status: 'retired' }, 3)).toMatchObject({ standing: 'none', ratePercent: null, roomKg: null })
  })

  it('is seen by its owner with nothing to change, by other owners and companies not at all', async () => {
    const { officer, technician, auditor, owner } = await aCompany(server)
    const [circuit, other] = [await aCircuit(officer), await aCircuit(officer)]
    const client = await owner(circuit.customerId)
    expect((await client.get(`/api/circuits/${circuit.id}`).expect(200)).body.may).toEqual([])
    expect((await client.get('/api/circuits')).body.rows.map(({ id }: CircuitStanding) => id)).toEqual([circuit.id])
    await client.get(`/api/circuits/${other.id}`).expect(404)
    await (await aCompany(server)).officer.get(`/api/circuits/${circuit.id}`).expect(404)
    for (const each of [client, technician, auditor]) {
      await each.patch(`/api/circuits/${circuit.id}`, draftOf(circuit), 1).expect(403)
      await each.post(`/api/circuits/${circuit.id}/full-charges`, aFullCharge()).expect(403)
    }
    expect((await technician.get(`/api/circuits/${circuit.id}`)).body.may).toEqual(['component.update', 'leak.update', 'posting.create'])
  })
})

describe('a full charge', () => {
  it('is revised beside the earlier ones, each with its method and who determined it', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const { body } = await officer.post(`/api/circuits/${circuit.id}/full-charges`, aFullCharge({ note: 'Weighed at recovery' })).expect(201) as { body: WireCircuit }
    expect(body.fullChargeKg).toBe(pounds('64'))
    expect(body.fullCharges.map(({ method, massKg, personName }) => [method, massKg, personName])).toEqual([['measured', pounds('64'), 'Test officer'], ['manufacturer', pounds('60'), 'Test officer']])
    expect((await trailOf(officer, circuit.id)).at(-1)).toMatchObject({ action: 'revise-full-charge', before: { fullChargeKg: pounds('60') }, after: { massKg: pounds('64') } })
  })

  it('of an established range is its midpoint, exact', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const range = aFullCharge({ method: 'range', massKg: null, rangeLowKg: pounds('50'), rangeHighKg: pounds('61') })
    // (50 + 61) / 2 = 55.5 lb × 0.45359237 kg = 25.174376535 kg, worked by hand
    expect((await officer.post(`/api/circuits/${circuit.id}/full-charges`, range).expect(201)).body.fullChargeKg).toBe('25.174376535')
    const refused = async (given: Partial<FullChargeDraft>) => fieldsOf(await officer.post(`/api/circuits/${circuit.id}/full-charges`, { ...range, ...given }).expect(422))
    expect(await refused({ rangeHighKg: pounds('49') })).toEqual(['rangeHighKg'])
    expect(await refused({ rangeLowKg: null, rangeHighKg: null })).toEqual(['rangeHighKg', 'rangeLowKg'])
    expect(await refused({ method: 'calculated' })).toEqual(['massKg'])
    const fullCharge = { ...range, rangeHighKg: null }
    expect(fieldsOf(await officer.post('/api/circuits', { ...circuitDraft(circuit.systemId), fullCharge }).expect(422))).toEqual(['fullCharge.rangeHighKg'])
    expect((await officer.get(`/api/circuits?systemId=${circuit.systemId}`)).body.rows).toHaveLength(1)
  })

  it('that is larger makes the rate of later additions smaller', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aLeakingCircuit(officer, (await stock(officer)).id, '10')
    const { body } = await officer.post(`/api/circuits/${circuit.id}/full-charges`, aFullCharge({ massKg: pounds('200') })).expect(201)
    expect(Number(body.ratePercent)).toBeCloseTo(20.2778, 4) // 10/200 × 365/90, worked by hand
  })

  it('revised while a charge is being posted leaves no addition unrated', async () => {
    const { id: companyId, officer } = await aCompany(server)
    const cylinder = await stock(officer)
    const circuit = await aLeakingCircuit(officer, cylinder.id, '2')
    const who = { companyId, customerIds: null, personId: officer.personId, sessionId: uuid(), name: '', email: '', role: 'officer', locale: 'en' } as const
    const charge = aDraft({ kind: 'charge', pounds: '3', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak', on: '2026-11-25' })
    const revised = await server.house.database.inCompany(who, async (tx) => {
      await postInTransaction(tx, who, charge, new Date())
      const answer = officer.post(`/api/circuits/${circuit.id}/full-charges`, aFullCharge()).then(({ status }) => status)
      // the revision has either come to the lock of the posting or gone past it; then the posting commits
      await Promise.race([answer, expect.poll(waitingStatements).toBeGreaterThan(0)])
      return { answer }
    })
    expect(await revised.answer).toBe(201)
    const { body } = await officer.get(`/api/circuits/${circuit.id}`).expect(200) as { body: WireCircuit }
    expect(body.rates.map((rate: WireRate) => rate.postingId)).toContain(charge.id)
    // 3 lb of 64 lb, 5 days after the addition before: 3/64 × 365/5 = 342.1875 %, worked by hand
    expect(body.ratePercent).toBe('342.1875')
  })
})

const waitingStatements = (): Promise<number> => asAdmin(server.database, async (client) =>
  Number((await client.query(`select count(*) from pg_stat_activity where datname = current_database() and wait_event_type = 'Lock'`)).rows[0].count))

describe('components and watch marks', () => {
  it('are set by the technician, and a mark shows at the sister circuits too', async () => {
    const { officer, technician } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const sister = await aCircuit(officer, { systemId: circuit.systemId })
    const { body: withCoil } = await technician.post(`/api/circuits/${circuit.id}/components`, { kind: 'condenser-coil', name: 'Coil 1', position: null }).expect(201) as { body: WireCircuit }
    const coil = withCoil.components[0]
    const { body: changed } = await technician.patch(`/api/components/${coil?.id}`, { kind: 'condenser-coil', name: 'Coil 1', position: 'North side' }).expect(200)
    expect(changed.components).toEqual([{ ...coil, position: 'North side' }])
    await technician.post(`/api/circuits/${circuit.id}/marks`, { componentId: coil?.id, text: 'U-bend rubs at the bracket', markedOn: '2026-11-10' }).expect(201)
    const { body: seen } = await technician.get(`/api/circuits/${sister.id}`).expect(200) as { body: WireCircuit }
    expect(seen.marks).toMatchObject([{ circuitId: circuit.id, componentName: 'Coil 1', text: 'U-bend rubs at the bracket', personName: 'Test technician', resolvedOn: null }])
    const mark = seen.marks[0]?.id ?? ''
    expect(fieldsOf(await technician.post(`/api/marks/${mark}/resolve`, { resolvedOn: '2026-11-09' }).expect(422))).toEqual(['resolvedOn'])
    expect((await technician.post(`/api/marks/${mark}/resolve`, { resolvedOn: '2026-11-20' }).expect(200)).body.marks[0].resolvedOn).toBe('2026-11-20')
    expect(await trailOf(officer, mark)).toMatchObject([{ action: 'create' }, { action: 'resolve', subjectName: 'U-bend rubs at the bracket', after: { resolvedOn: '2026-11-20' } }])
  })

  it('name what is wrong: a kind unknown, a component of another circuit, a date that is none', async () => {
    const { officer, technician } = await aCompany(server)
    const [circuit, other] = [await aCircuit(officer), await aCircuit(officer)]
    const elsewhere = (await technician.post(`/api/circuits/${other.id}/components`, { kind: 'condenser-coil', name: 'Coil', position: null }).expect(201)).body.components[0].id as string
    expect(fieldsOf(await technician.post(`/api/circuits/${circuit.id}/components`, { kind: 'wheel', name: '', position: null }).expect(422))).toEqual(['kind', 'name'])
    expect(fieldsOf(await technician.post(`/api/circuits/${circuit.id}/marks`, { componentId: elsewhere, text: 'x', markedOn: '2026-11-10' }).expect(422))).toEqual(['componentId'])
    expect(fieldsOf(await technician.post(`/api/circuits/${circuit.id}/marks`, { componentId: 'x', text: '', markedOn: '10.11.2026' }).expect(422))).toEqual(['componentId', 'markedOn', 'text'])
  })
})

describe('a leak and its tests', () => {
  it('is recorded once, however often it is sent, also at the same moment', async () => {
    const { officer, technician } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const [leak, test] = [aLeak(), aTest()]
    const sent = await Promise.all([leak, leak, leak].map((draft) => technician.post(`/api/circuits/${circuit.id}/leaks`, draft)))
    expect(sent.map(({ status }) => status)).toEqual([201, 201, 201])
    const tests = await Promise.all([test, test, test].map((draft) => technician.post(`/api/circuits/${circuit.id}/verifications`, draft)))
    expect(tests.map(({ status }) => status)).toEqual([201, 201, 201])
    const { body } = await technician.get(`/api/circuits/${circuit.id}`) as { body: WireCircuit }
    expect(body.leaks).toMatchObject([{ ...leak, personName: 'Test technician', repairedOn: null }])
    expect(body.verifications).toMatchObject([test])
    for (const { id } of [leak, test]) expect(await trailOf(officer, id)).toMatchObject([{ action: 'create' }])
  })

  it('keeps its id to its own circuit', async () => {
    const { officer, technician } = await aCompany(server)
    const [circuit, other] = [await aCircuit(officer), await aCircuit(officer)]
    const [leak, test] = [aLeak(), aTest()]
    await technician.post(`/api/circuits/${circuit.id}/leaks`, leak).expect(201)
    await technician.post(`/api/circuits/${circuit.id}/verifications`, test).expect(201)
    expect(fieldsOf(await technician.post(`/api/circuits/${other.id}/leaks`, leak).expect(422))).toEqual(['id'])
    expect(fieldsOf(await technician.post(`/api/circuits/${other.id}/verifications`, test).expect(422))).toEqual(['id'])
    expect((await technician.get(`/api/circuits/${other.id}`)).body).toMatchObject({ leaks: [], verifications: [] })
  })

  it('is repaired after it was found, not before', async () => {
    const { officer, technician } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const leak = aLeak()
    await technician.post(`/api/circuits/${circuit.id}/leaks`, leak).expect(201)
    expect(fieldsOf(await technician.post(`/api/leaks/${leak.id}/repair`, { repairedOn: '2026-11-01', repair: 'Brazed' }).expect(422))).toEqual(['repairedOn'])
    expect(fieldsOf(await technician.post(`/api/leaks/${leak.id}/repair`, { repairedOn: 'x', repair: '' }).expect(422))).toEqual(['repair', 'repairedOn'])
    expect((await technician.post(`/api/leaks/${leak.id}/repair`, { repairedOn: '2026-11-02', repair: 'Brazed' }).expect(200)).body.leaks[0]).toMatchObject({ repairedOn: '2026-11-02', repair: 'Brazed' })
  })

  it('names a leak of another circuit, and a failed test that would show all repaired', async () => {
    const { officer, technician } = await aCompany(server)
    const [circuit, other] = [await aCircuit(officer), await aCircuit(officer)]
    const leak = aLeak()
    await technician.post(`/api/circuits/${other.id}/leaks`, leak).expect(201)
    const refused = async (draft: object) => fieldsOf(await technician.post(`/api/circuits/${circuit.id}/verifications`, draft).expect(422))
    expect(await refused(aTest({ leakId: leak.id }))).toEqual(['leakId'])
    expect(await refused(aTest({ passed: false, showsAllRepaired: true }))).toEqual(['showsAllRepaired'])
    expect(await refused({ ...aTest(), id: 'x', kind: 'third', passed: 'yes' })).toEqual(['id', 'kind', 'passed'])
  })

  it('is not for the auditor or the owner to record', async () => {
    const { officer, auditor, owner } = await aCompany(server)
    const circuit = await aCircuit(officer)
    for (const each of [auditor, await owner(circuit.customerId)]) {
      await each.post(`/api/circuits/${circuit.id}/leaks`, aLeak()).expect(403)
      await each.post(`/api/circuits/${circuit.id}/verifications`, aTest()).expect(403)
      await each.post(`/api/circuits/${circuit.id}/components`, { kind: 'condenser-coil', name: 'Coil', position: null }).expect(403)
    }
  })

  it('followed by a passed test of all repairs begins the rolling window anew (40 CFR 82.152)', async () => {
    const { officer, technician } = await aCompany(server)
    const circuit = await aLeakingCircuit(officer, (await stock(officer)).id, '8')
    const { body: site } = await officer.get(`/api/sites/${circuit.siteId}`)
    const { id: _id, customerName: _n, systemCount: _s, circuitCount: _c, overCount: _o, nearCount: _near, flatCount: _f, version, may: _m, ...draft } = site
    await officer.patch(`/api/sites/${circuit.siteId}`, { ...draft, leakRateMethod: 'rolling' }, version).expect(200)
    expect((await officer.get(`/api/circuits/${circuit.id}`)).body.ratePercent).toBe('9') // (1 + 8)/100, worked by hand
    const test = aTest({ kind: 'follow-up', testedOn: plainDate('2026-09-15'), showsAllRepaired: true })
    const { body } = await technician.post(`/api/circuits/${circuit.id}/verifications`, test).expect(201)
    expect(body.ratePercent).toBe('8') // the pound of August lies before the test
  })
})
