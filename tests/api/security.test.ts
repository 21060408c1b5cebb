import { mkdtempSync, mkdirSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import supertest from 'supertest'
import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { createApp } from '../../server/app'
import { asAdmin } from '../support/database'
import { aCompany, aServer, OUR_HEADER, type TestServer } from '../support/server'

let server: TestServer
/** The same application with a client folder of one page, served over https by its own account. */
let served: ReturnType<typeof createApp>
beforeAll(async () => {
  server = await aServer()
  const clientDir = mkdtempSync(join(tmpdir(), 'weighback-client-'))
  mkdirSync(join(clientDir, 'assets'))
  writeFileSync(join(clientDir, 'index.html'), '<meta property="csp-nonce" nonce="%CSP_NONCE%"><title>page</title>')
  served = createApp({ ...server.house, config: { ...server.house.config, clientDir, isSecure: true, baseUrl: 'https://weighback.example' } })
})
afterAll(async () => { await server.close() })

describe('every answer', () => {
  it.each(['/', '/circuits/some-page', '/api/me', '/api/no-such-route', '/health'])('of %s carries the headers that keep a page safe', async (path) => {
    const { headers } = await supertest(served).get(path).set('Accept', 'text/html,application/json')
    const policy = headers['content-security-policy'] ?? ''
    expect(policy).not.toMatch(/unsafe-inline|unsafe-eval/)
    for (const part of ["default-src 'self'", "object-src 'none'", "base-uri 'none'", "frame-ancestors 'none'"]) expect(policy).toContain(part)
    expect(headers['strict-transport-security']).toBe('max-age=31536000; includeSubDomains')
    expect(headers['x-content-type-options']).toBe('nosniff')
    expect(headers['referrer-policy']).toBe('same-origin')
    expect(headers['x-powered-by']).toBeUndefined()
  })

  it('that is a page has a nonce of its own, the same in the page and in its policy', async () => {
    const pages = await Promise.all([1, 2].map(() => supertest(served).get('/sites').set('Accept', 'text/html')))
    const nonces = pages.map((page) => /nonce="([^"]+)"/.exec(page.text)?.[1] ?? '')
    for (const [index, page] of pages.entries()) expect(page.headers['content-security-policy']).toContain(`'nonce-${nonces[index]}'`)
    expect(nonces[0]).not.toBe(nonces[1])
    expect(nonces[0]?.length).toBeGreaterThan(16)
  })

  it('of the API is kept by nobody on the way', async () => {
    const { officer } = await aCompany(server)
    expect((await officer.get('/api/me').expect(200)).headers['cache-control']).toBe('no-store')
  })

  it('that is an error says what to do and shows nothing of the inside', async () => {
    const { officer } = await aCompany(server)
    const tooLarge = await officer.post('/api/customers', { name: 'x'.repeat(300_000) })
    expect([tooLarge.status, tooLarge.body.code]).toEqual([413, 'body-too-large'])
    const unreadable = await supertest(server.app).post('/api/customers').set({ ...OUR_HEADER, Cookie: officer.cookie, 'Content-Type': 'application/json' }).send('{"name":')
    expect([unreadable.status, unreadable.body.code]).toEqual([400, 'unreadable-body'])
    for (const { body } of [tooLarge, unreadable]) {
      expect(JSON.stringify(body)).not.toMatch(/node_modules|at \w+ \(|select |SyntaxError/)
      expect(body.detail.length).toBeGreaterThan(10)
    }
  })
})

describe('a server that cannot reach its database', () => {
  it('says so with 503 and when to come again, and is well again afterwards', async () => {
    const closed = await aServer()
    const { officer } = await aCompany(closed)
    // no connection is let in any more, and those that stand are cut
    await asAdmin('postgres', async (client) => {
      await client.query(`alter database ${closed.database} connection limit 0`)
      await client.query('select pg_terminate_backend(pid) from pg_stat_activity where datname = $1', [closed.database])
    })
    const answer = await officer.get('/api/customers')
    expect([answer.status, answer.body.code]).toEqual([503, 'unavailable'])
    expect(Number(answer.headers['retry-after'])).toBeGreaterThan(0)
    await asAdmin('postgres', (client) => client.query(`alter database ${closed.database} connection limit -1`))
    await expect.poll(async () => (await officer.get('/api/customers')).status).toBe(200)
    await closed.close()
  })
})
