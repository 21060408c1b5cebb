// npm start: everything from a fresh machine to a page that answers. Safe to run again: it keeps what is there.
import { join } from 'node:path'
import { startCluster } from './database/cluster.mjs'
import { ensurePostgresql } from './database/postgresql.mjs'
import { ensureBuild } from './support/build.mjs'
import { demoAccounts } from './support/demo-accounts.mjs'
import { runScript } from './support/ending.mjs'
import { startMailFake } from './support/mail-fake.mjs'
import { beTheOnlyOne } from './support/only-one.mjs'
import { ensurePackages } from './support/packages.mjs'
import { chosenPort } from './support/ports.mjs'
import { dataFolder, inProject } from './support/project.mjs'
import { say } from './support/say.mjs'
import { runServerCommand, serverEnvironment, startServer } from './support/server.mjs'

await runScript(async (atEnd) => {
  beTheOnlyOne(atEnd)
  const host = process.env.WEIGHBACK_HOST ?? '127.0.0.1'
  const port = await chosenPort('WEIGHBACK_PORT', 8080, host)
  await ensurePackages()
  await ensurePostgresql()
  const buildFolder = inProject('.build')
  await ensureBuild(buildFolder)
  const databases = await startCluster(atEnd)

  const mailFolder = join(dataFolder, 'mail')
  const mailUrl = await startMailFake({ folder: mailFolder, atEnd })
  const folder = join(buildFolder, 'server')
  const env = serverEnvironment({ mode: 'demo', host, port, databases, mailUrl, mailFolder, clientFolder: join(buildFolder, 'client') })
  await runServerCommand({ folder, command: 'migrate', env })
  await runServerCommand({ folder, command: 'load-demo', env })
  const server = await startServer({ folder, env })
  atEnd(server.stop)

  say(`\nWeighback is at ${env.WEIGHBACK_BASE_URL}\n\nDemo accounts:\n${demoAccounts()}\n\nLetters it sends are kept: ${env.WEIGHBACK_BASE_URL}/mail\nCtrl-C stops it; the data stays.`)
  await server.ended
}, { interruptedCode: 0 })
