import { existsSync, mkdirSync, readFileSync, rmSync } from 'node:fs'
import { join } from 'node:path'
import { openThrowAwayCluster } from './database/cluster.mjs'
import { ensureBuild } from './support/build.mjs'
import { ensureChromium, ensurePoppler, ensurePostgres } from './support/debian.mjs'
import { ensurePackages } from './support/packages.mjs'
import { runCommand } from './support/processes.mjs'
import { BUILD, randomSecret, ROOT } from './support/project.mjs'
import { run, say } from './support/say.mjs'

const RESULTS = join(BUILD, 'test-results.json')

/**
 * Type check, lint, build and every test, on a throw-away PostgreSQL. Arguments are passed on to vitest:
 * `npm test -- tests/unit` runs those alone. The last line counts.
 */
async function main() {
  const only = process.argv.slice(2)
  await ensurePackages()
  await ensurePostgres()
  await ensureChromium()
  await ensurePoppler()
  const stages = []
  const bin = (name) => join(ROOT, 'node_modules', '.bin', name)
  const stage = async (name, work) => {
    say(`\n— ${name}`)
    const isGood = await work().then((code) => code === 0, (error) => {
      console.error(error.message)
      return false
    })
    stages.push({ name, isGood })
  }
  if (only.length === 0) {
    await stage('type check', async () => (await runCommand(bin('vue-tsc'), ['--noEmit'], { cwd: ROOT })).code)
    await stage('lint', async () => (await runCommand(bin('eslint'), ['.'], { cwd: ROOT })).code)
  }
  if (only.length === 0 || only.some((path) => path.includes('e2e'))) await stage('build', async () => {
    await ensureBuild()
    return 0
  })
  const counts = await runTests(bin('vitest'), only)
  const passed = counts.passed + stages.filter(({ isGood }) => isGood).length
  const failed = counts.failed + stages.filter(({ isGood }) => !isGood).length
  for (const { name, isGood } of stages) if (!isGood) say(`failed: ${name}`)
  say(`\n${passed} passed, ${failed} failed`)
  process.exitCode = failed > 0 || counts.passed === 0 ? 1 : 0
}

async function runTests(vitest, only) {
  say('\n— tests')
  mkdirSync(BUILD, { recursive: true })
  rmSync(RESULTS, { force: true })
  const cluster = await openThrowAwayCluster(randomSecret())
  const interrupt = () => { void cluster.stop().then(() => process.exit(130)) }
  for (const signal of ['SIGINT', 'SIGTERM']) process.once(signal, interrupt)
  try {
    const { code } = await runCommand(vitest, ['run', '--reporter=default', '--reporter=json', `--outputFile.json=${RESULTS}`, ...only],
      { cwd: ROOT, env: { ...process.env, WEIGHBACK_TEST_ADMIN_URL: cluster.url, WEIGHBACK_MODE: 'test' } })
    if (!existsSync(RESULTS)) return { passed: 0, failed: 1 }
    const { numPassedTests: passed, numFailedTests, numFailedTestSuites } = JSON.parse(readFileSync(RESULTS, 'utf8'))
    // a file that does not load has no failed test of its own, and an error outside of tests shows only in the exit code
    const failed = Math.max(numFailedTests, numFailedTestSuites > 0 && numFailedTests === 0 ? numFailedTestSuites : 0, code !== 0 ? 1 : 0)
    return { passed, failed }
  } finally {
    await cluster.stop()
  }
}

run(main)
