import { spawn } from 'node:child_process'
import { closeSync, mkdirSync, openSync, renameSync } from 'node:fs'
import { randomBytes } from 'node:crypto'
import { join } from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { lastLines, sizeOf } from '../database/files.mjs'
import { dataFolder } from './project.mjs'
import { show } from './commands.mjs'
import { readSettings, writeSettings } from './settings.mjs'
import { Stop } from './say.mjs'

const READY_SECONDS = 60
const STOP_SECONDS = 15
const LARGEST_LOG = 10_000_000 // [bytes], then the log begins anew and the old one is kept beside it

const settingsFile = join(dataFolder, 'settings.json')
const log = join(dataFolder, 'server.log')

/** Signs sessions; kept, so that people stay signed in over a restart. */
function secret() {
  const settings = readSettings(settingsFile)
  if (settings.secret) return settings.secret
  const made = randomBytes(32).toString('hex')
  writeSettings(settingsFile, { ...settings, secret: made })
  return made
}

/** What the server and its commands are told. What a person set in the environment goes before. */
export function serverEnvironment({ mode, host, port, baseUrl = `http://${host}:${port}`, databases, mailUrl, mailFolder, clientFolder }) {
  return {
    WEIGHBACK_BASE_URL: baseUrl,
    WEIGHBACK_SECRET: process.env.WEIGHBACK_SECRET ?? secret(),
    WEIGHBACK_MAIL_URL: mailUrl,
    ...process.env,
    NODE_ENV: mode === 'development' ? 'development' : 'production',
    WEIGHBACK_MODE: mode,
    WEIGHBACK_HOST: host,
    WEIGHBACK_PORT: String(port),
    WEIGHBACK_DATABASE_URL: databases.appUrl,
    WEIGHBACK_OWNER_DATABASE_URL: databases.ownerUrl,
    WEIGHBACK_MAIL_DIR: mailFolder,
    ...(clientFolder ? { WEIGHBACK_CLIENT_DIR: clientFolder } : {}),
  }
}

/** Runs one of the server's commands, such as cli/migrate. @throws Stop if it fails */
export async function runServerCommand({ folder, command, env }) {
  const file = join(folder, 'cli', `${command}.js`)
  if ((await show(process.execPath, ['--enable-source-maps', file], { env })) !== 0)
    throw new Stop(`The command ${command} failed; the reason stands above.`)
}

/**
 * Starts the built server, its log in .data/server.log, and waits until it answers.
 * @returns `stop`, and `ended`: a promise that rejects with a Stop if the server ends by itself
 * @throws Stop if it ends or does not answer
 */
export async function startServer({ folder, env }) {
  const output = openLog()
  const before = sizeOf(log)
  const child = spawn(process.execPath, ['--enable-source-maps', join(folder, 'main.js')], { env, cwd: folder, detached: true, stdio: ['ignore', output, output] })
  closeSync(output)
  const exited = new Promise((resolve) => child.once('exit', resolve))
  let isStopping = false
  const ended = exited.then(() => {
    if (!isStopping) throw new Stop(`The server ended by itself. The last lines of ${log}:\n\n${lastLines(log, before)}\n`)
  })
  const stop = async () => {
    isStopping = true
    child.kill('SIGTERM')
    const isTooLate = await Promise.race([exited.then(() => false), wait(STOP_SECONDS * 1000, true, { ref: false })])
    if (isTooLate) child.kill('SIGKILL') // it had its time; the database undoes what was not finished
    await exited
  }
  try {
    await Promise.race([ended, untilReady(env, before)])
  } catch (error) {
    ended.catch(() => {}) // the one error is enough
    await stop()
    throw error
  }
  return { stop, ended }
}

async function untilReady(env, before) {
  const host = env.WEIGHBACK_HOST === '0.0.0.0' ? '127.0.0.1' : env.WEIGHBACK_HOST
  for (let waited = 0; waited < READY_SECONDS * 20; waited++) {
    const isReady = await fetch(`http://${host}:${env.WEIGHBACK_PORT}/ready`).then((answer) => answer.ok, () => false)
    if (isReady) return
    await wait(50)
  }
  throw new Stop(`The server does not answer after ${READY_SECONDS} seconds. The last lines of ${log}:\n\n${lastLines(log, before)}\n`)
}

function openLog() {
  mkdirSync(dataFolder, { recursive: true, mode: 0o700 })
  if (sizeOf(log) > LARGEST_LOG) renameSync(log, `${log}.old`)
  return openSync(log, 'a')
}
