import { chmodSync, mkdirSync, readFileSync, renameSync, writeFileSync } from 'node:fs'
import { dirname } from 'node:path'
import { Stop } from './say.mjs'

/** Reads a settings file; an empty object where there is none. */
export function readSettings(file) {
  let text
  try {
    text = readFileSync(file, 'utf8')
  } catch (error) {
    if (error.code === 'ENOENT') return {}
    throw error
  }
  try {
    return JSON.parse(text)
  } catch {
    throw new Stop(`The settings in ${file} cannot be read: it is not JSON. Put back a sound copy of the file.`)
  }
}

/** Writes a settings file that only its owner can read, whole or not at all. */
export function writeSettings(file, settings) {
  mkdirSync(dirname(file), { recursive: true })
  const next = `${file}.next`
  writeFileSync(next, `${JSON.stringify(settings, null, 2)}\n`, { mode: 0o600 })
  chmodSync(next, 0o600) // `mode` counts only for a file that was not there
  renameSync(next, file)
}
