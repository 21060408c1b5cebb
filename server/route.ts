import type { Request, Response, Router } from 'express'
import type { Permission } from '../shared/access/permissions'
import type { ProblemCode } from '../shared/api/problems'
import { demand, type Actor } from './actor'
import { Problem } from './problem'
import { readInto, type DtoClass } from './middleware/input'

export type Method = 'get' | 'post' | 'patch' | 'delete'

/** What a handler gets: who asks, and input that has passed its DTO. */
export interface Call<Params, Query, Body> {
  who: Actor
  params: Params
  query: Query
  body: Body
  /** The version of If-Match; only where the route says `needsVersion`. */
  version: number
  request: Request
  response: Response
}

/** An answer other than plain 200 JSON. */
export class Answer {
  constructor(readonly status: number, readonly body: unknown = undefined, readonly headers: Record<string, string> = {}) {}
}
export const created = (body: unknown): Answer => new Answer(201, body)
export const nothing = (): Answer => new Answer(204)
/** A handler that wrote to the response itself returns this. */
export const STREAMED = Symbol('streamed')

/**
 * A route as a row of data. One function mounts all rows; the role matrix test reads the same rows.
 * `may` is a permission, or 'anyone' for the few routes before sign-in.
 */
export interface Route<Params = unknown, Query = unknown, Body = unknown> {
  method: Method
  path: string
  may: Permission | 'anyone'
  summary: string
  params?: DtoClass<Params & object>
  query?: DtoClass<Query & object>
  body?: DtoClass<Body & object>
  needsVersion?: boolean
  problems?: ProblemCode[]
  /** Requests a minute and person (or address, before sign-in); 600 where not given. */
  perMinute?: number
  handle: (call: Call<Params, Query, Body>) => Promise<unknown> | unknown
}

/** Types a row by its DTO classes and forgets them, so that rows of all kinds fit one list. */
export const route = <P = unknown, Q = unknown, B = unknown>(row: Route<P, Q, B>): Route => row as unknown as Route

/** How a request finds out who asks; null without a valid session. */
export type FindActor = (request: Request) => Promise<Actor | null>

/** Mounts every row: session, permission, input, handler, answer. */
export function mount(router: Router, rows: Route[], findActor: FindActor, limit: (row: Route, who: Actor | null, request: Request) => Promise<void>): void {
  for (const row of rows) {
    router[row.method](row.path, async (request, response) => {
      const who = row.may === 'anyone' ? null : await findActor(request)
      if (row.may !== 'anyone' && !who) throw new Problem('not-signed-in')
      response.locals.locale = who?.locale ?? 'en'
      await limit(row, who, request)
      if (who && row.may !== 'anyone') demand(who, row.may)
      const result = await row.handle({
        who: who as Actor,
        params: row.params ? readInto(row.params, request.params, 'params') : undefined,
        query: row.query ? readInto(row.query, request.query, 'query') : undefined,
        body: row.body ? readInto(row.body, request.body, 'body') : undefined,
        version: row.needsVersion ? versionOf(request) : 0,
        request,
        response,
      })
      if (result === STREAMED) return
      if (result instanceof Answer) response.status(result.status).set(result.headers)
      const body = result instanceof Answer ? result.body : result
      if (body === undefined) response.end()
      else response.set(etagOf(body)).json(body)
    })
  }
}

function versionOf(request: Request): number {
  const header = request.get('if-match')
  if (!header) throw new Problem('version-missing')
  const version = Number(/^"(\d{1,9})"$/.exec(header)?.[1])
  if (!Number.isInteger(version)) throw new Problem('changed-meanwhile')
  return version
}

function etagOf(body: unknown): Record<string, string> {
  return typeof body === 'object' && body !== null && 'version' in body ? { ETag: `"${String(body.version)}"` } : {}
}
