import { RequestFailure, problemOfResponse } from './problem'

/** What goes into an address; null, undefined and empty text are left out. */
export type Query = Record<string, string | number | boolean | null | undefined>

export interface RequestOptions {
  query?: Query
  body?: unknown
  /** The version that was read: sent as If-Match, so that nobody's change is overwritten unseen. */
  version?: number
  /** The client-made id that makes a repeat harmless. */
  idempotencyKey?: string
  signal?: AbortSignal
}

type Method = 'GET' | 'POST' | 'PATCH' | 'DELETE'

const SESSION_PATHS = ['/api/session', '/api/session/refresh']
const signedOutListeners = new Set<() => void>()
let refreshing: Promise<boolean> | null = null

export const get = <Answer>(path: string, options?: RequestOptions): Promise<Answer> => request<Answer>('GET', path, options)
export const post = <Answer>(path: string, options?: RequestOptions): Promise<Answer> => request<Answer>('POST', path, options)
export const patch = <Answer>(path: string, options?: RequestOptions): Promise<Answer> => request<Answer>('PATCH', path, options)
export const del = <Answer = void>(path: string, options?: RequestOptions): Promise<Answer> => request<Answer>('DELETE', path, options)

/** The address of something to open or download, with its query. */
export function addressOf(path: string, query: Query = {}): string {
  const params = new URLSearchParams()
  for (const [name, value] of Object.entries(query)) {
    if (value !== null && value !== undefined && value !== '') params.set(name, String(value))
  }
  const text = params.toString()
  return text ? `${path}?${text}` : path
}

/** Calls back when the session has ended for good. @returns the function that stops it */
export function onSignedOut(listener: () => void): () => void {
  signedOutListeners.add(listener)
  return () => signedOutListeners.delete(listener)
}

/** @throws RequestFailure for everything but success; DOMException "AbortError" if called off by the signal */
async function request<Answer>(method: Method, path: string, options: RequestOptions = {}): Promise<Answer> {
  let response = await send(method, path, options)
  if (response.status === 401 && !SESSION_PATHS.includes(path) && (await refreshOnce())) {
    response = await send(method, path, options)
  }
  if (!response.ok) {
    const problem = await problemOfResponse(response)
    if (problem.kind === 'signed-out' && !SESSION_PATHS.includes(path)) signedOutListeners.forEach((listener) => listener())
    throw new RequestFailure(problem)
  }
  return readAnswer<Answer>(response)
}

async function send(method: Method, path: string, options: RequestOptions): Promise<Response> {
  const headers: Record<string, string> = { accept: 'application/json' }
  if (method !== 'GET') headers['x-requested-with'] = 'weighback'
  if (options.body !== undefined) headers['content-type'] = 'application/json'
  if (options.version !== undefined) headers['if-match'] = `"${options.version}"`
  if (options.idempotencyKey !== undefined) headers['idempotency-key'] = options.idempotencyKey
  try {
    return await fetch(addressOf(path, options.query), {
      method,
      headers,
      body: options.body === undefined ? undefined : JSON.stringify(options.body),
      credentials: 'same-origin',
      signal: options.signal,
    })
  } catch (thrown) {
    if (options.signal?.aborted) throw thrown
    throw new RequestFailure({ kind: 'offline' })
  }
}

/** Renews the session; requests that fail at the same time wait for the one renewal. */
function refreshOnce(): Promise<boolean> {
  refreshing ??= send('POST', '/api/session/refresh', {})
    .then((response) => response.ok)
    .finally(() => {
      refreshing = null
    })
  return refreshing
}

async function readAnswer<Answer>(response: Response): Promise<Answer> {
  const isJson = response.headers.get('content-type')?.includes('json') ?? false
  const body: unknown = isJson ? await response.json() : undefined
  // The one place where the wire is taken at its word: both sides build on shared/api.
  return body as Answer
}
