import { v7 as uuid } from 'uuid'
import type { CustomerDraft, WireCustomer } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { notFound } from '../../problem'
import { insertRow, toColumns, updateVersioned } from '../../versioned'
import * as trail from '../trail/trail.service'
import { customerById } from './customers.repository'

export { listCustomers } from './customers.repository'

/** @throws Problem not-found */
export async function getCustomer(tx: Tx, who: Actor, id: string): Promise<WireCustomer> {
  const customer = await customerById(tx, who, id)
  if (!customer) throw notFound('customer')
  return customer
}

export async function createCustomer(tx: Tx, who: Actor, draft: CustomerDraft, id: string = uuid()): Promise<WireCustomer> {
  await insertRow(tx, 'customer', { company_id: who.companyId, id, ...toColumns(draft) })
  await trail.record(tx, who, { action: 'create', subject: 'customer', subjectId: id, subjectName: draft.name, after: draft })
  return getCustomer(tx, who, id)
}

/** @throws Problem not-found, changed-meanwhile */
export async function changeCustomer(tx: Tx, who: Actor, id: string, version: number, draft: CustomerDraft): Promise<WireCustomer> {
  const before = await getCustomer(tx, who, id)
  await updateVersioned(tx, 'customer', { companyId: who.companyId, id, version }, toColumns(draft))
  await trail.recordChange(tx, who, { action: 'change', subject: 'customer', subjectId: id, subjectName: draft.name }, before, draft)
  return getCustomer(tx, who, id)
}
