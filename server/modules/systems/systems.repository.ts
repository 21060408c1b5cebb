import type { Page } from '../../../shared/api/page'
import type { WireSystem } from '../../../shared/api/places'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { SystemsQuery } from './systems.dto'

type Row = Omit<WireSystem, 'may' | 'circuits'> & { page_key: unknown }
export type SystemRow = Omit<WireSystem, 'circuits'>
const SORTS: Record<string, SortKey> = { tag: { sql: 'y.tag', type: 'text' }, name: { sql: 'y.name', type: 'text' }, site: { sql: 's.name', type: 'text' } }

const SELECT = (key: string): string => `
  select y.id, y.customer_id as "customerId", c.name as "customerName", y.site_id as "siteId", s.name as "siteName", y.tag, y.name, y.location, y.maker, y.model,
         y.serial, y.category, y.installed_on as "installedOn", y.subsector_decision as "subsectorDecision", y.subsector_decided_by as "subsectorDecidedBy",
         y.subsector_reason as "subsectorReason", y.version, ${key} as page_key
    from system y
    join site s on s.company_id = y.company_id and s.id = y.site_id
    join customer c on c.company_id = y.company_id and c.id = y.customer_id
   where y.company_id = $1 and ($2::uuid[] is null or y.customer_id = any ($2::uuid[]))`

export async function pageOfSystems(tx: Tx, who: Actor, query: SystemsQuery): Promise<Page<SystemRow>> {
  const parameters: unknown[] = [who.companyId, who.customerIds]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', y.tag, y.name, y.location, y.maker, y.model, y.serial, s.name, c.name) ilike $${parameters.length}`
  })
  if (query.siteId) {
    parameters.push(query.siteId)
    wheres.push(`y.site_id = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, 'tag', 'y.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who))
}

export async function systemById(tx: Tx, who: Actor, id: string): Promise<SystemRow | null> {
  const [row] = await tx.query(`${SELECT('null')} and y.id = $3`, [who.companyId, who.customerIds, id]) as Row[]
  return row ? wire(row, who) : null
}

const wire = ({ page_key: _key, ...row }: Row, who: Actor): SystemRow => ({ ...row, may: held(who, ['system.update', 'circuit.update']) })

export const circuitIdsOfSystem = async (tx: Tx, companyId: string, systemId: string): Promise<string[]> =>
  (await tx.query('select id from circuit where company_id = $1 and system_id = $2', [companyId, systemId]) as { id: string }[]).map(({ id }) => id)
