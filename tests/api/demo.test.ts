import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { CYLINDER_CONTENTS, CYLINDER_KINDS, CYLINDER_STATUSES } from '../../shared/api/cylinders'
import { POSTING_KINDS, type EnteredWeighing, type PostingKind } from '../../shared/api/ledger'
import type { Page } from '../../shared/api/page'
import { FULL_CHARGE_METHODS, type CircuitStanding } from '../../shared/api/places'
import { daysBetween, localDateOf, plainDate } from '../../shared/dates/plain-date'
import { equalMass, isZero, kg } from '../../shared/mass/mass'
import { netOf } from '../../shared/units/mass-units'
import accounts from '../../fixtures/demo/accounts.json'
import { DEMO_COMPANY_ID, loadDemo } from '../../server/demo/load'
import { Seeded } from '../../server/demo/seeded'
import { storyOf } from '../../server/demo/stories'
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

const rows = <Row>(sql: string): Promise<Row[]> =>
  server.house.database.inCompany({ companyId: DEMO_COMPANY_ID, customerIds: null }, (tx) => tx.query(sql, [DEMO_COMPANY_ID]) as Promise<Row[]>)
/** The cylinder on the scale gives gas away; in all other kinds it takes gas in. */
const GOES_OUT: readonly PostingKind[] = ['charge', 'transfer', 'return', 'reclaim', 'destruction']

describe('the demo company', () => {
  it('is loaded once', async () => {
    expect(await loadDemo(server.house.database, new Date())).toBeNull()
  })

  it('has a ledger without a fault', async () => {
    const scope = { companyId: DEMO_COMPANY_ID, customerIds: null }
    const check = await server.house.database.inCompanyAtOneMoment(scope, (tx) => checkLedger(tx, DEMO_COMPANY_ID, new Date()))
    expect(check.faults).toEqual([])
    expect(check.waiting).toBe(0)
    expect(check.postings).toBeGreaterThan(550)
    expect(check.postings).toBeLessThan(900)
  })

  it('has entries that sum to zero for every refrigerant, and a book that never runs below nothing', async () => {
    const sums = await rows<{ refrigerant: string; kg: string }>('select refrigerant, sum(mass_kg)::text as kg from entry where company_id = $1 group by refrigerant')
    expect(sums.length).toBeGreaterThan(10)
    expect(sums.filter(({ kg: sum }) => !isZero(kg(sum)))).toEqual([])
    const negative = `select account_id, refrigerant, min(running) from (
        select e.account_id, e.refrigerant, sum(e.mass_kg) over (partition by e.account_id, e.refrigerant order by p.occurred_at, p.recorded_at, p.id) as running
          from entry e join posting p on p.company_id = e.company_id and p.id = e.posting_id join account a on a.company_id = e.company_id and a.id = e.account_id
         where e.company_id = $1 and a.kind in ('cylinder', 'circuit')) as balances
      where running < 0 group by 1, 2`
    expect(await rows(negative)).toEqual([])
  })

  it('shows readings that give exactly what was posted, in pounds, pounds and ounces, and kilograms', async () => {
    const postings = await rows<{ kind: PostingKind; massKg: string; entered: EnteredWeighing }>('select kind, mass_kg::text as "massKg", entered from posting where company_id = $1 and entered is not null')
    const wrong = postings.filter(({ kind, massKg, entered }) => {
      const net = netOf(entered, GOES_OUT.includes(kind) ? 'out' : 'in')
      return !net.ok || !equalMass(net.mass, kg(massKg))
    })
    expect(wrong).toEqual([])
    expect(new Set(postings.map(({ entered }) => entered.unit))).toEqual(new Set(['lb', 'lb-oz', 'kg']))
  })

  it('covers two years of working days until the day of loading, each job in the hours of its site', async () => {
    const [span] = await rows<{ first: string; last: string; late: number; weekend: number; early: number }>(`
      select min(occurred_on) as first, max(occurred_on) as last, count(*) filter (where occurred_at > recorded_at)::int as late,
             count(*) filter (where extract(isodow from occurred_on) > 5)::int as weekend,
             count(*) filter (where s.id is not null and extract(hour from p.occurred_at at time zone s.time_zone) not between 7 and 17)::int as early
        from posting p left join site s on s.company_id = p.company_id and s.id = p.site_id where p.company_id = $1`)
    expect(daysBetween(plainDate(span?.first ?? ''), plainDate(span?.last ?? ''))).toBeGreaterThan(720)
    expect(daysBetween(plainDate(span?.last ?? ''), localDateOf(new Date().toISOString(), 'America/Los_Angeles'))).toBeLessThanOrEqual(2) // a weekend
    expect(span).toMatchObject({ late: 0, weekend: 0, early: 0 })
  })

  it('tells of a circuit the same at every load, and of two circuits not the same', () => {
    expect(storyOf('far', new Seeded('one'))).toEqual(storyOf('far', new Seeded('one')))
    expect(storyOf('far', new Seeded('one'))).not.toEqual(storyOf('far', new Seeded('two')))
  })

  it('has every kind of posting, every method of a full charge with revisions, and cylinders in every state', async () => {
    const kinds = await rows<{ kind: string }>('select distinct kind from posting where company_id = $1')
    expect(new Set(kinds.map(({ kind }) => kind))).toEqual(new Set(POSTING_KINDS))
    const methods = await rows<{ method: string }>('select distinct method from full_charge where company_id = $1')
    expect(new Set(methods.map(({ method }) => method))).toEqual(new Set(FULL_CHARGE_METHODS))
    expect((await rows('select circuit_id from full_charge where company_id = $1 group by circuit_id having count(*) > 1')).length).toBeGreaterThan(2)
    const cylinders = await rows<{ kind: string; contents: string; status: string; isPast: boolean }>(
      'select kind, contents, status, coalesce(test_due_on < current_date, false) as "isPast" from cylinder where company_id = $1')
    expect(new Set(cylinders.map(({ kind }) => kind))).toEqual(new Set(CYLINDER_KINDS))
    expect(new Set(cylinders.map(({ contents }) => contents))).toEqual(new Set(CYLINDER_CONTENTS))
    expect(new Set(cylinders.map(({ status }) => status))).toEqual(new Set(CYLINDER_STATUSES))
    expect(cylinders.filter(({ isPast }) => isPast)).toHaveLength(1)
  })

  it('shows additions that have no rate, or a part of one, for each reason the law gives', async () => {
    const rates = await rows<{ exempt: string | null; basis: string[] }>('select exempt, basis from addition_rate where company_id = $1')
    const exempt = new Set(rates.map((rate) => rate.exempt))
    for (const reason of ['installation', 'retrofit', 'seasonal', 'returned']) expect(exempt).toContain(reason)
    const bases = new Set(rates.flatMap(({ basis }) => basis))
    for (const basis of ['same-day', 'same-leak-summed', 'seasonal-excess', 'recovered-returned', 'since-follow-up']) expect(bases).toContain(basis)
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
