import { existsSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { runCommand } from './processes.mjs'
import { hashOf, ROOT } from './project.mjs'
import { Advice, say } from './say.mjs'

const MARK = join(ROOT, 'node_modules', '.weighback-lock')

/** Installs the npm packages of the lock file where they are missing or the lock has changed. */
export async function ensurePackages() {
  const lock = hashOf(['package-lock.json'])
  if (existsSync(MARK) && readFileSync(MARK, 'utf8') === lock) return
  say('Installing the npm packages …')
  const { code } = await runCommand('npm', ['ci', '--no-fund', '--no-audit'], { cwd: ROOT })
  if (code !== 0) throw new Advice('The npm packages could not be installed. Check the network and that the disk has room, then start again.')
  writeFileSync(MARK, lock)
}
