import type { House } from '../house'
import { sealPostings } from './seal-postings'

const EVERY_MS = 3000

/** Starts what runs beside the requests. @returns stops it and waits for what is under way */
export function startJobs(house: House): () => Promise<void> {
  let running = Promise.resolve()
  const timer = setInterval(() => {
    running = running.then(() => sealPostings(house)).catch((error: unknown) => house.log.error({ err: error }, 'sealing failed, tried again later'))
  }, EVERY_MS)
  return () => {
    clearInterval(timer)
    return running
  }
}
