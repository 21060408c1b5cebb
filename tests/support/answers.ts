import type supertest from 'supertest'
import type { Page } from '../../shared/api/page'
import type { PostingDraft } from '../../shared/api/ledger'
import type { Client } from './server'

/** The fields that an answer names as wrong, in order of the alphabet. */
export const fieldsOf = ({ body }: supertest.Response): string[] =>
  (body as { errors?: { field: string }[] }).errors?.map(({ field }) => field).sort() ?? []

/** All rows of a list, fetched page by page until it says that there are no more. */
export async function everyPage<Row>(client: Client, path: string, limit: number): Promise<Row[]> {
  const rows: Row[] = []
  let next: string | null = ''
  while (next !== null) {
    const { body } = await client.get(`${path}${path.includes('?') ? '&' : '?'}limit=${limit}${next ? `&after=${next}` : ''}`).expect(200) as { body: Page<Row> }
    if (body.rows.length > limit) throw new Error(`${path} gave ${body.rows.length} rows where ${limit} were asked for.`)
    rows.push(...body.rows)
    next = body.next
  }
  return rows
}

/** Sends a posting as the device does. */
export const send = (client: Client, draft: PostingDraft): supertest.Test => client.post('/api/postings', draft).set('Idempotency-Key', draft.id)

/** What the trail tells of one record, oldest first. */
export async function trailOf(client: Client, subjectId: string): Promise<{ action: string; subject: string; before: object | null; after: object | null }[]> {
  const { body } = await client.get(`/api/trail?subjectId=${subjectId}&sort=at`).expect(200) as { body: Page<{ action: string; subject: string; before: object | null; after: object | null }> }
  return body.rows
}
