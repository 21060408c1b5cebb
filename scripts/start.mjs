import { spawn } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { openCluster } from './database/cluster.mjs'
import { ensureRoles } from './database/roles.mjs'
import { ensureBuild } from './support/build.mjs'
import { ensurePostgres } from './support/debian.mjs'
import { startMailFake } from './support/mail-fake.mjs'
import { ensurePackages } from './support/packages.mjs'
import { isFree, runCommand } from './support/processes.mjs'
import { BUILD, DATA, readSettings, ROOT, writeSettings } from './support/project.mjs'
import { Advice, run, say } from './support/say.mjs'

/** Everything from a bare machine to a served application; stops all of it on Ctrl-C. */
async function main() {
  const port = Number(process.env.WEIGHBACK_PORT ?? 8080)
  if (!(await isFree(port))) throw new Advice(`Port ${port} is taken by another program. Stop that one, or choose another port:\n\n  WEIGHBACK_PORT=${port + 1} npm start\n`)
  await ensurePackages()
  await ensurePostgres()
  await ensureBuild()
  const stops = []
  const stopAll = async () => {
    for (const stop of stops.splice(0).reverse()) await stop()
  }
  try {
    const env = await prepare(port, stops)
    const server = spawn(process.execPath, [join(BUILD, 'server', 'main.js')], { cwd: ROOT, env: { ...process.env, ...env }, stdio: 'inherit', detached: true })
    const ended = new Promise((resolve) => server.on('exit', (code) => resolve(code ?? 1)))
    stops.push(async () => {
      server.kill('SIGTERM')
      await ended
    })
    let isAsked = false
    for (const signal of ['SIGINT', 'SIGTERM', 'SIGHUP']) process.on(signal, () => {
      if (isAsked) return
      isAsked = true
      say('\nStopping …')
      server.kill('SIGTERM')
    })
    await untilReady(`http://127.0.0.1:${port}/ready`, ended)
    greet(port)
    const code = await ended
    process.exitCode = isAsked ? 0 : code
  } finally {
    await stopAll()
  }
}

async function prepare(port, stops) {
  const settings = readSettings()
  const cluster = await openCluster({ superuserPassword: settings.superuserPassword, wantedPort: settings.databasePort })
  stops.push(cluster.stop)
  writeSettings({ ...settings, databasePort: cluster.port })
  const { ownerUrl, appUrl } = await ensureRoles(cluster.url, settings)
  const mailDir = join(DATA, 'mail')
  const mail = await startMailFake(mailDir)
  stops.push(mail.stop)
  const env = {
    WEIGHBACK_MODE: 'demo', WEIGHBACK_PORT: String(port), WEIGHBACK_HOST: '127.0.0.1', WEIGHBACK_BASE_URL: `http://127.0.0.1:${port}`,
    WEIGHBACK_SECRET: settings.secret, WEIGHBACK_DATABASE_URL: appUrl, WEIGHBACK_OWNER_DATABASE_URL: ownerUrl,
    WEIGHBACK_MAIL_URL: `smtp://127.0.0.1:${mail.port}?ignoreTLS=true`, WEIGHBACK_MAIL_DIR: mailDir, WEIGHBACK_CLIENT_DIR: join(BUILD, 'client'), NODE_ENV: 'production',
  }
  for (const step of ['migrate', 'load-demo']) {
    const { code } = await runCommand(process.execPath, [join(BUILD, 'server', `${step}.js`)], { cwd: ROOT, env: { ...process.env, ...env } })
    if (code !== 0) throw new Advice(`The database could not be prepared (${step}); the lines above say why.`)
  }
  return env
}

async function untilReady(url, ended) {
  let isOver = false
  ended.then(() => { isOver = true })
  while (!isOver) {
    const answer = await fetch(url).catch(() => null)
    if (answer?.ok) return
    await new Promise((resolve) => setTimeout(resolve, 100))
  }
  throw new Advice('The server stopped before it was ready; the lines above say why.')
}

function greet(port) {
  const accounts = JSON.parse(readFileSync(join(ROOT, 'fixtures', 'demo', 'accounts.json'), 'utf8'))
  const widest = Math.max(...accounts.map(({ email }) => email.length))
  say(`\nWeighback is at http://127.0.0.1:${port}\n\nDemo accounts:`)
  for (const { role, email, password } of accounts) say(`  ${role.padEnd(14)} ${email.padEnd(widest)}  ${password}`)
  say('\nCtrl-C stops it; the data stays.')
}

run(main)
