import { MemoryStore } from 'express-rate-limit'
import type { Request } from 'express'
import type { Actor } from '../actor'
import { Problem } from '../problem'
import type { Route } from '../route'

const WINDOW_MS = 60_000
const MOST_PER_MINUTE = 600

/** Counts requests by route and person (before sign-in: by address) and refuses what is over the route's limit. */
export function requestLimits() {
  const store = new MemoryStore()
  store.init({ windowMs: WINDOW_MS } as Parameters<MemoryStore['init']>[0])
  return async (row: Route, who: Actor | null, request: Request): Promise<void> => {
    const key = `${row.method} ${row.path} ${who?.personId ?? request.ip ?? ''}`
    const { totalHits, resetTime } = await store.increment(key)
    if (totalHits <= (row.perMinute ?? MOST_PER_MINUTE)) return
    const seconds = Math.max(1, Math.ceil(((resetTime?.getTime() ?? 0) - Date.now()) / 1000))
    throw new Problem('too-many-requests', { minutes: Math.ceil(seconds / 60) }, [], seconds)
  }
}
