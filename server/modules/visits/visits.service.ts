import type { CalculationDraft, VisitDraft, WireVisit } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound } from '../../problem'
import { insertOnce } from '../../versioned'
import { findSite } from '../sites/sites.service'
import * as trail from '../trail/trail.service'
import { customerOfVisit, visitById, visitOfCalculation } from './visits.repository'

export { listVisits } from './visits.repository'

/** @throws Problem not-found */
export async function getVisit(tx: Tx, who: Actor, id: string): Promise<WireVisit> {
  const visit = await visitById(tx, who, id)
  if (!visit) throw notFound('visit')
  return visit
}

/** A visit has the id that the device made; the same id again changes nothing. @throws Problem bad-input where the site is not ours, or the id stands for a visit elsewhere */
export async function createVisit(tx: Tx, who: Actor, draft: VisitDraft): Promise<WireVisit> {
  const site = await findSite(tx, who, draft.siteId)
  if (!site) throw badField('siteId', 'unknownSite')
  const isNew = await insertOnce(tx, 'visit', {
    company_id: who.companyId, id: draft.id, customer_id: site.customerId, site_id: site.id, person_id: who.personId, visited_on: draft.visitedOn, remark: draft.remark,
  })
  if (!isNew) {
    const known = await getVisit(tx, who, draft.id)
    if (known.siteId !== site.id) throw badField('id', 'idReused')
    return known
  }
  await trail.record(tx, who, { action: 'create', subject: 'visit', subjectId: draft.id, subjectName: site.name, after: draft })
  return getVisit(tx, who, draft.id)
}

/** Puts the result of a calculator into a visit; the same id again changes nothing. @throws Problem not-found, bad-input where the id stands in another visit */
export async function attachCalculation(tx: Tx, who: Actor, visitId: string, draft: CalculationDraft): Promise<WireVisit> {
  const visit = await getVisit(tx, who, visitId)
  const { id, calculator, title, lines } = draft
  const isNew = await insertOnce(tx, 'visit_calculation', {
    company_id: who.companyId, id, customer_id: await customerOfVisit(tx, who.companyId, visitId), visit_id: visitId, calculator, title, lines: JSON.stringify(lines), person_id: who.personId,
  })
  if (!isNew) {
    if ((await visitOfCalculation(tx, who.companyId, id)) !== visitId) throw badField('id', 'idReused')
    return getVisit(tx, who, visitId)
  }
  await trail.record(tx, who, { action: 'attach', subject: 'visit', subjectId: visitId, subjectName: visit.siteName, after: draft })
  return getVisit(tx, who, visitId)
}
