import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { v7 as uuid } from 'uuid'
import { mayRole, PERMISSIONS } from '../../shared/access/permissions'
import { ROLES, type Role } from '../../shared/access/roles'
import { PROBLEMS } from '../../shared/api/problems'
import type { Route } from '../../server/route'
import { routeTable } from '../../server/routes'
import { aDraft } from '../support/drafts'
import { aCircuit, aCylinder, aPartner } from '../support/builders'
import { aCompany, aServer, nobody, type Client, type TestCompany, type TestServer } from '../support/server'

let server: TestServer
let ours: TestCompany
let theirs: TestCompany
/** Ids of rows of the other company, and one of nowhere. */
let foreignIds: string[]
const clients = new Map<Role, Client>()
const mails = (): number => server.mails.length

beforeAll(async () => {
  server = await aServer()
  ours = await aCompany(server)
  theirs = await aCompany(server)
  const own = await aCircuit(ours.officer)
  for (const role of ROLES) clients.set(role, role === 'owner' ? await ours.owner(own.customerId) : ours[role])
  const circuit = await aCircuit(theirs.officer)
  const cylinder = await aCylinder(theirs.officer)
  const partner = await aPartner(theirs.officer)
  const opening = aDraft({ kind: 'opening-charge', pounds: '60', circuitId: circuit.id })
  await theirs.officer.post('/api/postings', opening).set('Idempotency-Key', opening.id).expect(201)
  foreignIds = [uuid(), circuit.id, circuit.systemId, circuit.siteId, circuit.customerId, cylinder.id, partner.id, opening.id, theirs.officer.personId]
})
afterAll(async () => { await server.close() })

const guarded = (): Route[] => routeTable(server.house).filter((row) => row.may !== 'anyone')
const ask = (client: Client, row: Route, id: string) => {
  const path = row.path.replace(/:[a-z]+/gi, id) + (row.path.includes('.pdf') ? `?siteId=${id}&postingId=${id}&from=2026-01-01&to=2026-12-31` : '') + (row.path.includes('cylinder-ledger') ? '?year=2026' : '')
  switch (row.method) {
    case 'get': return client.get(path)
    case 'delete': return client.delete(path)
    case 'post': return client.post(path, {}).set('Idempotency-Key', id)
    case 'patch': return client.patch(path, {}, 1)
  }
}

describe('every route of the table', () => {
  it('names a permission that exists, or is one of the few before sign-in', () => {
    const open = routeTable(server.house).filter((row) => row.may === 'anyone').map((row) => `${row.method} ${row.path}`).sort()
    expect(open).toEqual([
      'delete /api/session', 'get /api/demo-accounts', 'get /api/dev/mail', 'get /api/invitations/:token', 'post /api/invitations/:token',
      'post /api/password/forgot', 'post /api/password/reset', 'post /api/session', 'post /api/session/refresh',
    ])
    for (const row of guarded()) expect(Object.keys(PERMISSIONS)).toContain(row.may)
  })

  it('is closed to nobody in particular', async () => {
    for (const row of guarded()) {
      const answer = await ask(nobody(server), row, uuid())
      expect([row.path, answer.status]).toEqual([row.path, 401])
      expect(answer.body.code).toBe('not-signed-in')
    }
  })

  it.each(ROLES)('gives the %s what the permission table says, and of other companies nothing', async (role) => {
    const client = clients.get(role)
    if (!client) throw new Error(`No client for ${role}.`)
    const before = mails()
    for (const row of guarded()) {
      const isHeld = row.may !== 'anyone' && mayRole(role, row.may)
      const isOfRow = row.path.includes(':') || row.path.includes('.pdf')
      for (const id of isOfRow ? foreignIds : [uuid()]) {
        const answer = await ask(client, row, id)
        const place = `${role} ${row.method} ${row.path}`
        if (!isHeld) {
          expect([place, answer.status]).toEqual([place, 403])
        } else if (isOfRow) {
          // with an empty body a wrong field may be named before the row is looked for; never is the row shown
          expect([place, answer.status >= 200 && answer.status < 300, answer.status >= 500]).toEqual([place, false, false])
          if (row.method === 'get') expect([place, answer.status]).toEqual([place, row.path.includes('.pdf') ? answer.status : 404])
        } else {
          expect([place, answer.status >= 500]).toEqual([place, false])
        }
        if (answer.status >= 400) {
          expect(answer.headers['content-type']).toContain('application/problem+json')
          expect(Object.keys(PROBLEMS)).toContain(answer.body.code)
        }
      }
    }
    expect(mails()).toBe(before)
  })
})
