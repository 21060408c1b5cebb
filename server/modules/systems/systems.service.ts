import { v7 as uuid } from 'uuid'
import type { Page } from '../../../shared/api/page'
import type { SystemDraft, WireSystem } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound, Problem } from '../../problem'
import { insertRow, toColumns, updateVersioned } from '../../versioned'
import { circuitsOfSystems } from '../circuits/circuits.service'
import { findSite } from '../sites/sites.service'
import * as standing from '../standing/standing.service'
import * as trail from '../trail/trail.service'
import { circuitIdsOfSystem, pageOfSystems, systemById, type SystemRow } from './systems.repository'
import type { SystemsQuery } from './systems.dto'

export async function listSystems(tx: Tx, who: Actor, query: SystemsQuery, now: Date): Promise<Page<WireSystem>> {
  const page = await pageOfSystems(tx, who, query)
  return { ...page, rows: await withCircuits(tx, who, page.rows, now) }
}

/** @throws Problem not-found */
export async function getSystem(tx: Tx, who: Actor, id: string, now: Date): Promise<WireSystem> {
  const row = await systemById(tx, who, id)
  const [system] = row ? await withCircuits(tx, who, [row], now) : []
  if (!system) throw notFound('system')
  return system
}

async function withCircuits(tx: Tx, who: Actor, rows: SystemRow[], now: Date): Promise<WireSystem[]> {
  const circuits = await circuitsOfSystems(tx, who, rows.map(({ id }) => id), now)
  return rows.map((row) => ({ ...row, circuits: circuits.filter(({ systemId }) => systemId === row.id) }))
}

export async function createSystem(tx: Tx, who: Actor, draft: SystemDraft, now: Date, id: string = uuid()): Promise<WireSystem> {
  const site = await findSite(tx, who, draft.siteId)
  if (!site) throw badField('siteId', 'unknownSite')
  checkDecision(draft)
  await insertRow(tx, 'system', { company_id: who.companyId, id, customer_id: site.customerId, ...toColumns(draft) })
  await trail.record(tx, who, { action: 'create', subject: 'system', subjectId: id, subjectName: draft.tag, after: draft })
  return getSystem(tx, who, id, now)
}

/** @throws Problem not-found, changed-meanwhile, bad-input where the site would change or a decision has no person and reason */
export async function changeSystem(tx: Tx, who: Actor, id: string, version: number, draft: SystemDraft, now: Date): Promise<WireSystem> {
  const before = await getSystem(tx, who, id, now)
  if (draft.siteId !== before.siteId) throw badField('siteId', 'siteStays')
  checkDecision(draft)
  await updateVersioned(tx, 'system', { companyId: who.companyId, id, version }, toColumns(draft))
  await trail.recordChange(tx, who, { action: 'change', subject: 'system', subjectId: id, subjectName: draft.tag }, before, draft)
  await standing.reviewCircuits(tx, who.companyId, await circuitIdsOfSystem(tx, who.companyId, id))
  return getSystem(tx, who, id, now)
}

/** A decision of the owner stands with who made it and why; the product never decides it. */
function checkDecision(draft: SystemDraft): void {
  if (draft.subsectorDecision === null) return
  const missing = (['subsectorDecidedBy', 'subsectorReason'] as const).filter((field) => !draft[field])
  if (missing.length > 0) throw new Problem('bad-input', {}, missing.map((field) => ({ field, key: 'needed' })))
}
