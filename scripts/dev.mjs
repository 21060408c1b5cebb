import { spawn } from 'node:child_process'
import { join } from 'node:path'
import { openCluster } from './database/cluster.mjs'
import { ensureRoles } from './database/roles.mjs'
import { ensurePostgres } from './support/debian.mjs'
import { startMailFake } from './support/mail-fake.mjs'
import { ensurePackages } from './support/packages.mjs'
import { runCommand } from './support/processes.mjs'
import { BUILD, DATA, readSettings, ROOT, writeSettings } from './support/project.mjs'
import { Advice, run, say } from './support/say.mjs'

/** The application while it is being written: client and server built on every change, one address. */
async function main() {
  await ensurePackages()
  await ensurePostgres()
  const settings = readSettings()
  const cluster = await openCluster({ superuserPassword: settings.superuserPassword, wantedPort: settings.databasePort })
  writeSettings({ ...settings, databasePort: cluster.port })
  const { ownerUrl, appUrl } = await ensureRoles(cluster.url, settings)
  const mailDir = join(DATA, 'mail')
  const mail = await startMailFake(mailDir)
  const port = Number(process.env.WEIGHBACK_PORT ?? 8080)
  const clientPort = port + 1
  const env = {
    ...process.env, WEIGHBACK_MODE: 'development', WEIGHBACK_PORT: String(port), WEIGHBACK_BASE_URL: `http://127.0.0.1:${clientPort}`,
    WEIGHBACK_SECRET: settings.secret, WEIGHBACK_DATABASE_URL: appUrl, WEIGHBACK_OWNER_DATABASE_URL: ownerUrl,
    WEIGHBACK_MAIL_URL: `smtp://127.0.0.1:${mail.port}?ignoreTLS=true`, WEIGHBACK_MAIL_DIR: mailDir,
  }
  const vite = join(ROOT, 'node_modules', '.bin', 'vite')
  if ((await runCommand(vite, ['build', '--ssr', '--logLevel', 'warn'], { cwd: ROOT, env })).code !== 0) throw new Advice('The server does not build; the lines above say where.')
  for (const step of ['migrate', 'load-demo']) await runCommand(process.execPath, [join(BUILD, 'server', `${step}.js`)], { cwd: ROOT, env })
  const children = [
    spawn(vite, ['build', '--ssr', '--watch', '--logLevel', 'warn'], { cwd: ROOT, env, stdio: 'inherit' }),
    spawn(process.execPath, ['--watch', join(BUILD, 'server', 'main.js')], { cwd: ROOT, env, stdio: 'inherit' }),
    spawn(vite, ['--port', String(clientPort), '--strictPort', '--host', '127.0.0.1'], { cwd: ROOT, env, stdio: 'inherit' }),
  ]
  say(`\nWeighback in development: http://127.0.0.1:${clientPort}`)
  await new Promise((resolve) => { for (const signal of ['SIGINT', 'SIGTERM']) process.once(signal, resolve) })
  for (const child of children) child.kill('SIGTERM')
  await mail.stop()
  await cluster.stop()
}

run(main)
