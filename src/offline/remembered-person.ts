import type { Me } from '../../shared/api/people'

const KEY = 'weighback.me'

/** Who was signed in on this device, for a start without a line; forgotten at sign-out. */
export function rememberPerson(me: Me): void {
  localStorage.setItem(KEY, JSON.stringify(me))
}
export function forgetPerson(): void {
  localStorage.removeItem(KEY)
}
/** @returns null where nobody was signed in, or what is kept cannot be read */
export function rememberedPerson(): Me | null {
  try {
    const kept: unknown = JSON.parse(localStorage.getItem(KEY) ?? 'null')
    return typeof kept === 'object' && kept !== null && 'role' in kept && 'preferences' in kept ? kept as Me : null
  } catch {
    return null
  }
}
