import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { send } from '../support/answers'
import { aCircuit, aCustomer, aCylinder, aPartner, aSystem } from '../support/builders'
import { aDraft } from '../support/drafts'
import { aCompany, aServer, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

describe('a circuit with a known full charge', () => {
  it('says which packs apply and why: R-22 above 50 lb is under the ozone rules, a roof-top unit with R-410A is to be settled', async () => {
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
})

describe('a circuit whose charge passes the threshold', () => {
  /** A stocked cylinder, and a circuit of 100 lb that was last charged 90 days before 20 November 2026. */
  async function aChargedCircuit() {
    const company = await aCompany(server)
    const { officer } = company
    const circuit = await aCircuit(officer, { refrigerant: 'R-22', pounds: '100' })
    const cylinder = await aCylinder(officer)
    const supplier = await aPartner(officer)
    await send(officer, aDraft({ kind: 'purchase', pounds: '40', cylinderId: cylinder.id, partnerId: supplier.id, on: '2026-08-01' })).expect(201)
    await send(officer, aDraft({ kind: 'opening-charge', pounds: '100', circuitId: circuit.id, on: '2026-08-01' })).expect(201)
    await send(officer, aDraft({ kind: 'charge', pounds: '1', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak', on: '2026-08-22' })).expect(201)
    return { ...company, circuit, cylinder }
  }

  it('has the rate of the table: 10 lb of 100 lb after 90 days are 40.56 %, above 10 % (worked by hand, 40 CFR 82.152)', async () => {
    const { technician, officer, circuit, cylinder } = await aChargedCircuit()
    await send(technician, aDraft({ kind: 'charge', pounds: '10', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak' })).expect(201)
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
    const charge = await send(technician, aDraft({ kind: 'charge', pounds: '10', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak' })).expect(201)
    await send(officer, aDraft({ kind: 'reversal', reversesId: charge.body.id, reason: 'wrong circuit' })).expect(201)
    const after = (await officer.get(`/api/circuits/${circuit.id}`)).body
    expect({ ...after, history: null }).toEqual({ ...before, history: null })
  })

  it('is seen by its own owner and by no other, without stock or cylinder numbers', async () => {
    const { technician, officer, owner, circuit, cylinder } = await aChargedCircuit()
    await send(technician, aDraft({ kind: 'charge', pounds: '10', cylinderId: cylinder.id, circuitId: circuit.id, purpose: 'leak' })).expect(201)
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
