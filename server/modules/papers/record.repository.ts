import type { EnteredWeighing, PostingKind } from '../../../shared/api/ledger'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { RATE_COLUMNS, type RateRow } from './wire'

export interface VisitRow { id: string; site_id: string; visited_on: string; remark: string | null; person_id: string }

export async function visitRow(tx: Tx, who: Actor, visitId: string): Promise<VisitRow | null> {
  const [row] = await tx.query(
    `select id, site_id, visited_on, remark, person_id from visit
      where company_id = $1 and id = $2 and ($3::uuid[] is null or customer_id = any ($3::uuid[]))`, [who.companyId, visitId, who.customerIds]) as VisitRow[]
  return row ?? null
}

export interface EntryRow extends Partial<RateRow> {
  id: string
  kind: PostingKind
  circuit_id: string
  site_id: string
  occurred_on: string
  refrigerant: string
  mass_kg: string
  entered: EnteredWeighing | null
  cylinder_id: string | null
  cylinder_number: string | null
  purpose: string | null
  is_complete: boolean
  part: string | null
  work_done: string | null
  note: string | null
  leak_id: string | null
  person_id: string
  is_rated: boolean
  reversal_reason: string | null
  reversal_person_name: string | null
  reversal_on: string | null
}

/**
 * The entries of a visit, or one posting, that put something into a circuit or took it out; of a reversal
 * that is the posting it takes back. Entries that were taken back come with the reason.
 */
export const entryRows = async (tx: Tx, who: Actor, of: { visitId: string } | { postingId: string }): Promise<EntryRow[]> =>
  await tx.query(
    `select p.id, p.kind, p.circuit_id, p.site_id, p.occurred_on, p.refrigerant, p.mass_kg::text, p.entered, p.cylinder_id, cy.number as cylinder_number, p.purpose,
            p.is_complete, p.part, p.work_done, p.note, p.leak_id, p.person_id, r.posting_id is not null as is_rated, ${RATE_COLUMNS},
            rv.reason as reversal_reason, rp.name as reversal_person_name, rv.occurred_on as reversal_on
       from posting p
       left join addition_rate r on r.company_id = p.company_id and r.posting_id = p.id
       left join cylinder cy on cy.company_id = p.company_id and cy.id = p.cylinder_id
       left join posting rv on rv.company_id = p.company_id and rv.reverses_id = p.id
       left join person rp on rp.company_id = rv.company_id and rp.id = rv.person_id
      where p.company_id = $1 and ($2::uuid[] is null or p.customer_id = any ($2::uuid[])) and p.circuit_id is not null
        and p.kind in ('charge', 'opening-charge', 'recovery', 'loss')
        and ${'visitId' in of ? 'p.visit_id = $3' : 'p.id = (select coalesce(n.reverses_id, n.id) from posting n where n.company_id = $1 and n.id = $3)'}
      order by p.occurred_at, p.id`, [who.companyId, who.customerIds, 'visitId' in of ? of.visitId : of.postingId]) as EntryRow[]

export interface LeakRow {
  id: string
  circuit_id: string
  found_on: string
  cause: string
  method: string
  position: string | null
  note: string | null
  person_id: string
  repaired_on: string | null
  repair: string | null
  component_kind: string | null
  component_name: string | null
}

/** Leaks of the site that were found or repaired on these days, and those that the entries name. */
export const leakRows = async (tx: Tx, companyId: string, { siteId, circuitIds, days, leakIds }: DaysAtSite & { leakIds: string[] }): Promise<LeakRow[]> =>
  await tx.query(
    `select l.id, l.circuit_id, l.found_on, l.cause, l.method, l.position, l.note, l.person_id, l.repaired_on, l.repair, co.kind as component_kind, co.name as component_name
       from leak l
       join circuit c on c.company_id = l.company_id and c.id = l.circuit_id
       left join component co on co.company_id = l.company_id and co.id = l.component_id
      where l.company_id = $1 and c.site_id = $2 and ($3::uuid[] is null or l.circuit_id = any ($3::uuid[]))
        and (l.found_on = any ($4::date[]) or l.repaired_on = any ($4::date[]) or l.id = any ($5::uuid[]))
      order by l.found_on, l.id`, [companyId, siteId, circuitIds, days, leakIds]) as LeakRow[]

/** The circuits of a site, or some of them, on some days. */
export interface DaysAtSite {
  siteId: string
  circuitIds: string[] | null
  days: string[]
}

export interface RecordTestRow {
  circuit_id: string
  kind: 'initial' | 'follow-up'
  tested_on: string
  type: string
  passed: boolean
  shows_all_repaired: boolean
  note: string | null
  person_id: string
  leak_id: string | null
  leak_position: string | null
  component_kind: string | null
  component_name: string | null
}

export const recordTestRows = async (tx: Tx, companyId: string, { siteId, circuitIds, days }: DaysAtSite): Promise<RecordTestRow[]> =>
  await tx.query(
    `select v.circuit_id, v.kind, v.tested_on, v.type, v.passed, v.shows_all_repaired, v.note, v.person_id, v.leak_id, l.position as leak_position,
            co.kind as component_kind, co.name as component_name
       from verification v
       join circuit c on c.company_id = v.company_id and c.id = v.circuit_id
       left join leak l on l.company_id = v.company_id and l.id = v.leak_id
       left join component co on co.company_id = l.company_id and co.id = l.component_id
      where v.company_id = $1 and c.site_id = $2 and ($3::uuid[] is null or v.circuit_id = any ($3::uuid[])) and v.tested_on = any ($4::date[])
      order by v.tested_on, v.recorded_at`, [companyId, siteId, circuitIds, days]) as RecordTestRow[]

export interface MarkRow {
  circuit_id: string
  marked_on: string
  text: string
  person_id: string
  resolved_on: string | null
  component_kind: string | null
  component_name: string | null
  component_position: string | null
}

/** Watch marks of some circuits that were open on a day, or set or resolved on it. */
export const markRows = async (tx: Tx, companyId: string, circuitIds: string[], on: string): Promise<MarkRow[]> =>
  await tx.query(
    `select m.circuit_id, m.marked_on, m.text, m.person_id, m.resolved_on, co.kind as component_kind, co.name as component_name, co.position as component_position
       from watch_mark m left join component co on co.company_id = m.company_id and co.id = m.component_id
      where m.company_id = $1 and m.circuit_id = any ($2::uuid[]) and m.marked_on <= $3 and (m.resolved_on is null or m.resolved_on >= $3)
      order by m.marked_on, m.id`, [companyId, circuitIds, on]) as MarkRow[]

/** Circuits of a site on which a watch mark was set on a day. */
export const markedCircuitIds = async (tx: Tx, companyId: string, siteId: string, days: string[]): Promise<string[]> => {
  const rows = await tx.query(
    `select distinct m.circuit_id from watch_mark m join circuit c on c.company_id = m.company_id and c.id = m.circuit_id
      where m.company_id = $1 and c.site_id = $2 and m.marked_on = any ($3::date[])`, [companyId, siteId, days]) as { circuit_id: string }[]
  return rows.map((row) => row.circuit_id)
}

export interface PersonRow { id: string; name: string; certificate_number: string | null; certificate_type: string | null }

export const personRows = async (tx: Tx, companyId: string, ids: string[]): Promise<PersonRow[]> =>
  await tx.query('select id, name, certificate_number, certificate_type from person where company_id = $1 and id = any ($2::uuid[]) order by name, id',
    [companyId, ids]) as PersonRow[]
