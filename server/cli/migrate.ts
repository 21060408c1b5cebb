import { openDatabaseAsOwner } from '../database'

const url = process.env.WEIGHBACK_OWNER_DATABASE_URL
if (!url) throw new Error('WEIGHBACK_OWNER_DATABASE_URL is not set: it names the database and the role that owns the tables.')
const source = await openDatabaseAsOwner(url).initialize()
try {
  const done = await source.runMigrations()
  console.log(done.length === 0 ? 'The database is up to date.' : `Migrated: ${done.map((migration) => migration.name).join(', ')}.`)
} finally {
  await source.destroy()
}
