import { chownSync, mkdirSync, readFileSync, statfsSync, statSync, writeFileSync } from 'node:fs'
import { execFileSync } from 'node:child_process'
import { databaseUser } from './postgresql.mjs'

let ids = null

function databaseUserIds() {
  ids ??= ['-u', '-g'].map((option) => Number(execFileSync('id', [option, databaseUser], { encoding: 'utf8' })))
  return ids
}

/** Gives a file or folder to the user that PostgreSQL runs as. */
export function giveToDatabase(path) {
  if (databaseUser) chownSync(path, ...databaseUserIds())
}

/** Makes a folder that only PostgreSQL's user may enter. */
export function makeDatabaseFolder(path) {
  mkdirSync(path, { recursive: true, mode: 0o700 })
  giveToDatabase(path)
}

/** Writes a file that only PostgreSQL's user may read. */
export function writeForDatabase(path, text) {
  writeFileSync(path, text, { mode: 0o600 })
  giveToDatabase(path)
}

const MEGABYTE = 1_048_576

export function freeMegabytes(folder) {
  const { bavail, bsize } = statfsSync(folder)
  return Math.floor((bavail * bsize) / MEGABYTE)
}

export const sizeOf = (file) => statSync(file, { throwIfNoEntry: false })?.size ?? 0

const QUOTED = 8 // lines

/** The last lines of a log, indented for quoting; of those behind `from` bytes, so that nothing of an earlier run is taken for the reason. */
export function lastLines(file, from = 0) {
  if (sizeOf(file) <= from) return '  (nothing was written)'
  return readFileSync(file).subarray(from).toString('utf8').trimEnd().split('\n').slice(-QUOTED).map((line) => `  ${line}`).join('\n')
}
