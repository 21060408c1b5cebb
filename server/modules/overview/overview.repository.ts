import type { Standing, WireOverview } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'

export const countStandings = async (tx: Tx, who: Actor): Promise<{ standing: Standing; count: number }[]> =>
  await tx.query(
    `select s.standing, count(*)::int as count
       from circuit_standing s join circuit c on c.company_id = s.company_id and c.id = s.circuit_id
      where s.company_id = $1 and ($2::uuid[] is null or s.customer_id = any ($2::uuid[])) and c.status <> 'retired'
      group by s.standing`, [who.companyId, who.customerIds]) as { standing: Standing; count: number }[]

/** What the cylinders hold, by refrigerant. */
export const stock = async (tx: Tx, companyId: string): Promise<NonNullable<WireOverview['stock']>> =>
  await tx.query(
    `select b.refrigerant, trim_scale(sum(b.mass_kg))::text as "massKg", count(*)::int as cylinders
       from balance b join cylinder c on c.company_id = b.company_id and c.id = b.account_id
      where b.company_id = $1 and b.mass_kg > 0 and c.status = 'in-use'
      group by b.refrigerant order by sum(b.mass_kg) desc, b.refrigerant`, [companyId]) as NonNullable<WireOverview['stock']>

export const latestPostings = async (tx: Tx, who: Actor, rows: number): Promise<WireOverview['latest']> =>
  await tx.query(
    `select p.id, p.occurred_on as "occurredOn", p.kind, nullif(concat_ws(' ', sy.tag, ci.name), '') as "circuitName", si.name as "siteName",
            case when $2::uuid[] is null then cy.number end as "cylinderNumber", case when $2::uuid[] is null then too.number end as "toCylinderNumber",
            case when $2::uuid[] is null then pa.name end as "partnerName",
            trim_scale(p.mass_kg)::text as "massKg", p.refrigerant, person.name as "personName"
       from posting p
       join person on person.company_id = p.company_id and person.id = p.person_id
       left join circuit ci on ci.company_id = p.company_id and ci.id = p.circuit_id
       left join system sy on sy.company_id = p.company_id and sy.id = ci.system_id
       left join site si on si.company_id = p.company_id and si.id = p.site_id
       left join cylinder cy on cy.company_id = p.company_id and cy.id = p.cylinder_id
       left join cylinder too on too.company_id = p.company_id and too.id = p.to_cylinder_id
       left join partner pa on pa.company_id = p.company_id and pa.id = p.partner_id
      where p.company_id = $1 and ($2::uuid[] is null or p.customer_id = any ($2::uuid[]))
      order by p.occurred_at desc, p.id desc limit $3`, [who.companyId, who.customerIds, rows]) as WireOverview['latest']
