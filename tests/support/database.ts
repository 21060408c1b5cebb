import { randomBytes } from 'node:crypto'
import pg from 'pg'
import { openDatabaseAsOwner } from '../../server/database'

/** Superuser address of the throw-away cluster that `npm test` starts. */
export const adminUrl = (): string => {
  const url = process.env.WEIGHBACK_TEST_ADMIN_URL
  if (!url) throw new Error('WEIGHBACK_TEST_ADMIN_URL is not set: run the tests by `npm test`, which starts PostgreSQL for them.')
  return url
}

export const OWNER_PASSWORD = 'owner-of-a-throw-away-cluster'
export const APP_PASSWORD = 'app-of-a-throw-away-cluster'
export const TEMPLATE = 'weighback_template'

const withPart = (url: string, part: { user?: string; password?: string; database: string }): string => {
  const address = new URL(url)
  if (part.user) address.username = part.user
  if (part.password) address.password = part.password
  address.pathname = `/${part.database}`
  return address.href
}

export const ownerUrl = (database: string): string => withPart(adminUrl(), { user: 'weighback_owner', password: OWNER_PASSWORD, database })
export const appUrl = (database: string): string => withPart(adminUrl(), { user: 'weighback_app', password: APP_PASSWORD, database })

export async function asAdmin<T>(database: string, work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client({ connectionString: withPart(adminUrl(), { database }) })
  await client.connect()
  try {
    return await work(client)
  } finally {
    await client.end()
  }
}

/** Makes both roles and a migrated database from which each test file copies its own. */
export async function makeTemplate(): Promise<void> {
  await asAdmin('postgres', async (client) => {
    for (const [role, password] of [['weighback_owner', OWNER_PASSWORD], ['weighback_app', APP_PASSWORD]] as const) {
      const { rowCount } = await client.query('select from pg_roles where rolname = $1', [role])
      await client.query(`${rowCount ? 'alter' : 'create'} role ${role} login nosuperuser nobypassrls password '${password}'`)
    }
    await client.query(`drop database if exists ${TEMPLATE} with (force)`)
    await client.query(`create database ${TEMPLATE} owner weighback_owner`)
  })
  const source = await openDatabaseAsOwner(ownerUrl(TEMPLATE)).initialize()
  try {
    await source.runMigrations()
  } finally {
    await source.destroy()
  }
}

/** A fresh migrated database of its own, by copying the template. @returns its name */
export async function makeDatabase(): Promise<string> {
  const name = `weighback_${randomBytes(6).toString('hex')}`
  await asAdmin('postgres', (client) => client.query(`create database ${name} template ${TEMPLATE} owner weighback_owner`))
  return name
}

export const dropDatabase = (name: string): Promise<unknown> => asAdmin('postgres', (client) => client.query(`drop database if exists ${name} with (force)`))
