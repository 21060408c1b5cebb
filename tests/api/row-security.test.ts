import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import { sealCompany } from '../../server/modules/ledger/seal.service'
import { asAdmin } from '../support/database'
import { aDraft } from '../support/drafts'
import { aCircuit, aCustomer, aCylinder } from '../support/builders'
import { aCompany, aServer, type TestCompany, type TestServer } from '../support/server'

let server: TestServer
let ours: TestCompany
let theirs: TestCompany
let tables: string[]
beforeAll(async () => {
  server = await aServer()
  ours = await aCompany(server)
  theirs = await aCompany(server)
  for (const company of [ours, theirs]) {
    const circuit = await aCircuit(company.officer)
    await aCylinder(company.officer)
    const draft = aDraft({ kind: 'opening-charge', pounds: '60', circuitId: circuit.id })
    await company.officer.post('/api/postings', draft).set('Idempotency-Key', draft.id).expect(201)
  }
  tables = await asAdmin(server.database, async (client) =>
    (await client.query(`select tablename from pg_tables where schemaname = 'public' and tablename <> 'migration'`)).rows.map((row: { tablename: string }) => row.tablename))
})
afterAll(async () => { await server.close() })

const count = async (scope: { companyId: string; customerIds: string[] | null }, table: string): Promise<number> =>
  server.house.database.inCompany(scope, async (tx) => {
    // not every table may be read at all
    const [{ may }] = await tx.query(`select has_table_privilege('${table}', 'select') as may`) as [{ may: boolean }]
    if (!may) return 0
    return (await tx.query(`select count(*)::int as count from ${table}`) as [{ count: number }])[0].count
  })

describe('row security, with the application’s own filter out of the way', () => {
  it('stands on every table', async () => {
    const bare = await asAdmin(server.database, async (client) => (await client.query(`
      select c.relname from pg_class c join pg_namespace n on n.oid = c.relnamespace
       where n.nspname = 'public' and c.relkind = 'r' and c.relname <> 'migration'
         and (not c.relrowsecurity or not exists (select from pg_policy p where p.polrelid = c.oid))`)).rows)
    expect(bare).toEqual([])
    expect(tables.length).toBeGreaterThan(20)
  })

  it('shows nothing where no company is set', async () => {
    for (const table of tables) {
      const rows = await server.house.database.query<{ count: number }>(`select count(*)::int as count from ${table}`).catch(() => [{ count: 0 }])
      expect([table, rows[0]?.count]).toEqual([table, 0])
    }
  })

  it('shows each company its own rows alone', async () => {
    for (const table of tables) {
      const all = await asAdmin(server.database, async (client) => Number((await client.query(`select count(*) from ${table}`)).rows[0].count))
      const [a, b] = [await count({ companyId: ours.id, customerIds: null }, table), await count({ companyId: theirs.id, customerIds: null }, table)]
      expect([table, a + b]).toEqual([table, all])
    }
  })

  it('shows an owner without customers no place, no posting, no cylinder and no trail', async () => {
    for (const table of tables.filter((name) => !['company', 'person', 'person_session', 'person_link', 'person_customer'].includes(name)))
      expect([table, await count({ companyId: ours.id, customerIds: [] }, table)]).toEqual([table, 0])
    const customer = await aCustomer(ours.officer)
    expect(await count({ companyId: ours.id, customerIds: [customer.id] }, 'customer')).toBe(1)
  })

  it('binds the application, whose role owns no table and passes no policy', async () => {
    const [role] = await asAdmin(server.database, async (client) => (await client.query(`select rolsuper, rolbypassrls from pg_roles where rolname = 'weighback_app'`)).rows)
    expect(role).toEqual({ rolsuper: false, rolbypassrls: false })
    const owned = await asAdmin(server.database, async (client) => (await client.query(`select tablename from pg_tables where tableowner = 'weighback_app'`)).rows)
    expect(owned).toEqual([])
  })
})

describe('the ledger and the trail, in the database itself', () => {
  const LEDGER = ['posting', 'entry', 'seal', 'sealed_posting', 'trail'] as const

  it.each(LEDGER)('take no change, no deletion and no emptying of %s, from the application or from the owner of the tables', async (table) => {
    await server.house.database.inCompany({ companyId: ours.id, customerIds: null }, (tx) => sealCompany(tx, ours.id))
    const before = await count({ companyId: ours.id, customerIds: null }, table)
    expect(before).toBeGreaterThan(0)
    for (const sql of [`update ${table} set company_id = company_id`, `delete from ${table}`, `truncate ${table} cascade`]) {
      await expect(server.house.database.inCompany({ companyId: ours.id, customerIds: null }, (tx) => tx.query(sql))).rejects.toThrow(/permission denied/)
      await expect(asAdmin(server.database, (client) => client.query(`set role weighback_owner; ${sql}`))).rejects.toThrow(/append-only/)
    }
    expect(await count({ companyId: ours.id, customerIds: null }, table)).toBe(before)
  })

  it('take no row into another company', async () => {
    const insert = (table: string, columns: string, values: string) =>
      server.house.database.inCompany({ companyId: ours.id, customerIds: null }, (tx) => tx.query(`insert into ${table} (${columns}) values (${values})`))
    await expect(insert('customer', 'company_id, id, name', `'${theirs.id}', gen_random_uuid(), 'Smuggled'`)).rejects.toThrow(/row-level security/)
    await expect(insert('account', 'company_id, id, kind', `'${theirs.id}', gen_random_uuid(), 'cylinder'`)).rejects.toThrow(/row-level security/)
    await expect(insert('trail', 'company_id, id, action, subject, subject_id, subject_name', `'${theirs.id}', gen_random_uuid(), 'create', 'site', gen_random_uuid(), ''`)).rejects.toThrow(/row-level security/)
  })
})
