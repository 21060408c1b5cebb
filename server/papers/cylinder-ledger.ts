import type { YearlyCylinderRow } from '../../shared/api/cylinders'
import { isZero, kg, LB_KG } from '../../shared/mass/mass'
import { addYearly, yearlyImbalance } from '../../shared/mass/yearly-ledger'
import { Exact } from '../../shared/units/decimal'
import { say } from '../language'
import { textCell } from './csv'

/** Columns of masses in the order of the paper; the key of the title in the language file beside each. */
const COLUMNS = [
  ['openingKg', 'opening'], ['boughtKg', 'bought'], ['recoveredKg', 'recovered'], ['receivedKg', 'received'], ['transferredInKg', 'transferredIn'],
  ['takenUpKg', 'takenUp'], ['varianceKg', 'variance'], ['chargedKg', 'charged'], ['returnedKg', 'returned'], ['reclaimedKg', 'reclaimed'],
  ['destroyedKg', 'destroyed'], ['transferredOutKg', 'transferredOut'], ['closingKg', 'closing'],
] as const satisfies readonly (readonly [keyof YearlyCylinderRow, string])[]
const POUND_DIGITS = 2

/**
 * The yearly cylinder ledger as cells: per cylinder, then the total of each refrigerant; every mass in exact
 * kilograms and once more in pounds to 0.01. Rows must come in the order of their refrigerants.
 *
 * @throws Error if a row does not add up: a kind of posting would be missing in the columns
 */
export async function* cylinderLedgerCells(rows: AsyncIterable<YearlyCylinderRow>, locale: string): AsyncGenerator<string[]> {
  const text = (key: string, params: Record<string, unknown> = {}): string => say(locale, `papers.cylinders.${key}`, params)
  const titles = (unit: string): string[] => COLUMNS.map(([, title]) => text('column', { what: text(title), unit }))
  yield [text('refrigerant'), text('row'), text('cylinder'), ...titles('kg'), ...titles('lb')]
  let total: YearlyCylinderRow | null = null
  for await (const row of rows) {
    if (!isZero(yearlyImbalance(row))) throw new Error(`The yearly ledger of cylinder ${row.cylinderNumber} (${row.refrigerant}) does not add up.`)
    if (total && total.refrigerant !== row.refrigerant) {
      yield cellsOf(total, text('rowOf.total'), text('all'))
      total = null
    }
    yield cellsOf(row, text('rowOf.cylinder'), row.cylinderNumber)
    total = total ? addYearly(total, row) : row
  }
  if (total) yield cellsOf(total, text('rowOf.total'), text('all'))
}

function cellsOf(row: YearlyCylinderRow, kind: string, cylinder: string): string[] {
  const masses = COLUMNS.map(([column]) => kg(row[column]))
  return [
    row.refrigerant, kind, textCell(cylinder),
    ...masses.map((mass) => mass.toFixed()),
    ...masses.map((mass) => mass.dividedBy(LB_KG).toFixed(POUND_DIGITS, Exact.ROUND_HALF_UP).replace(/^-(0\.0+)$/, '$1')),
  ]
}
