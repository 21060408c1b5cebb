import type { Page } from '../../../shared/api/page'
import type { WirePerson } from '../../../shared/api/people'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { PeopleQuery } from './people.dto'

type Row = Omit<WirePerson, 'may'> & { page_key: unknown }
const SORTS: Record<string, SortKey> = { name: { sql: 'p.name', type: 'text' }, role: { sql: 'p.role', type: 'text' }, email: { sql: 'p.email', type: 'text' } }

const SELECT = (key: string): string => `
  select p.id, p.name, p.email, p.role, p.certificate_number as "certificateNumber", p.certificate_type as "certificateType", p.version, ${key} as page_key,
         case when p.disabled_at is not null then 'disabled' when p.password_hash is null then 'invited' else 'active' end as state,
         array(select c.customer_id::text from person_customer c where c.company_id = p.company_id and c.person_id = p.id order by 1) as "customerIds"
    from person p where p.company_id = $1`

export async function listPeople(tx: Tx, who: Actor, query: PeopleQuery): Promise<Page<WirePerson>> {
  const parameters: unknown[] = [who.companyId]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', p.name, p.email, p.role, p.certificate_number) ilike $${parameters.length}`
  })
  if (query.role) {
    parameters.push(query.role)
    wheres.push(`p.role = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, 'name', 'p.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who))
}

export async function personById(tx: Tx, who: Actor, id: string): Promise<WirePerson | null> {
  const [row] = await tx.query(`${SELECT('null')} and p.id = $2`, [who.companyId, id]) as Row[]
  return row ? wire(row, who) : null
}

const wire = ({ page_key: _key, ...row }: Row, who: Actor): WirePerson => ({ ...row, may: held(who, ['person.manage']) })

/** Ties an owner's account to these customers and to no others. */
export async function setCustomers(tx: Tx, companyId: string, personId: string, customerIds: string[]): Promise<void> {
  await tx.query('delete from person_customer where company_id = $1 and person_id = $2', [companyId, personId])
  await tx.query('insert into person_customer (company_id, person_id, customer_id) select $1, $2, unnest($3::uuid[])', [companyId, personId, customerIds])
}

export const customersThere = async (tx: Tx, companyId: string, ids: string[]): Promise<number> =>
  (await tx.query('select count(*)::int as count from customer where company_id = $1 and id = any ($2::uuid[])', [companyId, ids]) as { count: number }[])[0]?.count ?? 0

/** Administrators other than this person who can sign in; locked, so that two cannot remove each other at once. */
export const otherAdministrators = async (tx: Tx, companyId: string, personId: string): Promise<number> =>
  (await tx.query(`select id from person where company_id = $1 and role = 'administrator' and disabled_at is null and password_hash is not null order by id for update`, [companyId]) as { id: string }[])
    .filter(({ id }) => id !== personId).length
