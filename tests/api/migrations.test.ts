import { afterAll, beforeAll, describe, expect, it } from 'vitest'
import type { DataSource } from 'typeorm'
import { openDatabaseAsOwner } from '../../server/database'
import { migrations } from '../../migrations'
import { asAdmin, dropDatabase, makeDatabase, ownerUrl } from '../support/database'

let database: string
let source: DataSource
beforeAll(async () => {
  database = await makeDatabase()
  source = await openDatabaseAsOwner(ownerUrl(database)).initialize()
})
afterAll(async () => {
  await source.destroy()
  await dropDatabase(database)
})

/** Everything that migrations make, by name: tables with their columns, indexes, policies, triggers, functions and rights. */
const shape = async (): Promise<unknown> => asAdmin(database, async (client) => {
  const read = async (sql: string): Promise<unknown[]> => (await client.query(sql)).rows
  return {
    columns: await read(`select table_name, column_name, data_type, is_nullable from information_schema.columns where table_schema = 'public' and table_name <> 'migration' order by 1, 2`),
    indexes: await read(`select indexdef from pg_indexes where schemaname = 'public' and tablename <> 'migration' order by 1`),
    policies: await read(`select tablename, policyname, permissive, cmd, qual from pg_policies order by 1, 2`),
    triggers: await read(`select event_object_table, trigger_name, event_manipulation from information_schema.triggers order by 1, 2, 3`),
    functions: await read(`select proname from pg_proc join pg_namespace n on n.oid = pronamespace where n.nspname = 'public' order by 1`),
    rights: await read(`select table_name, privilege_type from information_schema.role_table_grants where grantee = 'weighback_app' order by 1, 2`),
  }
})

describe('migrations', () => {
  it('leave nothing behind on the way down, and the same house on the way up again', async () => {
    const before = await shape()
    for (const _migration of migrations) await source.undoLastMigration({ transaction: 'each' })
    expect(await shape()).toEqual({ columns: [], indexes: [], policies: [], triggers: [], functions: [], rights: [] })
    await source.runMigrations()
    expect(await shape()).toEqual(before)
  })

  it('stand in the index in the order of their times, under their own names', () => {
    const names = migrations.map((migration) => new migration().name)
    expect([...names].sort((a, b) => Number(a.slice(-13)) - Number(b.slice(-13)))).toEqual(names)
    expect(new Set(names).size).toBe(names.length)
  })
})
