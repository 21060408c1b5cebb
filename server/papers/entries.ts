import { say } from '../language'
import { textCell } from './csv'

/** Columns of the export of all entries; text is guarded against formulas, the rest is numbers, dates and ids. */
export const ENTRY_COLUMNS = [
  ['postingId', 'plain'], ['kind', 'plain'], ['occurredOn', 'plain'], ['occurredAt', 'plain'], ['recordedAt', 'plain'], ['refrigerant', 'plain'],
  ['line', 'plain'], ['accountKind', 'plain'], ['accountName', 'text'], ['accountId', 'plain'], ['massKg', 'plain'], ['massLb', 'plain'],
  ['person', 'text'], ['site', 'text'], ['circuit', 'text'], ['cylinder', 'text'], ['toCylinder', 'text'], ['partner', 'text'], ['purpose', 'plain'],
  ['part', 'text'], ['workDone', 'text'], ['note', 'text'], ['reversesId', 'plain'], ['reason', 'text'], ['contentHash', 'plain'],
] as const

/** An entry with its posting, in the order of the columns. */
export type EntryRow = readonly (string | null)[]

/** All entries of the ledger as cells, the titles first. */
export async function* entryCells(rows: AsyncIterable<EntryRow>, locale: string): AsyncGenerator<string[]> {
  yield ENTRY_COLUMNS.map(([column]) => say(locale, `papers.entries.${column}`))
  for await (const row of rows)
    yield ENTRY_COLUMNS.map(([, kind], index) => (kind === 'text' ? textCell(row[index] ?? null) : (row[index] ?? '')))
}
