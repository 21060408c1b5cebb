import { createHash } from 'node:crypto'
import { readdirSync, readFileSync, rmSync, statSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { show } from './commands.mjs'
import { inProject } from './project.mjs'
import { Stop, say } from './say.mjs'

const SOURCES = ['src', 'server', 'shared', 'migrations', 'fixtures', 'public', 'index.html', 'vite.config.ts', 'tsconfig.json', 'package-lock.json']

/**
 * Builds client and server into `folder`/client and `folder`/server, if their sources changed since the last time.
 * @throws Stop if the build fails
 */
export async function ensureBuild(folder) {
  const mark = join(folder, 'built-from')
  const hash = hashOfSources()
  if (readIfThere(mark) === hash) return
  say('Building …')
  rmSync(mark, { force: true })
  await build([], join(folder, 'client'))
  await build(['--ssr'], join(folder, 'server'))
  writeFileSync(mark, hash)
}

async function build(args, outDir) {
  const vite = inProject('node_modules/vite/bin/vite.js')
  const code = await show(process.execPath, [vite, 'build', ...args, '--outDir', outDir, '--emptyOutDir', '--logLevel', 'warn'])
  if (code !== 0) throw new Stop('The build failed; the reason stands above.')
}

function hashOfSources() {
  const hash = createHash('sha256')
  for (const file of SOURCES.flatMap((source) => filesUnder(inProject(source)))) hash.update(file).update('\0').update(readFileSync(file)).update('\0')
  return hash.digest('hex')
}

function filesUnder(path) {
  const found = statSync(path, { throwIfNoEntry: false })
  if (!found) return []
  if (!found.isDirectory()) return [path]
  return readdirSync(path).sort().flatMap((name) => filesUnder(join(path, name)))
}

function readIfThere(file) {
  try {
    return readFileSync(file, 'utf8')
  } catch (error) {
    if (error.code === 'ENOENT') return null
    throw error
  }
}
