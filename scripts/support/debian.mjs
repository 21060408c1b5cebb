import { existsSync } from 'node:fs'
import { runCommand } from './processes.mjs'
import { Advice, say } from './say.mjs'

/**
 * Installs Debian packages where a file that they bring is missing: as root directly, else by sudo without
 * a password, else it says the one command to run.
 */
export async function ensureDebian(packages, proof) {
  if (existsSync(proof)) return
  const command = `apt-get update && apt-get install -y ${packages.join(' ')}`
  const advice = new Advice(`Debian's ${packages.join(', ')} is missing. Install it, then start again:\n\n  sudo sh -c '${command}'\n`)
  const isRoot = process.getuid?.() === 0
  if (!existsSync('/usr/bin/apt-get')) throw advice
  if (!isRoot && (await runCommand('sudo', ['-n', 'true'], { isQuiet: true }).catch(() => ({ code: 1 }))).code !== 0) throw advice
  say(`Installing Debian's ${packages.join(', ')} …`)
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' }
  const { code, output } = isRoot
    ? await runCommand('sh', ['-c', command], { env, isQuiet: true })
    : await runCommand('sudo', ['-n', 'env', 'DEBIAN_FRONTEND=noninteractive', 'sh', '-c', command], { env, isQuiet: true })
  if (code !== 0 || !existsSync(proof)) {
    const reason = output.trim().split('\n').slice(-5).join('\n')
    throw new Advice(`Debian's ${packages.join(', ')} could not be installed:\n${reason}\n\nMend that and start again, or run by hand:\n\n  ${command}\n`)
  }
}

export const ensurePostgres = () => ensureDebian(['postgresql'], '/usr/lib/postgresql/15/bin/initdb')
export const ensureChromium = () => ensureDebian(['chromium'], '/usr/bin/chromium')
export const ensurePoppler = () => ensureDebian(['poppler-utils'], '/usr/bin/pdftotext')
