import type { Category } from '../../../shared/rules/categories'
import type { WireHistory } from '../../../shared/api/places'
import { prepared, type Tx } from '../../database'

/** What the rates and the standing of a circuit are computed from. */
export interface CircuitRecord {
  circuit_id: string
  customer_id: string
  site_id: string
  system_id: string
  refrigerant: string
  category: Category
  status: string
  commissioned_on: string | null
  installed_on: string | null
  subsector_decision: 'excepted' | 'not-excepted' | null
  leak_rate_method: 'annualizing' | 'rolling'
  rule_packs: string[]
  time_zone: string
  book_kg: string
  full_charges: WireHistory['fullCharges']
  events: WireHistory['events']
}

/**
 * The records of some circuits, each with its full charges and every event that its rates rest on, in one
 * statement. Reversed postings and reversals are left out. An opening charge counts only where it filled a new circuit.
 */
export async function circuitRecords(tx: Tx, companyId: string, circuitIds: string[]): Promise<CircuitRecord[]> {
  return prepared<CircuitRecord>(tx, 'circuit-records',
    `select c.id as circuit_id, c.customer_id, c.site_id, c.system_id, c.refrigerant, c.category, c.status, c.commissioned_on,
            sy.installed_on, sy.subsector_decision, si.leak_rate_method, si.rule_packs, si.time_zone, coalesce(b.mass_kg, 0)::text as book_kg,
            (select coalesce(json_agg(json_build_object('effectiveOn', f.effective_on, 'massKg', f.mass_kg::text) order by f.recorded_at), '[]')
               from full_charge f where f.company_id = c.company_id and f.circuit_id = c.id) as full_charges,
            (select coalesce(json_agg(e.event), '[]') from (
               select json_build_object(
                        'kind', case when p.kind = 'recovery' then 'removal' else 'addition' end, 'postingId', p.id, 'occurredOn', p.occurred_on,
                        'occurredAt', to_char(p.occurred_at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"'), 'massKg', p.mass_kg::text,
                        'leakId', p.leak_id, 'purpose', p.purpose) as event
                 from posting p
                where p.company_id = c.company_id and p.circuit_id = c.id
                  and (p.kind in ('charge', 'recovery') or (p.kind = 'opening-charge' and p.purpose = 'installation'))
                  and not exists (select from posting r where r.company_id = p.company_id and r.reverses_id = p.id)
               union all
               select json_build_object('kind', 'follow-up-passed', 'postingId', null, 'occurredOn', v.tested_on, 'occurredAt', null,
                        'massKg', null, 'leakId', null, 'purpose', null)
                 from verification v
                where v.company_id = c.company_id and v.circuit_id = c.id and v.kind = 'follow-up' and v.passed and v.shows_all_repaired
            ) e) as events
       from circuit c
       join system sy on sy.company_id = c.company_id and sy.id = c.system_id
       join site si on si.company_id = c.company_id and si.id = c.site_id
       left join balance b on b.company_id = c.company_id and b.account_id = c.id and b.refrigerant = c.refrigerant
      where c.company_id = $1 and c.id = any ($2::uuid[])`, [companyId, circuitIds])
}

export interface RateToStore {
  postingId: string
  occurredOn: string
  position: number
  massKg: string
  countedKg: string
  addedKg: string
  days: number | null
  fullChargeKg: string | null
  ratePercent: string | null
  thresholdPercent: string | null
  isAbove: boolean
  exempt: string | null
  basis: string[]
  leakId: string | null
}

/** Replaces the stored rates of a circuit by what was computed anew. */
export async function storeRates(tx: Tx, companyId: string, record: CircuitRecord, rates: RateToStore[]): Promise<void> {
  await prepared(tx, 'store-rates',
    `with kept as (
       insert into addition_rate (company_id, posting_id, circuit_id, customer_id, occurred_on, position, mass_kg, counted_kg, added_kg, days,
              full_charge_kg, rate_percent, threshold_percent, is_above, exempt, basis, leak_id)
       select $1, r."postingId", $2, $3, r."occurredOn", r.position, r."massKg", r."countedKg", r."addedKg", r.days,
              r."fullChargeKg", r."ratePercent", r."thresholdPercent", r."isAbove", r.exempt, r.basis, r."leakId"
         from jsonb_to_recordset($4::jsonb) as r ("postingId" uuid, "occurredOn" date, position integer, "massKg" numeric, "countedKg" numeric,
              "addedKg" numeric, days integer, "fullChargeKg" numeric, "ratePercent" numeric, "thresholdPercent" numeric, "isAbove" boolean,
              exempt text, basis text[], "leakId" uuid)
       on conflict (company_id, posting_id) do update set
         occurred_on = excluded.occurred_on, position = excluded.position, counted_kg = excluded.counted_kg, added_kg = excluded.added_kg,
         days = excluded.days, full_charge_kg = excluded.full_charge_kg, rate_percent = excluded.rate_percent,
         threshold_percent = excluded.threshold_percent, is_above = excluded.is_above, exempt = excluded.exempt, basis = excluded.basis, leak_id = excluded.leak_id
       -- a rate rests on what came before it: most of them stay as they are, and are not written again
       where (addition_rate.occurred_on, addition_rate.position, addition_rate.counted_kg, addition_rate.added_kg, addition_rate.days, addition_rate.full_charge_kg,
              addition_rate.rate_percent, addition_rate.threshold_percent, addition_rate.is_above, addition_rate.exempt, addition_rate.basis, addition_rate.leak_id)
             is distinct from
             (excluded.occurred_on, excluded.position, excluded.counted_kg, excluded.added_kg, excluded.days, excluded.full_charge_kg,
              excluded.rate_percent, excluded.threshold_percent, excluded.is_above, excluded.exempt, excluded.basis, excluded.leak_id)
     )
     delete from addition_rate where company_id = $1 and circuit_id = $2 and not (posting_id = any ($5::uuid[]))`,
    [companyId, record.circuit_id, record.customer_id, JSON.stringify(rates), rates.map((rate) => rate.postingId)])
}

export interface StandingToStore {
  standing: string
  ratePercent: string | null
  ratedOn: string | null
  thresholdPercent: string | null
  severity: number
  rateTenThousandths: number
}

export async function storeStanding(tx: Tx, companyId: string, record: CircuitRecord, standing: StandingToStore): Promise<void> {
  await prepared(tx, 'store-standing',
    `insert into circuit_standing (company_id, circuit_id, customer_id, site_id, standing, rate_percent, rated_on, threshold_percent, severity, rate_ten_thousandths)
     values ($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)
     on conflict (company_id, circuit_id) do update set standing = excluded.standing, rate_percent = excluded.rate_percent, rated_on = excluded.rated_on,
       threshold_percent = excluded.threshold_percent, severity = excluded.severity, rate_ten_thousandths = excluded.rate_ten_thousandths`,
    [companyId, record.circuit_id, record.customer_id, record.site_id, standing.standing, standing.ratePercent, standing.ratedOn,
      standing.thresholdPercent, standing.severity, standing.rateTenThousandths])
}

export interface StandingRow {
  circuit_id: string
  standing: string
  rate_percent: string | null
  rated_on: string | null
  threshold_percent: string | null
}

export const standingRows = async (tx: Tx, companyId: string, circuitIds: string[]): Promise<StandingRow[]> =>
  await tx.query(
    `select circuit_id, standing, trim_scale(rate_percent)::text as rate_percent, rated_on, trim_scale(threshold_percent)::text as threshold_percent
       from circuit_standing where company_id = $1 and circuit_id = any ($2::uuid[])`, [companyId, circuitIds]) as StandingRow[]

/** The stored rates of a circuit, in the order in which the additions happened. */
export const ratesOf = async <Row>(tx: Tx, companyId: string, circuitId: string): Promise<Row[]> =>
  await tx.query(
    `select posting_id as "postingId", occurred_on as "occurredOn", trim_scale(mass_kg)::text as "massKg", trim_scale(counted_kg)::text as "countedKg",
            trim_scale(added_kg)::text as "addedKg", days, trim_scale(full_charge_kg)::text as "fullChargeKg", trim_scale(rate_percent)::text as "ratePercent",
            trim_scale(threshold_percent)::text as "thresholdPercent", is_above as "isAbove", exempt, basis, leak_id as "leakId"
       from addition_rate where company_id = $1 and circuit_id = $2 order by position`, [companyId, circuitId]) as Row[]
