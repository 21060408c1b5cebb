import { v7 as uuid } from 'uuid'
import type { CylinderDraft, WireCylinder } from '../../../shared/api/cylinders'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { isZero, kg } from '../../../shared/mass/mass'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { notFound, Problem, type FieldFault } from '../../problem'
import { hasRow, insertRow, toColumns, updateVersioned } from '../../versioned'
import { lockAccounts, openAccount } from '../ledger/accounts'
import * as trail from '../trail/trail.service'
import { cylinderById, hasPostings } from './cylinders.repository'

export { listCylinders } from './cylinders.repository'

/** @throws Problem not-found */
export async function getCylinder(tx: Tx, who: Actor, id: string, today: PlainDate): Promise<WireCylinder> {
  const cylinder = await cylinderById(tx, who, id, today)
  if (!cylinder) throw notFound('cylinder')
  return cylinder
}

/** @throws Problem bad-input, name-taken */
export async function createCylinder(tx: Tx, who: Actor, draft: CylinderDraft, today: PlainDate, id: string = uuid()): Promise<WireCylinder> {
  refuse(await faultsOf(tx, who, draft))
  await insertRow(tx, 'cylinder', { company_id: who.companyId, id, ...toColumns(draft) })
  await openAccount(tx, who.companyId, { id, kind: 'cylinder', customerId: null })
  await trail.record(tx, who, { action: 'create', subject: 'cylinder', subjectId: id, subjectName: draft.number, after: draft })
  return getCylinder(tx, who, id, today)
}

/**
 * Changes a cylinder. One cylinder holds one refrigerant: that stays as long as anything was posted. A cylinder
 * that still holds gas by the book is not taken out of use.
 *
 * @throws Problem not-found, changed-meanwhile, bad-input, name-taken
 */
export async function changeCylinder(tx: Tx, who: Actor, id: string, version: number, draft: CylinderDraft, today: PlainDate): Promise<WireCylinder> {
  await lockAccounts(tx, who.companyId, [id])
  const before = await getCylinder(tx, who, id, today)
  const faults = await faultsOf(tx, who, draft)
  if (draft.refrigerant !== before.refrigerant && (await hasPostings(tx, who.companyId, id))) faults.push({ field: 'refrigerant', key: 'refrigerantStays' })
  if (draft.status === 'scrapped' && !isZero(kg(before.contentKg))) faults.push({ field: 'status', key: 'cylinderNotEmpty' })
  refuse(faults)
  await updateVersioned(tx, 'cylinder', { companyId: who.companyId, id, version }, toColumns(draft))
  await trail.recordChange(tx, who, { action: 'change', subject: 'cylinder', subjectId: id, subjectName: draft.number }, before, draft)
  return getCylinder(tx, who, id, today)
}

async function faultsOf(tx: Tx, who: Actor, draft: CylinderDraft): Promise<FieldFault[]> {
  const faults: FieldFault[] = []
  if (draft.holderId && !(await hasRow(tx, 'person', who.companyId, draft.holderId))) faults.push({ field: 'holderId', key: 'unknownPerson' })
  if (draft.ownerCustomerId && !(await hasRow(tx, 'customer', who.companyId, draft.ownerCustomerId))) faults.push({ field: 'ownerCustomerId', key: 'unknownCustomer' })
  if (draft.kind !== 'disposable' && !draft.waterCapacityKg) faults.push({ field: 'waterCapacityKg', key: 'waterCapacity' })
  if (draft.kind === 'disposable' && (draft.contents === 'recovered' || draft.contents === 'mixed')) faults.push({ field: 'contents', key: 'disposableContents' })
  return faults
}

function refuse(faults: FieldFault[]): void {
  if (faults.length > 0) throw new Problem('bad-input', {}, faults)
}
