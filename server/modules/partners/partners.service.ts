import { v7 as uuid } from 'uuid'
import type { PartnerDraft, WirePartner } from '../../../shared/api/cylinders'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound } from '../../problem'
import { insertRow, toColumns, updateVersioned } from '../../versioned'
import { openAccount } from '../ledger/accounts'
import * as trail from '../trail/trail.service'
import { partnerById } from './partners.repository'

export { listPartners } from './partners.repository'

/** @throws Problem not-found */
export async function getPartner(tx: Tx, who: Actor, id: string): Promise<WirePartner> {
  const partner = await partnerById(tx, who, id)
  if (!partner) throw notFound('partner')
  return partner
}

export async function createPartner(tx: Tx, who: Actor, draft: PartnerDraft, id: string = uuid()): Promise<WirePartner> {
  await insertRow(tx, 'partner', { company_id: who.companyId, id, ...toColumns(draft) })
  await openAccount(tx, who.companyId, { id, kind: draft.kind, customerId: null })
  await trail.record(tx, who, { action: 'create', subject: 'partner', subjectId: id, subjectName: draft.name, after: draft })
  return getPartner(tx, who, id)
}

/** The kind stays: it is the kind of the partner's account. @throws Problem not-found, changed-meanwhile, bad-input */
export async function changePartner(tx: Tx, who: Actor, id: string, version: number, draft: PartnerDraft): Promise<WirePartner> {
  const before = await getPartner(tx, who, id)
  if (draft.kind !== before.kind) throw badField('kind', 'kindStays')
  await updateVersioned(tx, 'partner', { companyId: who.companyId, id, version }, toColumns(draft))
  await trail.recordChange(tx, who, { action: 'change', subject: 'partner', subjectId: id, subjectName: draft.name }, before, draft)
  return getPartner(tx, who, id)
}
