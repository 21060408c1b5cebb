import { v7 as uuid } from 'uuid'
import type { SiteDraft, WireSite } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound } from '../../problem'
import { hasRow, insertRow, toColumns, updateVersioned } from '../../versioned'
import * as standing from '../standing/standing.service'
import * as trail from '../trail/trail.service'
import { circuitIdsOfSite, siteById } from './sites.repository'

export { listSites, siteById as findSite } from './sites.repository'

/** @throws Problem not-found */
export async function getSite(tx: Tx, who: Actor, id: string): Promise<WireSite> {
  const site = await siteById(tx, who, id)
  if (!site) throw notFound('site')
  return site
}

/** @throws Problem bad-input where the customer is not ours */
export async function createSite(tx: Tx, who: Actor, draft: SiteDraft, id: string = uuid()): Promise<WireSite> {
  if (!(await hasRow(tx, 'customer', who.companyId, draft.customerId))) throw badField('customerId', 'unknownCustomer')
  await insertRow(tx, 'site', { company_id: who.companyId, id, ...toColumns(draft) })
  await trail.record(tx, who, { action: 'create', subject: 'site', subjectId: id, subjectName: draft.name, after: draft })
  return getSite(tx, who, id)
}

/**
 * Changes a site. Its method and packs decide the rates of all its circuits, which are computed anew.
 *
 * @throws Problem not-found, changed-meanwhile, bad-input where the customer would change: systems and postings belong to the old one
 */
export async function changeSite(tx: Tx, who: Actor, id: string, version: number, draft: SiteDraft): Promise<WireSite> {
  const before = await getSite(tx, who, id)
  if (draft.customerId !== before.customerId) throw badField('customerId', 'customerStays')
  await updateVersioned(tx, 'site', { companyId: who.companyId, id, version }, toColumns(draft))
  await trail.recordChange(tx, who, { action: 'change', subject: 'site', subjectId: id, subjectName: draft.name }, before, draft)
  await standing.reviewCircuits(tx, who.companyId, await circuitIdsOfSite(tx, who.companyId, id))
  return getSite(tx, who, id)
}
