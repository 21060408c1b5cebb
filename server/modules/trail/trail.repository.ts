import type { WireTrailRow } from '../../../shared/api/ledger-check'
import type { Page } from '../../../shared/api/page'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { TrailQuery } from './trail.dto'

type Row = WireTrailRow & { page_key: unknown }
const SORTS: Record<string, SortKey> = { at: { sql: 't.at', type: 'timestamptz' } }

export async function listTrail(tx: Tx, who: Actor, query: TrailQuery): Promise<Page<WireTrailRow>> {
  const parameters: unknown[] = [who.companyId]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', p.name, t.action, t.subject, t.subject_name) ilike $${parameters.length}`
  })
  for (const [column, value] of [['t.subject', query.subject], ['t.subject_id', query.subjectId]] as const) {
    if (value === undefined) continue
    parameters.push(value)
    wheres.push(`${column} = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, '-at', 't.id', parameters)
  const rows = await tx.query(
    `select t.id, to_json(t.at) #>> '{}' as at, coalesce(p.name, '') as "personName", t.action, t.subject, t.subject_id as "subjectId", t.subject_name as "subjectName",
            t.before, t.after, ${order.keySql} as page_key
       from trail t left join person p on p.company_id = t.company_id and p.id = t.person_id
      where t.company_id = $1 and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, ({ page_key: _key, ...row }) => row)
}
