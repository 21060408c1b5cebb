import { rmSync } from 'node:fs'
import { join } from 'node:path'
import { anyFreePort, whyNotFree } from '../support/ports.mjs'
import { Stop } from '../support/say.mjs'
import { freeMegabytes, lastLines, sizeOf, writeForDatabase } from './files.mjs'
import { programsFor, runAsDatabaseUser, SUPERUSER } from './postgresql.mjs'

const START_SECONDS = '60'
const NEEDED_MEGABYTES = 150 // an empty database of PostgreSQL 15 takes 40, its first log segments 32

const isDiskFull = (words) => /No space left on device|Disk quota exceeded|Check free disk space/.test(words)

const diskFull = (folder) =>
  new Stop(`The disk is full: the database in ${folder} cannot be written (${freeMegabytes(folder)} MB are free). Free some space and start again.`)

/**
 * Makes a data folder with a superuser's password: UTF-8, passwords only, by SCRAM.
 * @param folder  where it comes to lie; must belong to PostgreSQL's user
 */
export async function makeDataFolder({ folder, data, password }) {
  const free = freeMegabytes(folder)
  if (free < NEEDED_MEGABYTES)
    throw new Stop(`Only ${free} MB are free in ${folder}, and a new database needs ${NEEDED_MEGABYTES} MB. Free some space and start again.`)
  const passwordFile = join(folder, 'superuser-password')
  writeForDatabase(passwordFile, password) // initdb reads a file; a pipe it refuses
  try {
    const { code, output } = await runAsDatabaseUser(join(programsFor(data), 'initdb'), [
      '-D', data, '-U', SUPERUSER, '--pwfile', passwordFile, '-A', 'scram-sha-256', '-E', 'UTF8', '--locale=C.UTF-8',
    ])
    if (code === 0) return
    rmSync(data, { recursive: true, force: true })
    throw isDiskFull(output) ? diskFull(folder) : new Stop(`PostgreSQL could not make a database in ${data}:\n${output}`)
  } finally {
    rmSync(passwordFile, { force: true })
  }
}

/**
 * Starts PostgreSQL on loopback.
 * @param options  more of PostgreSQL's settings, as name=value
 * @returns the port: the one asked for, or another if somebody took that first
 */
export async function startDatabase({ folder, data, log, port, options = [], otherPort = anyFreePort }) {
  for (let attempt = 1; ; attempt++) {
    const before = sizeOf(log)
    // No socket file: its path may be longer than the system allows, and everything goes by loopback.
    const settings = ['listen_addresses=127.0.0.1', "unix_socket_directories=''", ...options].map((option) => `-c ${option}`)
    const { code } = await runAsDatabaseUser(join(programsFor(data), 'pg_ctl'), [
      'start', '-w', '-t', START_SECONDS, '-s', '-D', data, '-l', log, '-o', `-p ${port} ${settings.join(' ')}`,
    ])
    if (code === 0) return port
    const words = lastLines(log, before)
    if (isDiskFull(words)) throw diskFull(folder)
    const isTaken = /Address already in use/.test(words) || (await whyNotFree(port)) !== null
    if (!isTaken || attempt === 3) throw new Stop(`PostgreSQL cannot start. The last lines of ${log}:\n\n${words}\n`)
    port = await otherPort()
  }
}

/** Stops PostgreSQL: "fast" ends open transactions and writes everything, "immediate" is for data nobody needs again. */
export async function stopDatabase({ data, mode = 'fast' }) {
  if (!(await isRunning(data))) return
  const { code, output } = await runAsDatabaseUser(join(programsFor(data), 'pg_ctl'), ['stop', '-w', '-t', START_SECONDS, '-s', '-D', data, '-m', mode])
  if (code !== 0 && (await isRunning(data))) throw new Stop(`PostgreSQL did not stop: ${output}`)
}

export async function isRunning(data) {
  return (await runAsDatabaseUser(join(programsFor(data), 'pg_ctl'), ['status', '-D', data])).code === 0
}
