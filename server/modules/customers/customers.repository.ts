import type { Page } from '../../../shared/api/page'
import type { WireCustomer } from '../../../shared/api/places'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import type { ListDto } from '../../fields'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'

type Row = Omit<WireCustomer, 'may'> & { page_key: unknown }
const SORTS: Record<string, SortKey> = { name: { sql: 'c.name', type: 'text' } }

const SELECT = (key: string): string => `
  select c.id, c.name, c.contact_name as "contactName", c.email, c.phone, c.address, c.note, c.version, ${key} as page_key,
         (select count(*)::int from site s where s.company_id = c.company_id and s.customer_id = c.id) as "siteCount"
    from customer c where c.company_id = $1 and ($2::uuid[] is null or c.id = any ($2::uuid[]))`

export async function listCustomers(tx: Tx, who: Actor, query: ListDto): Promise<Page<WireCustomer>> {
  const parameters: unknown[] = [who.companyId, who.customerIds]
  const words = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', c.name, c.contact_name, c.email, c.address) ilike $${parameters.length}`
  })
  const order = pageOrder(query, SORTS, 'name', 'c.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...words, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who))
}

export async function customerById(tx: Tx, who: Actor, id: string): Promise<WireCustomer | null> {
  const [row] = await tx.query(`${SELECT('null')} and c.id = $3`, [who.companyId, who.customerIds, id]) as Row[]
  return row ? wire(row, who) : null
}

const wire = ({ page_key: _key, ...row }: Row, who: Actor): WireCustomer => ({ ...row, note: who.customerIds ? null : row.note, may: held(who, ['customer.update']) })
