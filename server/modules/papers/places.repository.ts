import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import type { FullChargeRow, SiteRow } from './wire'

/** A site with its owner; null where it is not there or not this person's to see. */
export async function siteRow(tx: Tx, who: Actor, siteId: string): Promise<SiteRow | null> {
  const [row] = await tx.query(
    `select s.id, s.name, s.street, s.city, s.region, s.postal_code, s.country, s.time_zone, s.jurisdiction, s.leak_rate_method,
            c.name as customer_name, c.address as customer_address
       from site s join customer c on c.company_id = s.company_id and c.id = s.customer_id
      where s.company_id = $1 and s.id = $2 and ($3::uuid[] is null or s.customer_id = any ($3::uuid[]))`,
    [who.companyId, siteId, who.customerIds]) as SiteRow[]
  return row ?? null
}

export interface CircuitRow {
  id: string
  system_tag: string
  system_name: string
  location: string | null
  maker: string | null
  model: string | null
  serial: string | null
  name: string
  refrigerant: string
  category: string
  status: string
  commissioned_on: string | null
}

/** The circuits of a site, or those of them that are named, by system and name. */
export const circuitRows = async (tx: Tx, companyId: string, siteId: string, circuitIds: string[] | null): Promise<CircuitRow[]> =>
  await tx.query(
    `select c.id, sy.tag as system_tag, sy.name as system_name, sy.location, sy.maker, sy.model, sy.serial, c.name, c.refrigerant, c.category, c.status, c.commissioned_on
       from circuit c join system sy on sy.company_id = c.company_id and sy.id = c.system_id
      where c.company_id = $1 and c.site_id = $2 and ($3::uuid[] is null or c.id = any ($3::uuid[]))
      order by sy.tag, c.name, c.id`, [companyId, siteId, circuitIds]) as CircuitRow[]

/** Full charges in the order in which they came into force, those of a later day left out. */
export const fullChargeRows = async (tx: Tx, companyId: string, circuitIds: string[], until: string): Promise<FullChargeRow[]> =>
  await tx.query(
    `select f.circuit_id, f.method, f.mass_kg::text, f.range_low_kg::text, f.range_high_kg::text, f.effective_on, f.note, p.name as person_name
       from full_charge f join person p on p.company_id = f.company_id and p.id = f.person_id
      where f.company_id = $1 and f.circuit_id = any ($2::uuid[]) and f.effective_on <= $3
      order by f.effective_on, f.recorded_at`, [companyId, circuitIds, until]) as FullChargeRow[]

export const companyName = async (tx: Tx, companyId: string): Promise<string> => {
  const [row] = await tx.query('select name from company where id = $1', [companyId]) as { name: string }[]
  return row?.name ?? ''
}
