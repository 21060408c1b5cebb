import type { WireCylinder } from '../../../shared/api/cylinders'
import type { Page } from '../../../shared/api/page'
import { isBefore, type PlainDate } from '../../../shared/dates/plain-date'
import { fillLimitOf } from '../../../shared/field/fill-limit'
import { kg, toKgText } from '../../../shared/mass/mass'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { pageOf, pageOrder, soughtWords, type SortKey } from '../../page'
import type { CylindersQuery } from './cylinders.dto'

type Row = Omit<WireCylinder, 'may' | 'fillLimitKg' | 'isPastTest'> & { page_key: unknown }
const SORTS: Record<string, SortKey> = {
  number: { sql: 'y.number', type: 'text' },
  refrigerant: { sql: 'y.refrigerant', type: 'text' },
  test: { sql: `coalesce(y.test_due_on, '9999-12-31')`, type: 'date' },
}

const SELECT = (key: string): string => `
  select y.id, y.number, y.kind, y.refrigerant, y.contents, trim_scale(y.tare_kg)::text as "tareKg", trim_scale(y.water_capacity_kg)::text as "waterCapacityKg",
         y.test_due_on as "testDueOn", y.status, y.holder_id as "holderId", h.name as "holderName", y.place, y.owner_customer_id as "ownerCustomerId",
         c.name as "ownerCustomerName", trim_scale(coalesce(b.mass_kg, 0))::text as "contentKg", y.version, ${key} as page_key
    from cylinder y
    left join balance b on b.company_id = y.company_id and b.account_id = y.id and b.refrigerant = y.refrigerant
    left join person h on h.company_id = y.company_id and h.id = y.holder_id
    left join customer c on c.company_id = y.company_id and c.id = y.owner_customer_id
   where y.company_id = $1`

export async function listCylinders(tx: Tx, who: Actor, query: CylindersQuery, today: PlainDate): Promise<Page<WireCylinder>> {
  const parameters: unknown[] = [who.companyId]
  const wheres = soughtWords(query.search).map((word) => {
    parameters.push(word)
    return `concat_ws(' ', y.number, y.refrigerant, h.name, y.place, c.name) ilike $${parameters.length}`
  })
  const holderId = query.holderId === 'me' ? who.personId : query.holderId
  for (const [column, value] of [['y.holder_id::text', holderId], ['y.refrigerant', query.refrigerant], ['y.status', query.status]] as const) {
    if (value === undefined) continue
    parameters.push(value)
    wheres.push(`${column} = $${parameters.length}`)
  }
  const order = pageOrder(query, SORTS, 'number', 'y.id', parameters)
  const rows = await tx.query(`${SELECT(order.keySql)} and ${[...wheres, order.beyond].join(' and ')} order by ${order.orderBy} limit ${order.limit + 1}`, parameters) as Row[]
  return pageOf(rows, order.limit, (row) => wire(row, who, today))
}

export async function cylinderById(tx: Tx, who: Actor, id: string, today: PlainDate): Promise<WireCylinder | null> {
  const [row] = await tx.query(`${SELECT('null')} and y.id = $2`, [who.companyId, id]) as Row[]
  return row ? wire(row, who, today) : null
}

function wire({ page_key: _key, ...row }: Row, who: Actor, today: PlainDate): WireCylinder {
  const limit = row.waterCapacityKg ? fillLimitOf(kg(row.waterCapacityKg), row.refrigerant) : null
  return {
    ...row, fillLimitKg: limit && toKgText(limit), isPastTest: row.testDueOn !== null && isBefore(row.testDueOn, today),
    may: held(who, ['cylinder.update', 'posting.stock', 'posting.create']),
  }
}

export const hasPostings = async (tx: Tx, companyId: string, id: string): Promise<boolean> =>
  (await tx.query('select from posting where company_id = $1 and (cylinder_id = $2 or to_cylinder_id = $2) limit 1', [companyId, id]) as unknown[]).length > 0
