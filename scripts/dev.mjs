// npm run dev: the page from sources, the server built anew at each change, on the same data as npm start.
import { join } from 'node:path'
import { startCluster } from './database/cluster.mjs'
import { ensurePostgresql } from './database/postgresql.mjs'
import { demoAccounts } from './support/demo-accounts.mjs'
import { runScript } from './support/ending.mjs'
import { startMailFake } from './support/mail-fake.mjs'
import { beTheOnlyOne } from './support/only-one.mjs'
import { ensurePackages } from './support/packages.mjs'
import { anyFreePort, chosenPort } from './support/ports.mjs'
import { dataFolder, inProject, projectFolder } from './support/project.mjs'
import { say, sentenceOf } from './support/say.mjs'
import { runServerCommand, serverEnvironment, startServer } from './support/server.mjs'

const API = ['/api', '/health', '/ready']

await runScript(async (atEnd) => {
  beTheOnlyOne(atEnd)
  const host = process.env.WEIGHBACK_HOST ?? '127.0.0.1'
  const port = await chosenPort('WEIGHBACK_PORT', 8080, host)
  await ensurePackages()
  await ensurePostgresql()
  const databases = await startCluster(atEnd)
  const mailFolder = join(dataFolder, 'mail')
  const mailUrl = await startMailFake({ folder: mailFolder, atEnd })
  const apiPort = await anyFreePort()
  const baseUrl = `http://${host}:${port}`
  const env = serverEnvironment({ mode: 'development', host: '127.0.0.1', port: apiPort, baseUrl, databases, mailUrl, mailFolder })

  await watchServer({ folder: inProject('.build/dev/server'), env, atEnd })
  await servePage({ host, port, apiPort, atEnd })
  say(`\nWeighback, watching, is at ${baseUrl}\n\nDemo accounts:\n${demoAccounts()}\n`)
  await new Promise(() => {}) // until Ctrl-C
}, { interruptedCode: 0 })

/** Builds the server at each change and starts it anew; a fault in the sources leaves the watch running. */
async function watchServer({ folder, env, atEnd }) {
  const { build } = await import('vite')
  let server = null
  const startAgain = async () => {
    await server?.stop()
    server = null
    await runServerCommand({ folder, command: 'migrate', env })
    await runServerCommand({ folder, command: 'load-demo', env })
    server = await startServer({ folder, env })
    server.ended.catch((error) => say(`${sentenceOf(error)}\nIt starts again after the next change.`))
    say('The server is up.')
  }
  let turn = Promise.resolve() // one start after the other
  const watcher = await build({
    root: projectFolder, logLevel: 'warn', mode: 'development',
    build: { ssr: true, outDir: folder, emptyOutDir: true, watch: {} },
  })
  atEnd(async () => {
    await watcher.close()
    await turn
    await server?.stop()
  })
  watcher.on('event', (event) => {
    if (event.code === 'BUNDLE_END') void event.result?.close()
    if (event.code === 'END') turn = turn.then(startAgain).catch((error) => say(sentenceOf(error)))
    if (event.code === 'ERROR') say(`The server cannot be built: ${event.error.message}`)
  })
}

/** Vite's own server for the page, handing everything of the API on. */
async function servePage({ host, port, apiPort, atEnd }) {
  const { createServer } = await import('vite')
  const proxy = Object.fromEntries(API.map((path) => [path, { target: `http://127.0.0.1:${apiPort}` }]))
  const page = await createServer({ root: projectFolder, server: { host, port, strictPort: true, proxy } })
  atEnd(() => page.close())
  await page.listen()
}
