import type { YearlyCylinderRow } from '../../../shared/api/cylinders'
import type { PlainDate } from '../../../shared/dates/plain-date'
import type { Tx } from '../../database'
import type { EntryRow } from '../../papers/entries'
import { rowsByCursor } from './cursor'
import entriesSql from './entries.sql?raw'
import yearlyCylindersSql from './yearly-cylinders.sql?raw'

/** The yearly ledger by refrigerant and cylinder. */
export const yearlyCylinderRows = (tx: Tx, companyId: string, year: number): AsyncGenerator<YearlyCylinderRow> =>
  rowsByCursor<YearlyCylinderRow>(tx, yearlyCylindersSql, [companyId, `${year}-01-01`, `${year}-12-31`])

/** Every entry of a period, oldest first; an open end is null. */
export async function* entryRowsOf(tx: Tx, companyId: string, from: PlainDate | null, to: PlainDate | null): AsyncGenerator<EntryRow> {
  // The planner plans for the last row and would sort the whole ledger first; along the index the first row comes at once, and the last no later.
  await tx.query('set local enable_sort = off')
  yield* rowsByCursor<EntryRow>(tx, entriesSql, [companyId, from, to], { asArrays: true })
}
