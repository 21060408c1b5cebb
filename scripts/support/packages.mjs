import { createHash } from 'node:crypto'
import { readFileSync, writeFileSync } from 'node:fs'
import { inProject } from './project.mjs'
import { Stop, say } from './say.mjs'
import { show } from './commands.mjs'

const OLDEST_NODE = 20
const mark = inProject('node_modules/.weighback-lock')

/** Installs the npm packages of the lock where they are missing or of another lock. */
export async function ensurePackages() {
  if (Number(process.versions.node.split('.')[0]) < OLDEST_NODE)
    throw new Stop(`Weighback needs Node ${OLDEST_NODE} or newer; this is ${process.versions.node}.`)
  const lock = readFileSync(inProject('package-lock.json'), 'utf8')
  const hash = createHash('sha256').update(lock).digest('hex')
  if (readIfThere(mark) === hash) return
  if (!isInstalled(lock)) {
    say('Installing the npm packages …')
    if ((await npm(['ci', '--no-progress'])) !== 0)
      throw new Stop('The npm packages could not be installed; npm says why above. Mostly the network or the disk is to blame. Then start again.')
  }
  writeFileSync(mark, hash)
}

/** Whether node_modules holds what the lock lists, by npm's own record of what it installed. */
function isInstalled(lock) {
  const record = readIfThere(inProject('node_modules/.package-lock.json'))
  if (record === null) return false
  const wanted = JSON.parse(lock).packages
  const present = JSON.parse(record).packages
  const isSame = (path) => present[path]?.version === wanted[path].version && present[path]?.integrity === wanted[path].integrity
  return (
    Object.keys(present).every((path) => path in wanted) &&
    Object.keys(wanted).every((path) => path === '' || isSame(path) || (wanted[path].optional && !(path in present)))
  )
}

function readIfThere(file) {
  try {
    return readFileSync(file, 'utf8')
  } catch (error) {
    if (error.code === 'ENOENT') return null
    throw error
  }
}

/** Calls the npm that started this script, else the one on the path. */
function npm(args) {
  const npmFile = process.env.npm_execpath
  return npmFile?.endsWith('.js') ? show(process.execPath, [npmFile, ...args]) : show('npm', args)
}
