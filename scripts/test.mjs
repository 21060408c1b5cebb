// npm test: every check. `npm test -- tests/unit` runs only the tests under that path, without what they do not need.
import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { ensurePostgresql } from './database/postgresql.mjs'
import { startThrowAway } from './database/throw-away.mjs'
import { ensureBuild } from './support/build.mjs'
import { isOnPath, show } from './support/commands.mjs'
import { ensureDebianPackages } from './support/debian.mjs'
import { runScript } from './support/ending.mjs'
import { ensurePackages } from './support/packages.mjs'
import { inProject } from './support/project.mjs'
import { say, sentenceOf } from './support/say.mjs'
import { countTests } from './support/test-count.mjs'

const CHROMIUM = '/usr/bin/chromium'
const INTERRUPTED = 130 // what a shell says after Ctrl-C

const filters = process.argv.slice(2)
const paths = filters.filter((filter) => !filter.startsWith('-'))
const isWhole = paths.length === 0
const needs = (...folders) => isWhole || paths.some((path) => folders.some((folder) => path.includes(folder)))
const needsDatabase = isWhole || !paths.every((path) => /^tests\/(unit|published|house)\b/.test(path))

const folder = inProject('.build/test')

await runScript(async (atEnd) => {
  let failed = 0
  const stage = async (name, work) => {
    say(`\n== ${name}`)
    try {
      if ((await work()) === false) throw new Error(`${name}: failed.`)
      return true
    } catch (error) {
      say(error.message === `${name}: failed.` ? error.message : sentenceOf(error))
      failed++
      return false
    }
  }
  const tool = async (file, ...args) => (await show(process.execPath, [inProject('node_modules', file), ...args])) === 0

  let tests = { passed: 0, failed: 0 }
  const isSetUp = await stage('Packages', async () => {
    await ensurePackages()
    if (needsDatabase) await ensurePostgresql()
    await ensureDebianPackages([
      ...(needs('e2e') ? [{ name: 'chromium', isPresent: () => existsSync(CHROMIUM) }] : []),
      ...(needsDatabase ? [{ name: 'poppler-utils', isPresent: () => isOnPath('pdftotext') }] : []),
    ])
  })
  if (isSetUp) {
    if (isWhole) {
      await stage('Types', () => tool('vue-tsc/bin/vue-tsc.js', '--noEmit'))
      await stage('Lint', () => tool('eslint/bin/eslint.js', '.', '--max-warnings', '0'))
    }
    if (needs('e2e', 'api')) await stage('Build', () => ensureBuild(folder))
    let adminUrl = ''
    const hasDatabase = !needsDatabase || (await stage('Database', async () => { adminUrl = await startThrowAway(atEnd) }))
    if (hasDatabase) {
      say('\n== Tests')
      tests = await runTests(adminUrl)
    }
  }
  const all = { passed: tests.passed, failed: failed + tests.failed }
  if (all.passed + all.failed === 0) say('No test was found.')
  say(`\n${all.passed} passed, ${all.failed} failed`)
  return all.failed > 0 || all.passed === 0 ? 1 : 0
}, { interruptedCode: INTERRUPTED })

async function runTests(adminUrl) {
  const report = join(folder, 'report.json')
  mkdirSync(folder, { recursive: true })
  rmSync(report, { force: true })
  const env = {
    ...process.env,
    ...(adminUrl ? { WEIGHBACK_TEST_ADMIN_URL: adminUrl } : {}),
    WEIGHBACK_TEST_BUILD: folder,
    WEIGHBACK_TEST_CHROMIUM: CHROMIUM,
  }
  const args = [inProject('node_modules/vitest/vitest.mjs'), 'run', '--reporter=default', '--reporter=json', `--outputFile.json=${report}`, ...filters]
  const code = await show(process.execPath, args, { env })
  return countTests({ code, report: existsSync(report) ? JSON.parse(readFileSync(report, 'utf8')) : null })
}
