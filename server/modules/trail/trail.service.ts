import { v7 as uuid } from 'uuid'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'

export { listTrail } from './trail.repository'

export interface TrailNote {
  action: string
  subject: string
  subjectId: string
  subjectName: string
  before?: object | null
  after?: object | null
}

/** Notes who changed what, in the transaction of the change itself: neither stands without the other. */
export async function record(tx: Tx, who: Pick<Actor, 'companyId' | 'personId'>, note: TrailNote): Promise<void> {
  await tx.query(
    'insert into trail (company_id, id, person_id, action, subject, subject_id, subject_name, before, after) values ($1, $2, $3, $4, $5, $6, $7, $8, $9)',
    [who.companyId, uuid(), who.personId, note.action, note.subject, note.subjectId, note.subjectName,
      note.before ? JSON.stringify(note.before) : null, note.after ? JSON.stringify(note.after) : null],
  )
}

/** Only what differs, as before and after; null where nothing does. */
export function difference(before: object, after: object): { before: Record<string, unknown>; after: Record<string, unknown> } | null {
  const old = before as Record<string, unknown>
  const changed = Object.entries(after).filter(([key, value]) => JSON.stringify(old[key] ?? null) !== JSON.stringify(value ?? null))
  if (changed.length === 0) return null
  return { before: Object.fromEntries(changed.map(([key]) => [key, old[key] ?? null])), after: Object.fromEntries(changed) }
}

/** Notes a change with only what differs; nothing where nothing does. */
export async function recordChange(tx: Tx, who: Pick<Actor, 'companyId' | 'personId'>, note: Omit<TrailNote, 'before' | 'after'>, before: object, after: object): Promise<void> {
  const changed = difference(before, after)
  if (changed) await record(tx, who, { ...note, ...changed })
}
