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
export const entryRowsOf = (tx: Tx, companyId: string, from: PlainDate | null, to: PlainDate | null): AsyncGenerator<EntryRow> =>
  rowsByCursor<EntryRow>(tx, entriesSql, [companyId, from, to], { asArrays: true })
