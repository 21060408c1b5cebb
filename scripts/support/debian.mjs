import { capture, isOnPath, isRoot, show } from './commands.mjs'
import { Stop, say } from './say.mjs'

/**
 * Installs those Debian packages whose `isPresent` says no: as root, else by sudo where it asks for no password.
 * @throws Stop with the one command to run where neither is possible
 */
export async function ensureDebianPackages(wanted) {
  const missing = wanted.filter(({ isPresent }) => !isPresent()).map(({ name }) => name)
  if (missing.length === 0) return
  const names = missing.join(' ')
  if (!isOnPath('apt-get'))
    throw new Stop(`Weighback needs ${names}, and this machine has no apt-get: install what corresponds to Debian's packages of these names.`)
  const asRoot = isRoot ? [] : await sudo(names)
  say(`Installing Debian's ${names} …`)
  const apt = (...args) => {
    const [program, ...rest] = [...asRoot, 'env', 'DEBIAN_FRONTEND=noninteractive', 'apt-get', ...args]
    return show(program, rest, { isUntouched: true })
  }
  const isDone = (await apt('update', '-q')) === 0 && (await apt('install', '-q', '-y', '--no-install-recommends', ...missing)) === 0
  const still = wanted.filter(({ isPresent }) => !isPresent()).map(({ name }) => name)
  if (!isDone || still.length > 0)
    throw new Stop(`Debian's ${still.join(' ') || names} could not be installed; apt-get says why above. Then start again.`)
}

async function sudo(names) {
  if (isOnPath('sudo') && (await capture('sudo', ['-n', 'true'])).code === 0) return ['sudo', '-n']
  const command = `apt-get update && apt-get install -y ${names}`
  throw new Stop(
    isOnPath('sudo')
      ? `Weighback needs Debian's ${names}. Run this once, then start again:\n\n  sudo sh -c '${command}'\n`
      : `Weighback needs Debian's ${names}. Run this once as root, then start again:\n\n  ${command}\n`,
  )
}
