import { createHash, randomBytes } from 'node:crypto'
import { existsSync, mkdirSync, readFileSync, readdirSync, statSync, writeFileSync } from 'node:fs'
import { dirname, join } from 'node:path'
import { fileURLToPath } from 'node:url'

export const ROOT = join(dirname(fileURLToPath(import.meta.url)), '..', '..')
export const BUILD = join(ROOT, '.build')
export const DATA = join(ROOT, '.data')

/** A name for what belongs to this copy of the project on this machine. */
export const projectName = `weighback-${createHash('sha256').update(ROOT).digest('hex').slice(0, 10)}`

export const randomSecret = () => randomBytes(32).toString('hex')

/** Settings that live as long as the data: made once, readable by their owner only. */
export function readSettings() {
  mkdirSync(DATA, { recursive: true, mode: 0o700 })
  const file = join(DATA, 'settings.json')
  const settings = existsSync(file) ? JSON.parse(readFileSync(file, 'utf8')) : {}
  const whole = { secret: randomSecret(), superuserPassword: randomSecret(), ownerPassword: randomSecret(), appPassword: randomSecret(), databasePort: null, ...settings }
  writeSettings(whole)
  return whole
}
export function writeSettings(settings) {
  writeFileSync(join(DATA, 'settings.json'), JSON.stringify(settings, null, 2), { mode: 0o600 })
}

/** A hash over every file below some paths: the same as long as nothing changed. */
export function hashOf(paths) {
  const hash = createHash('sha256')
  const add = (path) => {
    if (!existsSync(path)) return
    if (statSync(path).isDirectory()) for (const name of readdirSync(path).sort()) add(join(path, name))
    else hash.update(path.slice(ROOT.length)).update('\0').update(readFileSync(path)).update('\0')
  }
  for (const path of paths) add(join(ROOT, path))
  return hash.digest('hex')
}
