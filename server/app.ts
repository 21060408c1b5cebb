import cookieParser from 'cookie-parser'
import express, { Router, type Express, type Request } from 'express'
import { pinoHttp } from 'pino-http'
import type { Actor } from './actor'
import { client } from './middleware/client'
import { requestLimits } from './middleware/limits'
import { writeProblems } from './middleware/problems'
import { headers, makeNonce, refuseForged } from './middleware/security'
import type { House } from './house'
import { cookieOf } from './modules/session/cookies'
import { findActorRow } from './modules/session/session.repository'
import { readAccess } from './modules/session/tokens'
import { Problem } from './problem'
import { mount } from './route'
import { routeTable } from './routes'

const MOST_BODY = '200kb' // far above any form; uploads have their own limit

/** The Express application, built without listening. */
export function createApp(house: House): Express {
  const app = express()
  app.disable('x-powered-by')
  app.set('query parser', 'simple')
  app.use(pinoHttp({ logger: house.log, autoLogging: house.config.mode === 'production', redact: ['req.headers.cookie', 'req.headers.authorization', 'res.headers["set-cookie"]'] }))
  app.use(makeNonce, headers(house.config))
  app.use('/api', noStore, refuseForged(house.config), cookieParser(), express.json({ limit: MOST_BODY, strict: false }))
  const api = Router()
  mount(api, routeTable(house), (request) => findActor(house, request), requestLimits())
  app.use(api)
  app.use('/api', () => { throw new Problem('not-found', { subject: 'page' }) })
  app.get('/health', (_request, response) => { response.json({ status: 'up' }) })
  app.get('/ready', async (_request, response) => {
    await house.database.query('select 1')
    response.json({ status: 'ready' })
  })
  if (house.config.clientDir) app.use(client(house.config.clientDir))
  app.use(writeProblems(house))
  return app
}

const noStore: express.RequestHandler = (_request, response, next) => {
  response.set('Cache-Control', 'no-store')
  next()
}

/** Who asks, by the access cookie and what the database says about that session now. */
async function findActor(house: House, request: Request): Promise<Actor | null> {
  const token = cookieOf(house.config, request, 'access')
  const claims = token ? readAccess(token, house.config.secret) : null
  if (!claims) return null
  const row = await findActorRow(house.database, claims.companyId, claims.sessionId)
  if (!row) return null
  return {
    ...claims, personId: row.person_id, name: row.name, email: row.email, role: row.role, locale: row.locale,
    customerIds: row.role === 'owner' ? row.customer_ids : null,
  }
}
