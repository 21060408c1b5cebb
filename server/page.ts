import type { Page } from '../shared/api/page'
import { isPlainDate } from '../shared/dates/plain-date'
import { badField } from './problem'

const DEFAULT_ROWS = 50

/** One way to sort a list: the SQL of its key, and its type for the cursor's comparison. */
export interface SortKey {
  sql: string
  type: 'text' | 'integer' | 'bigint' | 'date' | 'timestamptz' | 'uuid'
}

export interface PageOrder {
  /** SQL after `where`: the rows beyond the cursor; 'true' on the first page. */
  beyond: string
  orderBy: string
  limit: number
  /** The sort key of each row as text, to be selected as `page_key`. */
  keySql: string
}

/**
 * Keyset paging: the SQL parts of a page, with the cursor's values appended to `parameters`.
 * Every sort is made unique by the row's id.
 *
 * @throws Problem bad-input for a sort or a cursor that this list does not know
 */
export function pageOrder(
  query: { sort?: string; after?: string; limit?: number },
  keys: Record<string, SortKey>, defaultSort: string, idSql: string, parameters: unknown[],
): PageOrder {
  const sort = query.sort ?? defaultSort
  const isDescending = sort.startsWith('-')
  const key = keys[isDescending ? sort.slice(1) : sort]
  if (!key) throw badField('sort', 'sort')
  const direction = isDescending ? 'desc' : 'asc'
  const order = { orderBy: `${key.sql} ${direction}, ${idSql} ${direction}`, limit: query.limit ?? DEFAULT_ROWS, keySql: `${key.sql}::text` }
  if (!query.after) return { ...order, beyond: 'true' }
  const [value, id] = readCursor(query.after, key.type)
  parameters.push(value, id)
  return { ...order, beyond: `(${key.sql}, ${idSql}) ${isDescending ? '<' : '>'} ($${parameters.length - 1}::${key.type}, $${parameters.length}::uuid)` }
}

/** Builds the answer of rows fetched with one more than the limit, each with `page_key` and `id`. */
export function pageOf<Raw extends { id: string; page_key: unknown }, Row>(raws: Raw[], limit: number, toRow: (raw: Raw) => Row): Page<Row> {
  const shown = raws.slice(0, limit)
  const last = shown.at(-1)
  return { rows: shown.map(toRow), next: raws.length > limit && last ? writeCursor(last.page_key, last.id) : null }
}

const writeCursor = (key: unknown, id: string): string =>
  Buffer.from(JSON.stringify([String(key), id])).toString('base64url')

const MOST_INTEGER = 2_147_483_647 // of PostgreSQL's `integer`; the severity of a circuit has ten digits
const UUID = /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/

const FITS: Record<SortKey['type'], (value: string) => boolean> = {
  text: () => true,
  integer: (value) => /^-?\d{1,10}$/.test(value) && Math.abs(Number(value)) <= MOST_INTEGER,
  bigint: (value) => /^-?\d{1,18}$/.test(value),
  date: isPlainDate,
  timestamptz: (value) => value.length < 40 && !Number.isNaN(Date.parse(value)) && /^\d{4}-\d{2}-\d{2} /.test(value),
  uuid: (value) => UUID.test(value),
}

function readCursor(text: string, type: SortKey['type']): [string, string] {
  try {
    const [value, id] = JSON.parse(Buffer.from(text, 'base64url').toString('utf8')) as [unknown, unknown]
    if (typeof value === 'string' && !value.includes('\0') && FITS[type](value) && typeof id === 'string' && UUID.test(id)) return [value, id]
  } catch { /* told below */ }
  throw badField('after', 'after')
}

/** Words sought, for `ilike`: each must occur somewhere; wildcards in them are taken literally. */
export const soughtWords = (search: string | undefined): string[] =>
  (search ?? '').split(/\s+/).filter(Boolean).slice(0, 6).map((word) => `%${word.replace(/[\\%_]/g, '\\$&')}%`)
