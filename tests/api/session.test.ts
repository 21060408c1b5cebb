import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import supertest from 'supertest'
import { hashPassword } from '../../server/modules/session/passwords'
import { aCompany, aPerson, aServer, clientOf, nobody, OUR_HEADER, type Client, type TestServer } from '../support/server'
import { linkIn } from '../support/mail'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const PASSWORD = 'four winds and a ladder'
const cookiesOf = (answer: supertest.Response): string => ((answer.headers['set-cookie'] ?? []) as unknown as string[]).map((line) => line.split(';')[0]).join('; ')
const emailOf = async (client: Client): Promise<string> => (await client.get('/api/me').expect(200)).body.email as string

async function aPersonWithPassword() {
  const company = await aCompany(server)
  const person = await aPerson(server, company.id, 'technician')
  await server.house.database.inCompany({ companyId: company.id, customerIds: null }, async (tx) =>
    tx.query('update person set password_hash = $3 where company_id = $1 and id = $2', [company.id, person.personId, await hashPassword(PASSWORD)]))
  return { company, person, email: await emailOf(person) }
}
const signIn = (email: string, password = PASSWORD) => nobody(server).post('/api/session', { email, password })
const withCookie = (cookie: string): Client => clientOf(server, { personId: '', companyId: '', cookie })

describe('signing in', () => {
  it('sets cookies that no script can read and no other site can send', async () => {
    const { email } = await aPersonWithPassword()
    const answer = await signIn(email).expect(200)
    const cookies = answer.headers['set-cookie'] as unknown as string[]
    expect(cookies).toHaveLength(2)
    for (const cookie of cookies) expect(cookie).toMatch(/HttpOnly/)
    for (const cookie of cookies) expect(cookie).toMatch(/SameSite=Strict/)
    expect((await withCookie(cookiesOf(answer)).get('/api/me').expect(200)).body.email).toBe(email)
  })

  it('answers a wrong password and an unknown address in the same words', async () => {
    const { email } = await aPersonWithPassword()
    const [wrong, unknown] = [await signIn(email, 'not this one').expect(401), await signIn('nobody@nowhere.example').expect(401)]
    expect({ ...wrong.body, instance: '' }).toEqual({ ...unknown.body, instance: '' })
  })

  it('pauses after ten failures of one account, and not for others', async () => {
    const { email } = await aPersonWithPassword()
    for (let attempt = 0; attempt < 10; attempt++) await signIn(email, `wrong ${attempt}`).expect(401)
    const paused = await signIn(email).expect(429)
    expect(Number(paused.headers['retry-after'])).toBeGreaterThan(0)
    await signIn((await aPersonWithPassword()).email).expect(200)
  })

  it('takes nothing that another site could have sent', async () => {
    const { person } = await aPersonWithPassword()
    const agent = supertest(server.app)
    const bare = await agent.patch('/api/me').set('Cookie', person.cookie).send({ name: 'Forged' })
    const foreign = await agent.patch('/api/me').set({ ...OUR_HEADER, Cookie: person.cookie, Origin: 'https://elsewhere.example' }).send({ name: 'Forged' })
    const crossSite = await agent.patch('/api/me').set({ ...OUR_HEADER, Cookie: person.cookie, 'Sec-Fetch-Site': 'cross-site' }).send({ name: 'Forged' })
    for (const answer of [bare, foreign, crossSite]) expect([answer.status, answer.body.code]).toEqual([403, 'forged-request'])
    const form = await agent.patch('/api/me').set({ ...OUR_HEADER, Cookie: person.cookie }).type('form').send('name=Forged')
    expect(form.body.code).toBe('unsupported-media-type')
    expect((await person.get('/api/me')).body.name).toBe('Test technician')
  })
})

describe('a session', () => {
  it('is renewed by a cookie that rotates; an old copy of it ends the session', async () => {
    const { email } = await aPersonWithPassword()
    const first = cookiesOf(await signIn(email).expect(200))
    const second = cookiesOf(await withCookie(first).post('/api/session/refresh').expect(200))
    await withCookie(second).get('/api/me').expect(200)
    server.setNow(new Date(Date.now() + 60_000).toISOString())
    try {
      await withCookie(first).post('/api/session/refresh').expect(401)
      await withCookie(second).post('/api/session/refresh').expect(401)
      await withCookie(second).get('/api/me').expect(401)
    } finally {
      server.setNow(null)
    }
  })

  it('ends by signing out, on this device alone', async () => {
    const { email } = await aPersonWithPassword()
    const [phone, desk] = [cookiesOf(await signIn(email)), cookiesOf(await signIn(email))]
    await withCookie(phone).delete('/api/session').expect(204)
    await withCookie(phone).get('/api/me').expect(401)
    await withCookie(desk).get('/api/me').expect(200)
  })

  it('can be seen in the list of devices and ended there, one’s own alone', async () => {
    const { email, person } = await aPersonWithPassword()
    const other = await aPersonWithPassword()
    const desk = withCookie(cookiesOf(await signIn(email)))
    const { body: devices } = await desk.get('/api/me/devices').expect(200)
    expect(devices).toHaveLength(2)
    const lost = devices.find((device: { isCurrent: boolean }) => !device.isCurrent)
    await other.person.delete(`/api/me/devices/${lost.id}`).expect(404)
    await desk.delete(`/api/me/devices/${lost.id}`).expect(204)
    await person.get('/api/me').expect(401)
  })

  it('ends at the next request when the person is disabled or gets another role', async () => {
    const { company, person } = await aPersonWithPassword()
    const second = await aPerson(server, company.id, 'technician')
    await company.administrator.post(`/api/people/${person.personId}/disable`).expect(200)
    await person.get('/api/me').expect(401)
    const { body } = await company.administrator.get(`/api/people/${second.personId}`).expect(200)
    const { name, email, certificateNumber, certificateType, version } = body
    await company.administrator.patch(`/api/people/${second.personId}`, { name, email, role: 'auditor', certificateNumber, certificateType, customerIds: [] }, version).expect(200)
    await second.get('/api/me').expect(401)
  })
})

describe('preferences', () => {
  it('change one by one, and a unit that nobody reads is refused', async () => {
    const { person } = await aPersonWithPassword()
    const { body } = await person.patch('/api/me', { preferences: { massUnit: 'lb-oz' } }).expect(200)
    expect(body.preferences).toEqual({ massUnit: 'lb-oz', pressureUnit: 'psig', temperatureUnit: 'F', theme: 'system', locale: 'en' })
    await person.patch('/api/me', { preferences: { massUnit: 'stone' } }).expect(422)
    expect((await person.patch('/api/me', { name: 'New name' }).expect(200)).body).toMatchObject({ name: 'New name', preferences: { massUnit: 'lb-oz' } })
  })
})

describe('passwords', () => {
  it('of 64 characters work; too short, too long for bcrypt, and the commonest are refused with a sentence', async () => {
    const { person } = await aPersonWithPassword()
    const change = (next: string) => person.post('/api/me/password', { current: PASSWORD, next })
    for (const next of ['short', 'password1', 'x'.repeat(73), 'é'.repeat(40)]) {
      const { body } = await change(next).expect(422)
      expect(body.errors.map(({ field }: { field: string }) => field)).toEqual(['next'])
    }
    await change('y'.repeat(64)).expect(204)
  })

  it('are reset by a link that works once, and the reset signs out everywhere', async () => {
    const { email, person } = await aPersonWithPassword()
    const before = server.mails.length
    await nobody(server).post('/api/password/forgot', { email }).expect(202)
    await nobody(server).post('/api/password/forgot', { email: 'nobody@nowhere.example' }).expect(202)
    await expect.poll(() => server.mails.length).toBe(before + 1)
    const token = linkIn(server.mails.at(-1), 'reset')
    await nobody(server).post('/api/password/reset', { token, password: 'quite another password' }).expect(204)
    await person.get('/api/me').expect(401)
    await signIn(email, 'quite another password').expect(200)
    expect((await nobody(server).post('/api/password/reset', { token, password: 'a third password' }).expect(410)).body.code).toBe('link-expired')
  })
})
