import type { Page } from '../../../shared/api/page'
import type { WireEntry, WirePosting } from '../../../shared/api/ledger'
import type { Actor } from '../../actor'
import { prepared, type Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { PostingsQuery } from './ledger.dto'
import { draftOf } from './ledger.repository'

type Row = Record<string, unknown> & { id: string; page_key: unknown }

const SORTS: Record<string, SortKey> = { date: { sql: 'p.occurred_at', type: 'timestamptz' } }

/** Owners see what went in and came out of their circuits, but neither cylinders nor the other side of an entry. */
const SELECT = `
  select p.*, person.name as person_name, ci.name as circuit_name, sy.tag as system_tag, si.name as site_name,
         cy.number as cylinder_number, tc.number as to_cylinder_number, pa.name as partner_name,
         (select r.id from posting r where r.company_id = p.company_id and r.reverses_id = p.id) as reversed_by_id,
         (select coalesce(json_agg(json_build_object('accountKind', a.kind, 'accountId', a.id, 'refrigerant', e.refrigerant, 'massKg', e.mass_kg::text,
                   'accountName', coalesce(ec.number, concat_ws(' ', es.tag, ei.name), ep.name, '')) order by e.line), '[]')
            from entry e
            join account a on a.company_id = e.company_id and a.id = e.account_id
            left join cylinder ec on ec.company_id = e.company_id and ec.id = e.account_id
            left join circuit ei on ei.company_id = e.company_id and ei.id = e.account_id
            left join system es on es.company_id = e.company_id and es.id = ei.system_id
            left join partner ep on ep.company_id = e.company_id and ep.id = e.account_id
           where e.company_id = p.company_id and e.posting_id = p.id) as entries
    from posting p
    join person on person.company_id = p.company_id and person.id = p.person_id
    left join circuit ci on ci.company_id = p.company_id and ci.id = p.circuit_id
    left join system sy on sy.company_id = p.company_id and sy.id = ci.system_id
    left join site si on si.company_id = p.company_id and si.id = p.site_id
    left join cylinder cy on cy.company_id = p.company_id and cy.id = p.cylinder_id
    left join cylinder tc on tc.company_id = p.company_id and tc.id = p.to_cylinder_id
    left join partner pa on pa.company_id = p.company_id and pa.id = p.partner_id`

export async function postingById(tx: Tx, who: Actor, id: string): Promise<WirePosting | null> {
  const [row] = await prepared<Row>(tx, 'posting-by-id', `${SELECT} where p.company_id = $1 and p.id = $2 and ${ownedBy(3)}`, [who.companyId, id, who.customerIds])
  return row ? wirePosting(row, who) : null
}

const ownedBy = (position: number): string => `($${position}::uuid[] is null or p.customer_id = any ($${position}::uuid[]))`

export async function listPostings(tx: Tx, who: Actor, query: PostingsQuery): Promise<Page<WirePosting>> {
  const parameters: unknown[] = [who.companyId, who.customerIds]
  const wheres = ['p.company_id = $1', ownedBy(2)]
  const where = (sql: string, value: unknown): void => {
    if (value === undefined) return
    parameters.push(value)
    wheres.push(sql.replaceAll('?', `$${parameters.length}`))
  }
  where('p.circuit_id = ?', query.circuitId)
  where('(p.cylinder_id = ? or p.to_cylinder_id = ?)', query.cylinderId)
  where('p.site_id = ?', query.siteId)
  where('p.visit_id = ?', query.visitId)
  where('p.kind = ?', query.kind)
  where('p.occurred_on >= ?', query.from)
  where('p.occurred_on <= ?', query.to)
  for (const word of soughtWords(query.search))
    where(`concat_ws(' ', p.refrigerant, person.name, ci.name, sy.tag, si.name, cy.number, tc.number, pa.name, p.note, p.reason) ilike ?`, word)
  const order = pageOrder(query, SORTS, '-date', 'p.id', parameters)
  const rows = await tx.query(
    `${SELECT.replace('select p.*', `select p.*, ${order.keySql} as page_key`)}
      where ${wheres.join(' and ')} and ${order.beyond} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wirePosting(row, who))
}

function wirePosting(row: Row, who: Actor): WirePosting {
  const text = (name: string): string | null => (row[name] as string | null) ?? null
  const circuit = [text('system_tag'), text('circuit_name')].filter(Boolean).join(' ')
  const isReversible = row.kind !== 'reversal' && row.reversed_by_id === null && who.role === 'officer'
  return {
    ...draftOf(row),
    cylinderId: text('cylinder_id'), toCylinderId: text('to_cylinder_id'), circuitId: text('circuit_id'), partnerId: text('partner_id'),
    recordedAt: (row.recorded_at as Date).toISOString(),
    personName: text('person_name') ?? '', circuitName: circuit || null, siteName: text('site_name'),
    cylinderNumber: text('cylinder_number'), toCylinderNumber: text('to_cylinder_number'), partnerName: text('partner_name'),
    reversedById: text('reversed_by_id'), contentHash: (row.content_hash as Buffer).toString('hex'),
    entries: row.entries as WireEntry[],
    may: isReversible ? ['posting.reverse'] : [],
  }
}
