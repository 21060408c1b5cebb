import type { FULL_CHARGE_METHODS } from '../../../shared/api/places'
import { plainDate } from '../../../shared/dates/plain-date'
import { percent } from '../../../shared/leak-rate/percent'
import { kg, type Mass } from '../../../shared/mass/mass'
import type { FullChargeOnPaper, LeakRateSummary, RateOnPaper } from '../../papers/leak-rate-summary'

/** Columns of `addition_rate` as text. */
export interface RateRow {
  counted_kg: string
  added_kg: string
  days: number | null
  full_charge_kg: string | null
  rate_percent: string | null
  threshold_percent: string | null
  is_above: boolean
  exempt: string | null
  basis: string[]
}
export const RATE_COLUMNS = 'r.counted_kg::text, r.added_kg::text, r.days, r.full_charge_kg::text, r.rate_percent::text, r.threshold_percent::text, r.is_above, r.exempt, r.basis'

const massOrNull = (text: string | null): Mass | null => (text === null ? null : kg(text))

export const rateOf = (row: RateRow): RateOnPaper => ({
  countedKg: kg(row.counted_kg), addedKg: kg(row.added_kg), days: row.days, fullChargeKg: massOrNull(row.full_charge_kg),
  rate: row.rate_percent === null ? null : percent(row.rate_percent), threshold: row.threshold_percent === null ? null : percent(row.threshold_percent),
  isAbove: row.is_above, exempt: row.exempt, basis: row.basis,
})

export interface FullChargeRow {
  circuit_id: string
  method: (typeof FULL_CHARGE_METHODS)[number]
  mass_kg: string
  range_low_kg: string | null
  range_high_kg: string | null
  effective_on: string
  note: string | null
  person_name: string
}

export const fullChargeOf = (row: FullChargeRow): FullChargeOnPaper => ({
  massKg: kg(row.mass_kg), method: row.method, rangeLowKg: massOrNull(row.range_low_kg), rangeHighKg: massOrNull(row.range_high_kg),
  effectiveOn: plainDate(row.effective_on), personName: row.person_name, note: row.note,
})

export interface SiteRow {
  id: string
  name: string
  street: string
  city: string
  region: string | null
  postal_code: string | null
  country: string
  time_zone: string
  jurisdiction: string
  leak_rate_method: 'annualizing' | 'rolling'
  customer_name: string
  customer_address: string | null
}

export const siteOf = (row: SiteRow): LeakRateSummary['site'] => ({
  name: row.name, street: row.street, city: row.city, region: row.region, postalCode: row.postal_code, country: row.country,
  timeZone: row.time_zone, jurisdiction: row.jurisdiction,
})
export const ownerOf = (row: SiteRow): LeakRateSummary['owner'] => ({ name: row.customer_name, address: row.customer_address })

/** Rows by a column, each group in the order in which its rows came. */
export function groupedBy<Row, Key>(rows: readonly Row[], keyOf: (row: Row) => Key): (key: Key) => Row[] {
  const groups = new Map<Key, Row[]>()
  for (const row of rows) {
    const group = groups.get(keyOf(row))
    if (group) group.push(row)
    else groups.set(keyOf(row), [row])
  }
  return (key) => groups.get(key) ?? []
}
