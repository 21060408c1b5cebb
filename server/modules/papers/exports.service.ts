import { isAfter } from '../../../shared/dates/plain-date'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { cylinderLedgerCells } from '../../papers/cylinder-ledger'
import { entryCells } from '../../papers/entries'
import { badField } from '../../problem'
import { entryRowsOf, yearlyCylinderRows } from './exports.repository'
import type { PeriodQuery } from './papers.dto'

/** The yearly cylinder ledger of the company as cells, read while they are taken: the transaction must stay open. */
export const yearlyCylinders = (tx: Tx, who: Actor, year: number): AsyncIterable<string[]> =>
  cylinderLedgerCells(yearlyCylinderRows(tx, who.companyId, year), who.locale)

/** All entries of a period as cells, as above. @throws Problem bad-input where the period ends before it begins */
export function entriesOf(tx: Tx, who: Actor, { from, to }: PeriodQuery): AsyncIterable<string[]> {
  if (from && to && isAfter(from, to)) throw badField('to', 'dateOrder')
  return entryCells(entryRowsOf(tx, who.companyId, from ?? null, to ?? null), who.locale)
}
