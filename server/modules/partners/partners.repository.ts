import type { WirePartner } from '../../../shared/api/cylinders'
import type { Page } from '../../../shared/api/page'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { PartnersQuery } from './partners.dto'

type Row = Omit<WirePartner, 'may'> & { page_key: unknown }
const SORTS: Record<string, SortKey> = { name: { sql: 'p.name', type: 'text' }, kind: { sql: 'p.kind', type: 'text' } }
const SELECT = (key: string): string => `select p.id, p.name, p.kind, p.address, p.certificate, p.version, ${key} as page_key from partner p where p.company_id = $1`

export async function listPartners(tx: Tx, who: Actor, query: PartnersQuery): Promise<Page<WirePartner>> {
  const parameters: unknown[] = [who.companyId]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', p.name, p.address, p.certificate) ilike $${parameters.length}`
  })
  if (query.kind) {
    parameters.push(query.kind)
    wheres.push(`p.kind = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, 'name', 'p.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who))
}

export async function partnerById(tx: Tx, who: Actor, id: string): Promise<WirePartner | null> {
  const [row] = await tx.query(`${SELECT('null')} and p.id = $2`, [who.companyId, id]) as Row[]
  return row ? wire(row, who) : null
}

const wire = ({ page_key: _key, ...row }: Row, who: Actor): WirePartner => ({ ...row, may: held(who, ['partner.update']) })
