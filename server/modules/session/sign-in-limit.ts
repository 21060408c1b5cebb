import { MemoryStore } from 'express-rate-limit'
import { Problem } from '../../problem'

const WINDOW_MS = 15 * 60_000
const MOST_FAILURES = 10

/**
 * Ten failed sign-ins in fifteen minutes for one account from one address, then a pause. Counted per
 * address too, so that somebody else's guessing does not lock the person out.
 */
export function failedSignIns() {
  const store = new MemoryStore()
  store.init({ windowMs: WINDOW_MS } as Parameters<MemoryStore['init']>[0])
  return {
    async guard<T>(email: string, address: string, attempt: () => Promise<T>): Promise<T> {
      const key = `${email.toLowerCase()} ${address}`
      const so = await store.get(key)
      if (so && so.totalHits >= MOST_FAILURES) {
        const seconds = Math.max(1, Math.ceil(((so.resetTime?.getTime() ?? 0) - Date.now()) / 1000))
        throw new Problem('too-many-requests', { minutes: Math.ceil(seconds / 60) }, [], seconds)
      }
      try {
        const result = await attempt()
        await store.resetKey(key)
        return result
      } catch (error) {
        if (error instanceof Problem && error.code === 'wrong-credentials') await store.increment(key)
        throw error
      }
    },
  }
}
