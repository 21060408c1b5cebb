import { randomBytes } from 'node:crypto'
import type { Express } from 'express'
import { SMTPServer } from 'smtp-server'
import supertest from 'supertest'
import { v7 as uuid } from 'uuid'
import type { Role } from '../../shared/access/roles'
import { createApp } from '../../server/app'
import { readConfig } from '../../server/config'
import { createCompany } from '../../server/modules/people/companies'
import { Person } from '../../server/entities/person'
import { startSession } from '../../server/modules/session/session.service'
import type { House } from '../../server/house'
import { closeHouse, openHouse } from '../../server/start'
import { appUrl, dropDatabase, makeDatabase } from './database'

/** A running application on a database of its own, with a real SMTP conversation at its side. */
export interface TestServer {
  app: Express
  house: House
  database: string
  /** Raw messages that the mail server took, oldest first. */
  mails: string[]
  /** Moves the application's clock. */
  setNow: (at: string | null) => void
  close: () => Promise<void>
}

export async function aServer(): Promise<TestServer> {
  const database = await makeDatabase()
  const mails: string[] = []
  const smtp = await aMailServer(mails)
  let now: Date | null = null
  const config = readConfig({
    WEIGHBACK_MODE: 'test', WEIGHBACK_SECRET: randomBytes(32).toString('hex'), WEIGHBACK_DATABASE_URL: appUrl(database),
    WEIGHBACK_MAIL_URL: `smtp://127.0.0.1:${smtp.port}?ignoreTLS=true`, WEIGHBACK_BASE_URL: 'http://127.0.0.1:8080',
  })
  const house = await openHouse(config, () => now ?? new Date())
  return {
    app: createApp(house), house, database, mails,
    setNow: (at) => { now = at === null ? null : new Date(at) },
    close: async () => {
      await closeHouse(house)
      await smtp.close()
      await dropDatabase(database)
    },
  }
}

async function aMailServer(mails: string[]): Promise<{ port: number; close: () => Promise<void> }> {
  const server = new SMTPServer({
    authOptional: true, disabledCommands: ['STARTTLS', 'AUTH'], logger: false,
    onData: (stream, _session, done) => {
      const parts: Buffer[] = []
      stream.on('data', (part: Buffer) => parts.push(part))
      stream.on('end', () => {
        mails.push(Buffer.concat(parts).toString('utf8'))
        done()
      })
    },
  })
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve))
  const address = server.server.address()
  if (address === null || typeof address === 'string') throw new Error('The mail server has no port.')
  return { port: address.port, close: () => new Promise((resolve) => server.close(() => resolve())) }
}

/** A person signed in: supertest with the session cookie and the header of our own client. */
export interface Client {
  personId: string
  companyId: string
  cookie: string
  get: (path: string) => supertest.Test
  post: (path: string, body?: object) => supertest.Test
  patch: (path: string, body: object, version?: number) => supertest.Test
  delete: (path: string) => supertest.Test
}

export const OUR_HEADER = { 'X-Requested-With': 'weighback' }

export function clientOf(server: TestServer, person: { personId: string; companyId: string; cookie: string }): Client {
  const headers = { ...OUR_HEADER, ...(person.cookie ? { Cookie: person.cookie } : {}) }
  const agent = supertest(server.app)
  return {
    ...person,
    get: (path) => agent.get(path).set(headers),
    post: (path, body) => agent.post(path).set(headers).send(body),
    patch: (path, body, version) => agent.patch(path).set(headers).set(version === undefined ? {} : { 'If-Match': `"${version}"` }).send(body),
    delete: (path) => agent.delete(path).set(headers),
  }
}

export interface TestCompany {
  id: string
  technician: Client
  officer: Client
  auditor: Client
  administrator: Client
  /** An owner's account tied to these customers. */
  owner: (...customerIds: string[]) => Promise<Client>
}

/** A company with one person of each role, all signed in. */
export async function aCompany(server: TestServer, name = `Test company ${uuid().slice(-6)}`): Promise<TestCompany> {
  const id = uuid()
  await createCompany(server.house.database, { id, name, isDemo: false })
  const person = (role: Role, customerIds: string[] = []): Promise<Client> => aPerson(server, id, role, customerIds)
  return {
    id, technician: await person('technician'), officer: await person('officer'), auditor: await person('auditor'),
    administrator: await person('administrator'), owner: (...customerIds) => person('owner', customerIds),
  }
}

export async function aPerson(server: TestServer, companyId: string, role: Role, customerIds: string[] = []): Promise<Client> {
  const id = uuid()
  const tokens = await server.house.database.inCompany({ companyId, customerIds: null }, async (tx) => {
    await tx.insert(Person, {
      companyId, id, email: `${role}-${id.slice(-12)}@people.example`, name: `Test ${role}`, role, version: 1,
      preferences: { massUnit: 'lb', pressureUnit: 'psig', temperatureUnit: 'F', theme: 'system', locale: 'en' },
      passwordHash: 'no password fits this',
      certificateNumber: role === 'technician' ? 'TC-0001' : null, certificateType: role === 'technician' ? 'Universal' : null,
    } as never)
    for (const customerId of customerIds) await tx.query('insert into person_customer values ($1, $2, $3)', [companyId, id, customerId])
    return (await startSession(server.house, tx, { companyId, id }, 'test')).tokens
  })
  return clientOf(server, { personId: id, companyId, cookie: `wb_access=${tokens.access}; wb_refresh=${tokens.refresh}` })
}

export const nobody = (server: TestServer): Client => clientOf(server, { personId: '', companyId: '', cookie: '' })
