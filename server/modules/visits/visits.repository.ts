import type { Page } from '../../../shared/api/page'
import type { WireVisit } from '../../../shared/api/places'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { VisitsQuery } from './visits.dto'

type Row = Omit<WireVisit, 'may'> & { page_key: unknown }
const SORTS: Record<string, SortKey> = { date: { sql: 'v.visited_on', type: 'date' } }

const SELECT = (key: string): string => `
  select v.id, v.site_id as "siteId", s.name as "siteName", c.name as "customerName", v.visited_on as "visitedOn", v.remark, v.person_id as "personId",
         p.name as "personName", ${key} as page_key,
         (select count(*)::int from posting o where o.company_id = v.company_id and o.visit_id = v.id) as "postingCount",
         (select coalesce(json_agg(json_build_object('id', k.id, 'calculator', k.calculator, 'title', k.title, 'lines', k.lines, 'personName', q.name, 'recordedAt', k.recorded_at)
                   order by k.recorded_at), '[]')
            from visit_calculation k join person q on q.company_id = k.company_id and q.id = k.person_id
           where k.company_id = v.company_id and k.visit_id = v.id) as calculations
    from visit v
    join site s on s.company_id = v.company_id and s.id = v.site_id
    join customer c on c.company_id = v.company_id and c.id = v.customer_id
    join person p on p.company_id = v.company_id and p.id = v.person_id
   where v.company_id = $1 and ($2::uuid[] is null or v.customer_id = any ($2::uuid[]))`

export async function listVisits(tx: Tx, who: Actor, query: VisitsQuery): Promise<Page<WireVisit>> {
  const parameters: unknown[] = [who.companyId, who.customerIds]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', s.name, c.name, p.name, v.remark) ilike $${parameters.length}`
  })
  if (query.siteId) {
    parameters.push(query.siteId)
    wheres.push(`v.site_id = $${parameters.length}`)
  }
  if (query.circuitId) {
    parameters.push(query.circuitId)
    wheres.push(`exists (select from posting o where o.company_id = v.company_id and o.visit_id = v.id and o.circuit_id = $${parameters.length})`)
  }
  const order = pageOrder(query, SORTS, '-date', 'v.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who))
}

export async function visitById(tx: Tx, who: Actor, id: string): Promise<WireVisit | null> {
  const [row] = await tx.query(`${SELECT('null')} and v.id = $3`, [who.companyId, who.customerIds, id]) as Row[]
  return row ? wire(row, who) : null
}

const wire = ({ page_key: _key, ...row }: Row, who: Actor): WireVisit => ({ ...row, may: held(who, ['visit.update']) })

export const visitOfCalculation = async (tx: Tx, companyId: string, id: string): Promise<string | null> =>
  (await tx.query('select visit_id from visit_calculation where company_id = $1 and id = $2', [companyId, id]) as { visit_id: string }[])[0]?.visit_id ?? null

export const customerOfVisit = async (tx: Tx, companyId: string, visitId: string): Promise<string | null> =>
  (await tx.query('select customer_id from visit where company_id = $1 and id = $2', [companyId, visitId]) as { customer_id: string }[])[0]?.customer_id ?? null
