import type { Page } from '../../../shared/api/page'
import type { WireSite } from '../../../shared/api/places'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { SitesQuery } from './sites.dto'

type Row = Omit<WireSite, 'may'> & { page_key: unknown }
const SORTS: Record<string, SortKey> = { name: { sql: 's.name', type: 'text' }, customer: { sql: 'c.name', type: 'text' }, city: { sql: 's.city', type: 'text' } }

const SELECT = (key: string): string => `
  select s.id, s.customer_id as "customerId", c.name as "customerName", s.name, s.street, s.city, s.region, s.postal_code as "postalCode", s.country,
         s.time_zone as "timeZone", s.elevation_m as "elevationM", s.jurisdiction, s.leak_rate_method as "leakRateMethod", s.rule_packs as "rulePacks",
         s.version, ${key} as page_key,
         (select count(*)::int from system y where y.company_id = s.company_id and y.site_id = s.id) as "systemCount",
         (select count(*)::int from circuit t where t.company_id = s.company_id and t.site_id = s.id) as "circuitCount",
         (select count(*)::int from circuit_standing t where t.company_id = s.company_id and t.site_id = s.id and t.standing = 'over') as "overCount",
         (select count(*)::int from circuit_standing t where t.company_id = s.company_id and t.site_id = s.id and t.standing = 'near') as "nearCount",
         (select count(*)::int from circuit_standing t where t.company_id = s.company_id and t.site_id = s.id and t.standing = 'flat') as "flatCount"
    from site s join customer c on c.company_id = s.company_id and c.id = s.customer_id
   where s.company_id = $1 and ($2::uuid[] is null or s.customer_id = any ($2::uuid[]))`

export async function listSites(tx: Tx, who: Actor, query: SitesQuery): Promise<Page<WireSite>> {
  const parameters: unknown[] = [who.companyId, who.customerIds]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', s.name, c.name, s.street, s.city, s.region, s.postal_code) ilike $${parameters.length}`
  })
  if (query.customerId) {
    parameters.push(query.customerId)
    wheres.push(`s.customer_id = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, 'name', 's.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who))
}

export async function siteById(tx: Tx, who: Actor, id: string): Promise<WireSite | null> {
  const [row] = await tx.query(`${SELECT('null')} and s.id = $3`, [who.companyId, who.customerIds, id]) as Row[]
  return row ? wire(row, who) : null
}

export const circuitIdsOfSite = async (tx: Tx, companyId: string, siteId: string): Promise<string[]> =>
  (await tx.query('select id from circuit where company_id = $1 and site_id = $2', [companyId, siteId]) as { id: string }[]).map(({ id }) => id)

const wire = ({ page_key: _key, ...row }: Row, who: Actor): WireSite => ({ ...row, may: held(who, ['site.update', 'system.update']) })
