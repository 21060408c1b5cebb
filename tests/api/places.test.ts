import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { WireCustomer } from '../../shared/api/places'
import type { Page } from '../../shared/api/page'
import { lb, toKgText } from '../../shared/mass/mass'
import { aDraft } from '../support/drafts'
import { aCircuit, aCustomer, aCylinder, aPartner, aSite, aSystem, circuitDraft, customerDraft, siteDraft, systemDraft } from '../support/builders'
import { aCompany, aServer, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const post = (client: Client, draft: ReturnType<typeof aDraft>) => client.post('/api/postings', draft).set('Idempotency-Key', draft.id)
const fieldsOf = (body: { errors: { field: string }[] }): string[] => body.errors.map(({ field }) => field).sort()

describe('customers', () => {
  it('are listed by key, each exactly once, and found by a word', async () => {
    const { officer } = await aCompany(server)
    for (let index = 0; index < 7; index++) await aCustomer(officer, { name: `Grocer ${index}`, contactName: index === 3 ? 'Wren' : null })
    const seen: string[] = []
    let after: string | null = ''
    while (after !== null) {
      const { body } = await officer.get(`/api/customers?limit=3${after ? `&after=${after}` : ''}`).expect(200) as { body: Page<WireCustomer> }
      seen.push(...body.rows.map(({ name }) => name))
      after = body.next
    }
    expect(seen).toEqual(['Grocer 0', 'Grocer 1', 'Grocer 2', 'Grocer 3', 'Grocer 4', 'Grocer 5', 'Grocer 6'])
    expect((await officer.get('/api/customers?search=wren')).body.rows.map(({ name }: WireCustomer) => name)).toEqual(['Grocer 3'])
    expect((await officer.get('/api/customers?search=100%25')).body.rows).toEqual([])
  })

  it('are changed by version: who comes second is told, and nothing of the first is lost', async () => {
    const { officer, administrator } = await aCompany(server)
    const customer = await aCustomer(officer)
    const changed = await officer.patch(`/api/customers/${customer.id}`, customerDraft({ name: 'First change' }), customer.version).expect(200)
    expect(changed.headers.etag).toBe('"2"')
    expect((await administrator.patch(`/api/customers/${customer.id}`, customerDraft({ name: 'Second change' }), customer.version).expect(412)).body.code).toBe('changed-meanwhile')
    expect((await administrator.patch(`/api/customers/${customer.id}`, customerDraft()).expect(428)).body.code).toBe('version-missing')
    expect((await officer.get(`/api/customers/${customer.id}`)).body.name).toBe('First change')
    const { body: trail } = await officer.get(`/api/trail?subjectId=${customer.id}`).expect(200)
    expect(trail.rows.map(({ action }: { action: string }) => action)).toEqual(['change', 'create'])
    expect(trail.rows[0].before).toEqual({ name: customer.name })
  })

  it('name the field that is taken or too long', async () => {
    const { officer } = await aCompany(server)
    await aCustomer(officer, { name: 'Grocer' })
    const taken = await officer.post('/api/customers', customerDraft({ name: 'Grocer' })).expect(409)
    expect(taken.body).toMatchObject({ code: 'name-taken', errors: [{ field: 'name', message: 'This one is taken: choose another.' }] })
    const long = await officer.post('/api/customers', customerDraft({ name: 'x'.repeat(121) })).expect(422)
    expect(long.body.errors).toEqual([{ field: 'name', message: 'At most 120 characters.' }])
  })

  it('of another company, of another owner, and of nowhere look alike', async () => {
    const ours = await aCompany(server)
    const theirs = await aCompany(server)
    const [own, other] = [await aCustomer(ours.officer), await aCustomer(ours.officer)]
    const foreign = await aCustomer(theirs.officer)
    const owner = await ours.owner(own.id)
    await owner.get(`/api/customers/${own.id}`).expect(200)
    const answers = await Promise.all([other.id, foreign.id, uuid()].map((id) => owner.get(`/api/customers/${id}`)))
    for (const answer of answers) expect({ status: answer.status, code: answer.body.code, detail: answer.body.detail }).toEqual({
      status: 404, code: 'not-found', detail: 'It does not exist, or it is not yours to see. Check the address or look for it in the list.',
    })
    expect((await owner.get('/api/customers')).body.rows.map(({ id }: WireCustomer) => id)).toEqual([own.id])
  })
})

describe('sites, systems and circuits', () => {
  it('name every wrong field at once and keep nothing', async () => {
    const { officer } = await aCompany(server)
    const bad = { ...siteDraft(uuid()), timeZone: 'Mars/Olympus', country: 'usa', elevationM: 1.5, rulePacks: ['no-such-pack'], surprise: 1 }
    const { body } = await officer.post('/api/sites', bad).expect(422)
    expect(fieldsOf(body)).toEqual(['country', 'elevationM', 'rulePacks', 'surprise', 'timeZone'])
    expect(fieldsOf((await officer.post('/api/sites', siteDraft(uuid())).expect(422)).body)).toEqual(['customerId'])
    expect((await officer.get('/api/sites')).body.rows).toEqual([])
  })

  it('take the midpoint of an established range as full charge', async () => {
    const { officer } = await aCompany(server)
    const circuit = await aCircuit(officer)
    const range = { method: 'range', massKg: null, rangeLowKg: toKgText(lb('50')), rangeHighKg: toKgText(lb('61')), effectiveOn: '2026-01-01', note: null }
    const { body } = await officer.post(`/api/circuits/${circuit.id}/full-charges`, range).expect(201)
    // (50 + 61) / 2 = 55.5 lb × 0.45359237 kg = 25.174376535 kg, worked by hand
    expect(body.fullChargeKg).toBe('25.174376535')
    expect(body.fullCharges).toHaveLength(2)
    expect(fieldsOf((await officer.post(`/api/circuits/${circuit.id}/full-charges`, { ...range, rangeHighKg: toKgText(lb('49')) }).expect(422)).body)).toEqual(['rangeHighKg'])
  })

  it('ask who decided a subsector exception, and why', async () => {
    const { officer } = await aCompany(server)
    const site = await aSite(officer)
    const { body } = await officer.post('/api/systems', systemDraft(site.id, { subsectorDecision: 'excepted' })).expect(422)
    expect(fieldsOf(body)).toEqual(['subsectorDecidedBy', 'subsectorReason'])
  })

  it('say which packs apply and why: R-22 above 50 lb is under the ozone rules, a roof-top unit with R-410A is to be settled', async () => {
    const { officer } = await aCompany(server)
    const system = await aSystem(officer)
    const ods = await aCircuit(officer, { systemId: system.id, refrigerant: 'R-22', pounds: '50' })
    expect(ods.packs.map(({ packId, applies }) => [packId, applies])).toEqual([['us-ods', 'yes'], ['us-hfc', 'no']])
    expect(ods.thresholds).toMatchObject([{ packId: 'us-ods', percent: '10', cite: '40 CFR 82.157(c)(2)', basis: 'read' }])
    const hfc = await aCircuit(officer, { systemId: system.id, refrigerant: 'R-410A', pounds: '20' })
    expect(hfc.packs.map(({ packId, applies }) => [packId, applies])).toEqual([['us-ods', 'no'], ['us-hfc', 'undecided']])
    const small = await aCircuit(officer, { systemId: system.id, refrigerant: 'R-22', pounds: '49.9999' })
    expect(small.packs[0]).toMatchObject({ packId: 'us-ods', applies: 'no' })
  })

  it('refuse a second circuit of one name and a customer of another company', async () => {
    const ours = await aCompany(server)
    const theirs = await aCompany(server)
    const circuit = await aCircuit(ours.officer, { name: 'Circuit 1' })
    expect((await ours.officer.post('/api/circuits', circuitDraft(circuit.systemId, { name: 'circuit 1' })).expect(409)).body.code).toBe('name-taken')
    const foreign = await aCustomer(theirs.officer)
    expect(fieldsOf((await ours.officer.post('/api/sites', siteDraft(foreign.id)).expect(422)).body)).toEqual(['customerId'])
  })
})

describe('a circuit whose charge passes the threshold', () => {
  /** A stocked cylinder, and a circuit of 100 lb that was last charged 90 days before 20 November 2026. */
  async function aChargedCircuit() {
    const company = await aCompany(server)
    const { officer } = company
    const circuit = await aCircuit(officer, { refrigerant: 'R-22', pounds: '100' })
    const cylinder = await aCylinder(officer)
    const supplier = await aPartner(officer)
    await post(officer, aDraft({ kind: 'purchase', pounds: '40', cylinderId: cylinder.id, partnerId: supplier.id, on: '2026-08-01' })).expect(201)
    await post(officer, aDraft({ kind: 'opening-charge', pounds: '100', circuitId: circuit.id, on: '2026-08-01' })).expect(201)
    await post(officer, aDraft({ kind: 'charge', pounds: '1', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak', on: '2026-08-22' })).expect(201)
    return { ...company, circuit, cylinder }
  }

  it('has the rate of the table: 10 lb of 100 lb after 90 days are 40.56 %, above 10 % (worked by hand, 40 CFR 82.152)', async () => {
    const { technician, officer, circuit, cylinder } = await aChargedCircuit()
    await post(technician, aDraft({ kind: 'charge', pounds: '10', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak' })).expect(201)
    const { body } = await officer.get(`/api/circuits/${circuit.id}`).expect(200)
    expect(Number(body.ratePercent)).toBeCloseTo(40.5556, 4) // 10/100 × 365/90
    expect(body).toMatchObject({ standing: 'over', thresholdPercent: '10' })
    expect(body.rates.at(-1)).toMatchObject({ days: 90, isAbove: true, exempt: null })
    const { body: overview } = await officer.get('/api/overview').expect(200)
    expect(overview).toMatchObject({ over: 1 })
    expect(overview.circuits[0]).toMatchObject({ id: circuit.id, standing: 'over' })
  })

  it('goes back to where it stood when the charge is reversed', async () => {
    const { technician, officer, circuit, cylinder } = await aChargedCircuit()
    const before = (await officer.get(`/api/circuits/${circuit.id}`)).body
    const charge = await post(technician, aDraft({ kind: 'charge', pounds: '10', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak' })).expect(201)
    await post(officer, aDraft({ kind: 'reversal', reversesId: charge.body.id, reason: 'wrong circuit' })).expect(201)
    const after = (await officer.get(`/api/circuits/${circuit.id}`)).body
    expect({ ...after, history: null }).toEqual({ ...before, history: null })
  })

  it('is seen by its own owner and by no other, without stock or cylinder numbers', async () => {
    const { technician, officer, owner, circuit, cylinder } = await aChargedCircuit()
    await post(technician, aDraft({ kind: 'charge', pounds: '10', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak' })).expect(201)
    const [own, other] = [await owner(circuit.customerId), await owner((await aCustomer(officer)).id)]
    expect((await own.get('/api/overview')).body).toMatchObject({ over: 1, stock: null, latest: [{ kind: 'charge', cylinderNumber: null }, {}, {}] })
    expect((await officer.get('/api/overview')).body.latest[0]).toMatchObject({ kind: 'charge', cylinderNumber: cylinder.number })
    expect((await other.get('/api/overview')).body).toMatchObject({ over: 0, circuits: [], latest: [] })
    await other.get(`/api/circuits/${circuit.id}`).expect(404)
    const { body } = await own.get(`/api/postings?circuitId=${circuit.id}`).expect(200)
    expect(body.rows).toHaveLength(3)
    expect(body.rows[0].cylinderNumber).toBeNull()
    expect(body.rows[0].entries.every(({ accountKind }: { accountKind: string }) => accountKind !== 'cylinder')).toBe(true)
    await own.get('/api/cylinders').expect(403)
  })
})
