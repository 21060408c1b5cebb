import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs'
import { join } from 'node:path'
import { runCommand } from './processes.mjs'
import { BUILD, hashOf, ROOT } from './project.mjs'
import { Advice, say } from './say.mjs'

const SOURCES = ['src', 'server', 'shared', 'migrations', 'fixtures', 'index.html', 'vite.config.ts', 'package-lock.json', 'tsconfig.json']

/** Builds client and server where something changed since the last build. */
export async function ensureBuild() {
  const mark = join(BUILD, 'sources')
  const sources = hashOf(SOURCES)
  if (existsSync(mark) && readFileSync(mark, 'utf8') === sources) return
  say('Building …')
  const vite = join(ROOT, 'node_modules', '.bin', 'vite')
  const env = { ...process.env, NODE_ENV: 'production' }
  for (const args of [['build', '--logLevel', 'warn'], ['build', '--ssr', '--logLevel', 'warn']]) {
    const { code } = await runCommand(vite, args, { cwd: ROOT, env })
    if (code !== 0) throw new Advice('The build failed; the lines above say where.')
  }
  mkdirSync(BUILD, { recursive: true })
  writeFileSync(mark, sources)
}
