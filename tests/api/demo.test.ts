import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { Page } from '../../shared/api/page'
import type { CircuitStanding } from '../../shared/api/places'
import accounts from '../../fixtures/demo/accounts.json'
import { DEMO_COMPANY_ID, loadDemo } from '../../server/demo/load'
import { checkLedger } from '../../server/modules/ledger/check.service'
import { aServer, clientOf, nobody, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => {
  server = await aServer()
  await loadDemo(server.house.database, new Date())
}, 180_000)
afterAll(async () => { await server.close() })

async function signIn(role: string): Promise<Client> {
  const account = accounts.find((each) => each.role === role)
  const answer = await nobody(server).post('/api/session', { email: account?.email, password: account?.password }).expect(200)
  const cookie = (answer.headers['set-cookie'] as unknown as string[]).map((line) => line.split(';')[0]).join('; ')
  return clientOf(server, { personId: answer.body.id, companyId: DEMO_COMPANY_ID, cookie })
}

describe('the demo company', () => {
  it('is loaded once', async () => {
    expect(await loadDemo(server.house.database, new Date())).toBeNull()
  })

  it('has a ledger without a fault', async () => {
    const scope = { companyId: DEMO_COMPANY_ID, customerIds: null }
    const check = await server.house.database.inCompanyAtOneMoment(scope, (tx) => checkLedger(tx, DEMO_COMPANY_ID, new Date()))
    expect(check.faults).toEqual([])
    expect(check.waiting).toBe(0)
    expect(check.postings).toBeGreaterThan(200)
  })

  it('shows every state a circuit can be in', async () => {
    const officer = await signIn('officer')
    const { body } = await officer.get('/api/circuits?limit=200').expect(200) as { body: Page<CircuitStanding> }
    expect(new Set(body.rows.map(({ standing }) => standing))).toEqual(new Set(['over', 'flat', 'near', 'far', 'none']))
    expect(new Set(body.rows.map(({ status }) => status))).toEqual(new Set(['in-service', 'mothballed', 'retired']))
    const rooftop = body.rows.filter(({ systemTag, siteName }) => systemTag === 'RTU-3' && siteName === 'Tollgate Office Court')
    expect(rooftop.map(({ standing }) => standing).sort()).toEqual(['far', 'over'])
  })

  it('lets each of its people in', async () => {
    for (const { role } of accounts) expect((await (await signIn(role)).get('/api/me').expect(200)).body).toMatchObject({ role, isDemo: true })
  })
})
