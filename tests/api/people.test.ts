import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import type { PersonDraft, WirePerson } from '../../shared/api/people'
import { createApp } from '../../server/app'
import { everyPage, fieldsOf, trailOf } from '../support/answers'
import { aCustomer } from '../support/builders'
import { linkIn } from '../support/mail'
import { aCompany, aPerson, aServer, clientOf, nobody, type Client, type TestServer } from '../support/server'

let server: TestServer
beforeAll(async () => { server = await aServer() })
afterAll(async () => { await server.close() })

const PASSWORD = 'four winds and a ladder'
const DAY_MS = 86_400_000
const personDraft = (given: Partial<PersonDraft> = {}): PersonDraft =>
  ({ name: 'Nell Ostrand', email: `nell-${uuid()}@people.example`, role: 'technician', certificateNumber: 'TC-9', certificateType: 'II', customerIds: [], ...given })
const draftOf = ({ name, email, role, certificateNumber, certificateType, customerIds }: WirePerson): PersonDraft =>
  ({ name, email, role, certificateNumber, certificateType, customerIds })
const personOf = async (client: Client, id: string): Promise<WirePerson> => (await client.get(`/api/people/${id}`).expect(200)).body

/** A person who was invited, with the token that their mail carried. */
async function anInvitation(administrator: Client, given: Partial<PersonDraft> = {}) {
  const { body } = await administrator.post('/api/people', personDraft(given)).expect(201) as { body: WirePerson & { mailSent: boolean } }
  return { person: body, token: linkIn(server.mails.at(-1), 'invitation') }
}
/** At an application of its own, so that the limit of requests before sign-in counts each one alone. */
const accept = (token: string) => nobody({ ...server, app: createApp(server.house) }).post(`/api/invitations/${token}`, { name: 'Nell O.', password: PASSWORD })

describe('the list of people', () => {
  it('gives each one exactly once and finds by name, address and role', async () => {
    const { administrator, auditor } = await aCompany(server)
    await anInvitation(administrator, { name: 'Ada Quill', email: `quill-${uuid()}@people.example` })
    const rows = await everyPage<WirePerson>(administrator, '/api/people?sort=role', 2)
    expect(rows.map(({ role }) => role)).toEqual(['administrator', 'auditor', 'officer', 'technician', 'technician'])
    expect(new Set(rows.map(({ id }) => id)).size).toBe(5)
    expect((await administrator.get('/api/people?search=quill ada')).body.rows.map(({ name }: WirePerson) => name)).toEqual(['Ada Quill'])
    expect((await auditor.get('/api/people?role=officer')).body.rows).toMatchObject([{ role: 'officer', may: [] }])
  })

  it('shows no password and no other company, and nothing to technicians and owners', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const owner = await ours.owner((await aCustomer(ours.officer)).id)
    for (const client of [ours.technician, owner]) {
      await client.get('/api/people').expect(403)
      await client.get(`/api/people/${ours.officer.personId}`).expect(403)
    }
    const { body, text } = await ours.officer.get('/api/people').expect(200)
    expect(text).not.toMatch(/password|hash/i)
    expect(body.rows.map(({ id }: WirePerson) => id)).not.toContain(theirs.officer.personId)
    await ours.administrator.get(`/api/people/${theirs.officer.personId}`).expect(404)
  })
})

describe('an invitation', () => {
  it('is mailed to the address, read by its link, and accepted once', async () => {
    const { administrator } = await aCompany(server)
    const { person, token } = await anInvitation(administrator)
    expect(person).toMatchObject({ state: 'invited', mailSent: true, version: 1 })
    expect(server.mails.at(-1)).toContain(`To: ${person.email}`)
    expect((await nobody(server).get(`/api/invitations/${token}`).expect(200)).body).toMatchObject({ email: person.email, name: 'Nell Ostrand' })
    expect(fieldsOf(await nobody(server).post(`/api/invitations/${token}`, { name: 'Nell O.', password: 'short' }).expect(422))).toEqual(['password'])
    await accept(token).expect(200)
    expect((await accept(token).expect(410)).body.code).toBe('link-expired')
    expect(await personOf(administrator, person.id)).toMatchObject({ state: 'active', name: 'Nell O.' })
    expect(await trailOf(administrator, person.id)).toMatchObject([{ action: 'invite' }, { action: 'accept', before: { name: 'Nell Ostrand' }, after: { name: 'Nell O.' } }])
  })

  it('ends after seven days, and is sent again; the earlier link then leads nowhere', async () => {
    const { administrator } = await aCompany(server)
    const { person, token } = await anInvitation(administrator)
    server.setNow(new Date(Date.now() + 7 * DAY_MS + 1000).toISOString())
    try {
      await accept(token).expect(410)
    } finally {
      server.setNow(null)
    }
    expect((await administrator.post(`/api/people/${person.id}/invite`).expect(200)).body.mailSent).toBe(true)
    const again = linkIn(server.mails.at(-1), 'invitation')
    await accept(token).expect(410)
    await accept(again).expect(200)
    expect(fieldsOf(await administrator.post(`/api/people/${person.id}/invite`).expect(422))).toEqual(['id'])
  })

  it('leads nowhere once it turns out to have gone to a wrong address', async () => {
    const { administrator } = await aCompany(server)
    const { person, token } = await anInvitation(administrator)
    const email = `right-${uuid()}@people.example`
    await administrator.patch(`/api/people/${person.id}`, { ...draftOf(person), email }, 1).expect(200)
    await accept(token).expect(410)
    await administrator.post(`/api/people/${person.id}/invite`).expect(200)
    expect(server.mails.at(-1)).toContain(`To: ${email}`)
    await accept(linkIn(server.mails.at(-1), 'invitation')).expect(200)
  })

  it('leads nowhere once the account is shut', async () => {
    const { administrator } = await aCompany(server)
    const { person, token } = await anInvitation(administrator)
    await administrator.post(`/api/people/${person.id}/disable`).expect(200)
    await accept(token).expect(410)
    await administrator.post(`/api/people/${person.id}/enable`).expect(200)
    await accept(token).expect(410)
    expect((await personOf(administrator, person.id)).state).toBe('invited')
  })

  it('that the mail server refuses leaves the person in place, to be sent again', async () => {
    const { administrator } = await aCompany(server)
    const app = createApp({ ...server.house, log: server.house.log.child({}, { level: 'silent' }), mailer: { ...server.house.mailer, send: () => Promise.reject(new Error('550 no such box')) } })
    const client = clientOf({ ...server, app }, administrator)
    const { body } = await client.post('/api/people', personDraft()).expect(201)
    expect(body).toMatchObject({ state: 'invited', mailSent: false })
    expect((await administrator.post(`/api/people/${body.id}/invite`).expect(200)).body.mailSent).toBe(true)
  })
})

describe('a person', () => {
  it('is named with every wrong field at once', async () => {
    const { administrator } = await aCompany(server)
    const bad = { name: '', email: 'nobody', role: 'boss', certificateNumber: 'x'.repeat(61), certificateType: 'IV', customerIds: 'all' }
    expect(fieldsOf(await administrator.post('/api/people', bad).expect(422))).toEqual(['certificateNumber', 'certificateType', 'customerIds', 'email', 'name', 'role'])
  })

  it('has an address of their own in the whole installation', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const { person } = await anInvitation(ours.administrator)
    for (const client of [ours.administrator, theirs.administrator])
      expect((await client.post('/api/people', personDraft({ email: person.email.toUpperCase() })).expect(409)).body.code).toBe('email-taken')
  })

  it('is tied to customers of this company where they are an owner, and only then', async () => {
    const [ours, theirs] = [await aCompany(server), await aCompany(server)]
    const [own, foreign] = [await aCustomer(ours.officer), await aCustomer(theirs.officer)]
    const refused = async (given: Partial<PersonDraft>) => fieldsOf(await ours.administrator.post('/api/people', personDraft(given)).expect(422))
    expect(await refused({ role: 'owner', customerIds: [] })).toEqual(['customerIds'])
    expect(await refused({ role: 'owner', customerIds: [own.id, foreign.id] })).toEqual(['customerIds'])
    expect(await refused({ role: 'officer', customerIds: [own.id] })).toEqual(['customerIds'])
    expect((await anInvitation(ours.administrator, { role: 'owner', customerIds: [own.id] })).person.customerIds).toEqual([own.id])
  })

  it('sees at the next sign-in what changed: other customers, another role', async () => {
    const { administrator, officer, owner } = await aCompany(server)
    const [first, second] = [await aCustomer(officer), await aCustomer(officer)]
    const client = await owner(first.id)
    const person = await personOf(administrator, client.personId)
    await administrator.patch(`/api/people/${person.id}`, { ...draftOf(person), customerIds: [second.id] }, person.version).expect(200)
    await client.get('/api/customers').expect(401)
    expect(await trailOf(administrator, person.id)).toMatchObject([{ action: 'change', before: { customerIds: [first.id] }, after: { customerIds: [second.id] } }])
  })

  it('stays signed in where only the name changed', async () => {
    const { administrator, technician } = await aCompany(server)
    const person = await personOf(administrator, technician.personId)
    await administrator.patch(`/api/people/${person.id}`, { ...draftOf(person), name: 'Renamed' }, person.version).expect(200)
    expect((await technician.get('/api/me').expect(200)).body.name).toBe('Renamed')
  })

  it('is changed by version; what they changed of themselves in the meantime counts', async () => {
    const { administrator, technician } = await aCompany(server)
    const person = await personOf(administrator, technician.personId)
    await technician.patch('/api/me', { certificateNumber: 'TC-0002', certificateType: 'I' }).expect(200)
    expect((await administrator.patch(`/api/people/${person.id}`, draftOf(person), person.version).expect(412)).body.code).toBe('changed-meanwhile')
    expect(await personOf(administrator, person.id)).toMatchObject({ certificateNumber: 'TC-0002', certificateType: 'I' })
    expect(await trailOf(administrator, person.id)).toMatchObject([{ action: 'change', before: { certificateNumber: 'TC-0001' }, after: { certificateNumber: 'TC-0002' } }])
    await administrator.patch(`/api/people/${person.id}`, draftOf(person)).expect(428)
  })

  it('is added, changed, shut and opened by the administrator alone', async () => {
    const { officer, auditor, technician, owner } = await aCompany(server)
    const person = await personOf(officer, technician.personId)
    for (const client of [officer, auditor, technician, await owner((await aCustomer(officer)).id)]) {
      await client.post('/api/people', personDraft()).expect(403)
      await client.patch(`/api/people/${person.id}`, draftOf(person), person.version).expect(403)
      for (const act of ['disable', 'enable', 'invite']) await client.post(`/api/people/${person.id}/${act}`).expect(403)
    }
    await technician.get('/api/me').expect(200)
  })
})

describe('an account that is shut', () => {
  it('is refused at the next request, and comes back with a new sign-in only', async () => {
    const { administrator, technician } = await aCompany(server)
    await administrator.post(`/api/people/${technician.personId}/disable`).expect(200)
    await technician.get('/api/me').expect(401)
    expect((await administrator.post(`/api/people/${technician.personId}/enable`).expect(200)).body.state).toBe('active')
    await technician.get('/api/me').expect(401)
    expect((await trailOf(administrator, technician.personId)).map(({ action }) => action)).toEqual(['disable', 'enable'])
  })

  it('has no way in by a reset link that was on its way', async () => {
    const { administrator } = await aCompany(server)
    const { person, token } = await anInvitation(administrator)
    await accept(token).expect(200)
    const before = server.mails.length
    await nobody(server).post('/api/password/forgot', { email: person.email }).expect(202)
    await expect.poll(() => server.mails.length).toBe(before + 1)
    await administrator.post(`/api/people/${person.id}/disable`).expect(200)
    await nobody(server).post('/api/password/reset', { token: linkIn(server.mails.at(-1), 'reset'), password: 'quite another password' }).expect(410)
  })
})

describe('the last administrator', () => {
  it('keeps the role and the account, also beside one who has not accepted the invitation', async () => {
    const { administrator } = await aCompany(server)
    const self = await personOf(administrator, administrator.personId)
    const { token } = await anInvitation(administrator, { role: 'administrator' })
    expect(fieldsOf(await administrator.patch(`/api/people/${self.id}`, { ...draftOf(self), role: 'officer' }, self.version).expect(422))).toEqual(['role'])
    expect((await administrator.post(`/api/people/${self.id}/disable`).expect(422)).body.errors[0].message).toContain('last administrator')
    await administrator.get('/api/me').expect(200)
    await accept(token).expect(200)
    await administrator.patch(`/api/people/${self.id}`, { ...draftOf(self), role: 'officer' }, self.version).expect(200)
    await administrator.get('/api/me').expect(401)
  })

  it('is still there after two have shut each other’s account at once', async () => {
    const { id, administrator } = await aCompany(server)
    const other = await aPerson(server, id, 'administrator')
    const answers = await Promise.all([administrator.post(`/api/people/${other.personId}/disable`), other.post(`/api/people/${administrator.personId}/disable`)])
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1)
  })
})
