import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { join } from 'node:path'
import { capture, isRoot } from '../support/commands.mjs'
import { ensureDebianPackages } from '../support/debian.mjs'
import { Stop } from '../support/say.mjs'

const VERSIONS = '/usr/lib/postgresql' // where Debian puts each version's programs
const OLDEST = 15
export const SUPERUSER = 'postgres'

const versions = () =>
  existsSync(VERSIONS)
    ? readdirSync(VERSIONS).map(Number).filter((version) => version >= OLDEST && existsSync(join(VERSIONS, String(version), 'bin/initdb'))).sort((a, b) => b - a)
    : []

/** Installs Debian's PostgreSQL where it is missing. Its own cluster "main" is left alone: we make ours. */
export function ensurePostgresql() {
  return ensureDebianPackages([{ name: 'postgresql', isPresent: () => versions().length > 0 }])
}

/** Folder of the programs for a data folder: of the version that made it, or the newest for a new one. */
export function programsFor(data) {
  const mark = join(data, 'PG_VERSION')
  const version = existsSync(mark) ? Number(readFileSync(mark, 'utf8')) : versions()[0]
  if (!versions().includes(version))
    throw new Stop(`The database in ${data} was made by PostgreSQL ${version}, which is not installed. Install Debian's postgresql-${version}.`)
  return join(VERSIONS, String(version), 'bin')
}

/** PostgreSQL refuses to run as root: there it runs as Debian's user for it. */
export const databaseUser = isRoot ? 'postgres' : null

// Messages in English, so that the reasons we look for can be found.
const environment = { PATH: process.env.PATH, HOME: '/', LC_ALL: 'C' }

/** Runs one of PostgreSQL's programs as the user that may. */
export function runAsDatabaseUser(program, args) {
  return databaseUser
    ? capture('runuser', ['-u', databaseUser, '--', program, ...args], { env: environment })
    : capture(program, args, { env: environment })
}

/** Sends SQL to a database over loopback. @throws Error with PostgreSQL's words */
export async function runSql({ programs, port, password, database = 'postgres', sql }) {
  const args = ['-h', '127.0.0.1', '-p', String(port), '-U', SUPERUSER, '-d', database, '-X', '-q', '-t', '-A', '-v', 'ON_ERROR_STOP=1']
  const { code, output } = await capture(join(programs, 'psql'), args, { env: { ...environment, PGPASSWORD: password }, input: sql })
  if (code !== 0) throw new Error(`PostgreSQL refused: ${output}`)
  return output
}
