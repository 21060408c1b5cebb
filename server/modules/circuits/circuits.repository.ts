import type { Page } from '../../../shared/api/page'
import type { CircuitStanding, WireComponent, WireFullCharge, WireLeak, WireMark, WireVerification } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { CircuitsQuery } from './circuits.dto'

/** A circuit's own columns with the names around it; what is computed of it comes from the standing module. */
export type CircuitRow = Pick<CircuitStanding,
  'id' | 'name' | 'systemId' | 'systemTag' | 'systemName' | 'siteId' | 'siteName' | 'customerId' | 'customerName' | 'refrigerant' | 'category' | 'status'> & {
  commissionedOn: string | null
  timeZone: string
  elevationM: number
  leakRateMethod: 'annualizing' | 'rolling'
  version: number
}
type Row = CircuitRow & { page_key: unknown }

const SORTS: Record<string, SortKey> = {
  severity: { sql: 't.severity', type: 'integer' },
  rate: { sql: 't.rate_ten_thousandths', type: 'bigint' },
  name: { sql: 'y.tag', type: 'text' },
  site: { sql: 's.name', type: 'text' },
}

const SELECT = (key: string): string => `
  select k.id, k.name, k.system_id as "systemId", y.tag as "systemTag", y.name as "systemName", k.site_id as "siteId", s.name as "siteName",
         k.customer_id as "customerId", c.name as "customerName", k.refrigerant, k.category, k.status, k.commissioned_on as "commissionedOn",
         s.time_zone as "timeZone", s.elevation_m as "elevationM", s.leak_rate_method as "leakRateMethod", k.version, ${key} as page_key
    from circuit_standing t
    join circuit k on k.company_id = t.company_id and k.id = t.circuit_id
    join system y on y.company_id = k.company_id and y.id = k.system_id
    join site s on s.company_id = k.company_id and s.id = k.site_id
    join customer c on c.company_id = k.company_id and c.id = k.customer_id
   where t.company_id = $1 and ($2::uuid[] is null or k.customer_id = any ($2::uuid[]))`

export async function pageOfCircuits(tx: Tx, who: Actor, query: CircuitsQuery): Promise<Page<CircuitRow>> {
  const parameters: unknown[] = [who.companyId, who.customerIds]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', y.tag, y.name, k.name, s.name, c.name, k.refrigerant, y.serial, y.location) ilike $${parameters.length}`
  })
  const filters = [['k.site_id', query.siteId], ['k.system_id', query.systemId], ['k.customer_id', query.customerId], ['t.standing', query.standing]] as const
  for (const [column, value] of filters) {
    if (value === undefined) continue
    parameters.push(value)
    wheres.push(`${column} = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, '-severity', 't.circuit_id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, ({ page_key: _key, ...row }) => row)
}

export async function circuitRows(tx: Tx, who: Actor, filter: { ids?: string[]; systemIds?: string[] }): Promise<CircuitRow[]> {
  const [column, ids] = filter.systemIds ? ['k.system_id', filter.systemIds] : ['k.id', filter.ids ?? []]
  const rows = await tx.query(`${SELECT('null')} and ${column} = any ($3::uuid[]) order by y.tag, k.name`, [who.companyId, who.customerIds, ids]) as Row[]
  return rows.map(({ page_key: _key, ...row }) => row)
}

export const fullChargesOf = async (tx: Tx, companyId: string, circuitId: string): Promise<WireFullCharge[]> =>
  await tx.query(
    `select f.id, f.method, trim_scale(f.mass_kg)::text as "massKg", trim_scale(f.range_low_kg)::text as "rangeLowKg", trim_scale(f.range_high_kg)::text as "rangeHighKg",
            f.effective_on as "effectiveOn", f.note, p.name as "personName", to_json(f.recorded_at) #>> '{}' as "recordedAt"
       from full_charge f join person p on p.company_id = f.company_id and p.id = f.person_id
      where f.company_id = $1 and f.circuit_id = $2 order by f.effective_on desc, f.recorded_at desc`, [companyId, circuitId]) as WireFullCharge[]

export const componentsOf = async (tx: Tx, companyId: string, circuitId: string): Promise<WireComponent[]> =>
  await tx.query(`select id, circuit_id as "circuitId", kind, name, position from component where company_id = $1 and circuit_id = $2 order by name, id`, [companyId, circuitId]) as WireComponent[]

/** Watch marks of a circuit and of its sisters: what wore here may wear there. */
export const marksOf = async (tx: Tx, companyId: string, circuitIds: string[]): Promise<WireMark[]> =>
  await tx.query(
    `select m.id, m.circuit_id as "circuitId", concat_ws(' ', y.tag, k.name) as "circuitName", m.component_id as "componentId", o.name as "componentName", m.text,
            m.marked_on as "markedOn", p.name as "personName", m.resolved_on as "resolvedOn"
       from watch_mark m
       join circuit k on k.company_id = m.company_id and k.id = m.circuit_id
       join system y on y.company_id = k.company_id and y.id = k.system_id
       join person p on p.company_id = m.company_id and p.id = m.person_id
       left join component o on o.company_id = m.company_id and o.id = m.component_id
      where m.company_id = $1 and m.circuit_id = any ($2::uuid[]) order by m.resolved_on nulls first, m.marked_on desc, m.id`, [companyId, circuitIds]) as WireMark[]

export const leaksOf = async (tx: Tx, companyId: string, circuitId: string): Promise<WireLeak[]> =>
  await tx.query(
    `select l.id, l.circuit_id as "circuitId", l.component_id as "componentId", o.name as "componentName", l.found_on as "foundOn", l.cause, l.method, l.position, l.note,
            p.name as "personName", l.repaired_on as "repairedOn", l.repair
       from leak l
       join person p on p.company_id = l.company_id and p.id = l.person_id
       left join component o on o.company_id = l.company_id and o.id = l.component_id
      where l.company_id = $1 and l.circuit_id = $2 order by l.found_on desc, l.id desc`, [companyId, circuitId]) as WireLeak[]

export const verificationsOf = async (tx: Tx, companyId: string, circuitId: string): Promise<WireVerification[]> =>
  await tx.query(
    `select v.id, v.circuit_id as "circuitId", v.kind, v.leak_id as "leakId", v.tested_on as "testedOn", v.type, v.passed, v.shows_all_repaired as "showsAllRepaired",
            v.note, p.name as "personName"
       from verification v join person p on p.company_id = v.company_id and p.id = v.person_id
      where v.company_id = $1 and v.circuit_id = $2 order by v.tested_on desc, v.recorded_at desc`, [companyId, circuitId]) as WireVerification[]

/** Where a component, mark, leak or test sits. */
export const circuitOfPart = async (tx: Tx, table: 'component' | 'watch_mark' | 'leak' | 'verification', companyId: string, id: string): Promise<string | null> =>
  (await tx.query(`select circuit_id from ${table} where company_id = $1 and id = $2`, [companyId, id]) as { circuit_id: string }[])[0]?.circuit_id ?? null

export const hasPostings = async (tx: Tx, companyId: string, circuitId: string): Promise<boolean> =>
  (await tx.query('select from posting where company_id = $1 and circuit_id = $2 limit 1', [companyId, circuitId]) as unknown[]).length > 0
