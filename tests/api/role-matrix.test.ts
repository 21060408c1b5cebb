import { createHash } from 'node:crypto'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import { mayRole, PERMISSIONS } from '../../shared/access/permissions'
import { ROLES, type Role } from '../../shared/access/roles'
import { PROBLEMS } from '../../shared/api/problems'
import type { Route } from '../../server/route'
import { routeTable } from '../../server/routes'
import { aCustomer } from '../support/builders'
import { asAdmin } from '../support/database'
import { nowhere, rowsOf, ROUTES_OF_ROWS, type Rows } from '../support/matrix'
import { aCompany, aServer, nobody, type Client, type TestCompany, type TestServer } from '../support/server'

let server: TestServer
let ours: TestCompany
/** Rows of one customer of ours. */
let rows: Rows
/** Every role of a stranger, and of ours an owner of another customer. */
const strangers = new Map<string, { role: Role; client: Client }>()
const own = new Map<Role, Client>()

const clientsOf = async (company: TestCompany, customerId: string): Promise<[Role, Client][]> =>
  Promise.all(ROLES.map(async (role): Promise<[Role, Client]> => [role, role === 'owner' ? await company.owner(customerId) : company[role]]))

beforeAll(async () => {
  server = await aServer()
  ours = await aCompany(server)
  const theirs = await aCompany(server)
  rows = await rowsOf(ours)
  for (const [role, client] of await clientsOf(ours, rows.customer)) own.set(role, client)
  for (const [role, client] of await clientsOf(theirs, (await aCustomer(theirs.officer)).id)) strangers.set(`${role} of another company`, { role, client })
  strangers.set('owner of another customer', { role: 'owner', client: await ours.owner((await aCustomer(ours.officer)).id) })
})
afterAll(async () => { await server.close() })

const nameOf = (row: Route): string => `${row.method} ${row.path}`
const guarded = (): Route[] => routeTable(server.house).filter((row) => row.may !== 'anyone')
const ofRows = (): Route[] => guarded().filter((row) => nameOf(row) in ROUTES_OF_ROWS)
const isHeld = (role: Role, row: Route): boolean => row.may !== 'anyone' && mayRole(role, row.may)

/** Asks for a row by id with everything else as it should be. */
function ask(client: Client, row: Route, of: Rows) {
  const how = ROUTES_OF_ROWS[nameOf(row)]
  const id = how ? of[how.row] : uuid()
  const path = row.path.replace(/:[a-z]+/gi, id) + (how?.query?.(id) ?? '')
  const body = how?.body?.(of) ?? {}
  switch (row.method) {
    case 'get': return client.get(path)
    case 'delete': return client.delete(path)
    case 'post': return client.post(path, body).set('Idempotency-Key', id)
    case 'patch': return client.patch(path, body, 1)
  }
}

/** A mark of everything that is stored of a company. */
const contentOf = (companyId: string): Promise<string> => asAdmin(server.database, async (client) => {
  const { rows: tables } = await client.query<{ name: string }>(`select table_name as name from information_schema.columns where table_schema = 'public' and column_name = 'company_id' order by 1`)
  const hash = createHash('sha256')
  for (const { name } of tables) {
    const { rows: found } = await client.query<{ row: string }>(`select to_jsonb(t)::text as row from ${name} t where company_id = $1 order by 1`, [companyId])
    for (const { row } of found) hash.update(row)
  }
  return hash.digest('hex')
})

describe('every route of the table', () => {
  it('names a permission that exists, or is one of the few before sign-in', () => {
    const open = routeTable(server.house).filter((row) => row.may === 'anyone').map(nameOf).sort()
    expect(open).toEqual([
      'delete /api/session', 'get /api/demo-accounts', 'get /api/dev/mail', 'get /api/invitations/:token', 'post /api/invitations/:token',
      'post /api/password/forgot', 'post /api/password/reset', 'post /api/session', 'post /api/session/refresh',
    ])
    for (const row of guarded()) expect([nameOf(row), Object.keys(PERMISSIONS)]).toEqual([nameOf(row), expect.arrayContaining([row.may])])
  })

  it('that names a row is tried here with a row of its kind', () => {
    const named = guarded().filter((row) => row.path.includes(':') || row.path.endsWith('.pdf')).map(nameOf).sort()
    expect(named).toEqual(Object.keys(ROUTES_OF_ROWS).sort())
  })

  it('is closed to nobody in particular', async () => {
    for (const row of guarded()) {
      const answer = await ask(nobody(server), row, rows)
      expect([nameOf(row), answer.status, answer.body.code]).toEqual([nameOf(row), 401, 'not-signed-in'])
    }
  })

  it.each(ROLES)('is open to the %s where the permission table says so, else forbidden before anything is looked at', async (role) => {
    const client = own.get(role)
    if (!client) throw new Error(`No client for ${role}.`)
    for (const row of guarded()) {
      const answer = await ask(client, row, nowhere())
      const place = `${role}: ${nameOf(row)}`
      if (!isHeld(role, row)) expect([place, answer.status, answer.body.code]).toEqual([place, 403, 'not-allowed'])
      else if (nameOf(row) in ROUTES_OF_ROWS) expect([place, answer.status, answer.body.code]).toEqual([place, 404, 'not-found'])
      else expect([place, answer.status < 500 && answer.status !== 403]).toEqual([place, true])
      if (answer.status >= 400) {
        expect([place, answer.headers['content-type']]).toEqual([place, expect.stringContaining('application/problem+json')])
        expect(Object.keys(PROBLEMS)).toContain(answer.body.code)
      }
    }
  })

  it('that shows a row shows it to those of ours who may read it', async () => {
    for (const row of ofRows().filter(({ method }) => method === 'get'))
      for (const [role, client] of own) {
        const answer = await ask(client, row, rows)
        expect([role, nameOf(row), answer.status]).toEqual([role, nameOf(row), isHeld(role, row) ? 200 : 403])
      }
  })

  it.each([...ROLES.map((role) => `${role} of another company`), 'owner of another customer'])('answers the %s as if our rows were not there, and changes nothing of ours', async (name) => {
    const stranger = strangers.get(name)
    if (!stranger) throw new Error(`No client for ${name}.`)
    const [before, mails] = [await contentOf(ours.id), server.mails.length]
    expect(before).not.toBe(await contentOf(uuid()))
    for (const row of ofRows()) {
      const [foreign, absent] = [await ask(stranger.client, row, rows), await ask(stranger.client, row, nowhere())]
      const place = `${name}: ${nameOf(row)}`
      expect([place, foreign.status]).toEqual([place, isHeld(stranger.role, row) ? 404 : 403])
      expect([place, { ...foreign.body, instance: '' }]).toEqual([place, { ...absent.body, instance: '' }])
    }
    expect(await contentOf(ours.id)).toBe(before)
    expect(server.mails).toHaveLength(mails)
  })
})
