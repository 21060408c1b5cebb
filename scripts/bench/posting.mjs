import { randomBytes } from 'node:crypto'
import { execFile } from 'node:child_process'
import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { performance } from 'node:perf_hooks'
import { promisify } from 'node:util'
import { programsFor } from '../database/postgresql.mjs'
import { startThrowAway } from '../database/throw-away.mjs'
import { ensureBuild } from '../support/build.mjs'
import { runScript } from '../support/ending.mjs'
import { anyFreePort } from '../support/ports.mjs'
import { dataFolder, inProject } from '../support/project.mjs'
import { runServerCommand, serverEnvironment, startServer } from '../support/server.mjs'

const CLIENTS = 8
const WARM_UP_SECONDS = 5
const ROUND_SECONDS = 5
const ROUNDS = 5
const SAFE = ['max_connections=100'] // fsync on, defaults otherwise

/**
 * Posting a charge through the API against pgbench writing the same rows, alternating in one run: prints the
 * ratio of the medians and the latencies. Sends load to loopback only and stops by itself.
 */
const code = await runScript(async (atEnd) => {
  const folder = inProject('.build')
  await ensureBuild(folder)
  const admin = await startThrowAway(atEnd, SAFE)
  const databases = await makeDatabases(admin)
  const port = await anyFreePort()
  const env = serverEnvironment({ mode: 'demo', host: '127.0.0.1', port, databases, mailUrl: 'smtp://127.0.0.1:9', mailFolder: join(dataFolder, 'mail') })
  for (const command of ['migrate', 'load-demo']) await runServerCommand({ folder: join(folder, 'server'), command, env })
  const server = await startServer({ folder: join(folder, 'server'), env })
  atEnd(server.stop)
  const api = await signedIn(`http://127.0.0.1:${port}`)
  await postFor(api, WARM_UP_SECONDS)
  const rounds = { api: [], pgbench: [], milliseconds: [] }
  for (let round = 0; round < ROUNDS; round++) {
    rounds.pgbench.push(await pgbenchFor(admin, ROUND_SECONDS))
    const { rate, milliseconds } = await postFor(api, ROUND_SECONDS)
    rounds.api.push(rate)
    rounds.milliseconds.push(...milliseconds)
  }
  const [posting, pgbench] = [median(rounds.api), median(rounds.pgbench)]
  const at = (share) => rounds.milliseconds.sort((a, b) => a - b)[Math.floor(rounds.milliseconds.length * share)]?.toFixed(1)
  console.log(`posting ÷ pgbench, ${CLIENTS} clients: ${(posting / pgbench).toFixed(2)} (${posting.toFixed(0)} ÷ ${pgbench.toFixed(0)} a second; closed loop p50 ${at(0.5)} ms, p99 ${at(0.99)} ms)`)
  return 0
}, { interruptedCode: 130 })
process.exitCode = code

async function makeDatabases(admin) {
  const { default: pg } = await import('pg')
  const [ownerPassword, appPassword] = [randomBytes(16).toString('hex'), randomBytes(16).toString('hex')]
  const run = async (database, sql) => {
    const client = new pg.Client({ connectionString: Object.assign(new URL(admin), { pathname: `/${database}` }).href })
    await client.connect()
    await client.query(sql).finally(() => client.end())
  }
  await run('postgres', `create role weighback_owner login password '${ownerPassword}'`)
  await run('postgres', `create role weighback_app login password '${appPassword}'`)
  await run('postgres', 'create database weighback owner weighback_owner')
  await run('postgres', `
    create table bench_account (id int primary key, mass numeric(24, 14) not null);
    create table bench_posting (id bigint generated always as identity primary key, account_a int, account_b int, mass numeric(24, 14), recorded_at timestamptz default clock_timestamp());
    create table bench_entry (posting_id bigint references bench_posting, line smallint, account_id int references bench_account, mass numeric(24, 14), primary key (posting_id, line));
    insert into bench_account select id, 1000 from generate_series(1, 800) id`)
  const at = (username, password) => Object.assign(new URL(admin), { username, password, pathname: '/weighback' }).href
  return { ownerUrl: at('weighback_owner', ownerPassword), appUrl: at('weighback_app', appPassword) }
}

async function signedIn(base) {
  const { email, password } = JSON.parse(readFileSync(inProject('fixtures/demo/accounts.json'), 'utf8')).find(({ role }) => role === 'officer')
  const headers = { 'content-type': 'application/json', 'x-requested-with': 'weighback' }
  const answer = await fetch(`${base}/api/session`, { method: 'POST', headers, body: JSON.stringify({ email, password }) })
  const cookie = answer.headers.getSetCookie().map((line) => line.split(';')[0]).join('; ')
  const read = async (path) => (await fetch(`${base}${path}`, { headers: { cookie } })).json()
  const cylinders = (await read('/api/cylinders?status=in-use&limit=200')).rows.filter(({ contentKg, contents }) => Number(contentKg) > 3 && contents === 'virgin')
  const circuits = (await read('/api/circuits?limit=200')).rows.filter(({ status }) => status === 'in-service')
  const pairs = circuits.flatMap((circuit) => {
    const cylinder = cylinders.find(({ refrigerant }) => refrigerant === circuit.refrigerant)
    return cylinder ? [{ circuitId: circuit.id, cylinderId: cylinder.id, refrigerant: circuit.refrigerant }] : []
  })
  return { base, headers: { ...headers, cookie }, pairs, next: 0 }
}

async function postFor(api, seconds) {
  const { v7: uuid } = await import('uuid')
  const end = performance.now() + seconds * 1000
  const milliseconds = []
  const client = async () => {
    while (performance.now() < end) {
      const pair = api.pairs[api.next++ % api.pairs.length]
      const id = uuid()
      const now = new Date().toISOString()
      const body = JSON.stringify({
        id, kind: 'charge', occurredOn: now.slice(0, 10), occurredAt: now, massKg: '0.0001', entered: null, toCylinderId: null, partnerId: null, visitId: null, leakId: null,
        purpose: 'leak', isComplete: false, part: null, workDone: null, note: null, reversesId: null, reason: null, ...pair,
      })
      const began = performance.now()
      const answer = await fetch(`${api.base}/api/postings`, { method: 'POST', headers: { ...api.headers, 'idempotency-key': id }, body })
      if (answer.status !== 201) throw new Error(`${answer.status} ${await answer.text()}`)
      await answer.arrayBuffer()
      milliseconds.push(performance.now() - began)
    }
  }
  await Promise.all(Array.from({ length: CLIENTS }, client))
  return { rate: milliseconds.length / seconds, milliseconds }
}

async function pgbenchFor(admin, seconds) {
  const { hostname, port, username, password } = new URL(admin)
  const { stdout } = await promisify(execFile)(join(programsFor(''), 'pgbench'),
    ['-n', '-M', 'prepared', '-c', String(CLIENTS), '-j', '2', '-T', String(seconds), '-f', inProject('scripts/bench/posting.sql'), '-h', hostname, '-p', port, '-U', username, 'postgres'],
    { env: { ...process.env, PGPASSWORD: password } })
  return Number(/tps = ([\d.]+)/.exec(stdout)?.[1])
}

function median(values) {
  return [...values].sort((a, b) => a - b)[Math.floor(values.length / 2)]
}
