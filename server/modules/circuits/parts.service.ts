import { v7 as uuid } from 'uuid'
import type { ComponentDraft, LeakDraft, MarkDraft, RepairDraft, VerificationDraft, WireCircuit } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound } from '../../problem'
import { insertOnce, insertRow, toColumns } from '../../versioned'
import * as standing from '../standing/standing.service'
import * as trail from '../trail/trail.service'
import { getCircuit } from './circuits.service'
import { circuitOfPart } from './circuits.repository'

/** What sits on a circuit: components, watch marks, leaks and their tests. Each act answers with the circuit sheet. */

export async function addComponent(tx: Tx, who: Actor, circuitId: string, draft: ComponentDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  const id = uuid()
  await insertRow(tx, 'component', { company_id: who.companyId, id, customer_id: circuit.customerId, circuit_id: circuitId, ...toColumns(draft) })
  await trail.record(tx, who, { action: 'create', subject: 'component', subjectId: id, subjectName: draft.name, after: { ...draft, circuitId } })
  return getCircuit(tx, who, circuitId, now)
}

export async function changeComponent(tx: Tx, who: Actor, id: string, draft: ComponentDraft, now: Date): Promise<WireCircuit> {
  const circuitId = await circuitOf(tx, who, 'component', id)
  const circuit = await getCircuit(tx, who, circuitId, now)
  const before = circuit.components.find((component) => component.id === id) ?? {}
  await tx.query('update component set kind = $3, name = $4, position = $5 where company_id = $1 and id = $2', [who.companyId, id, draft.kind, draft.name, draft.position])
  await trail.recordChange(tx, who, { action: 'change', subject: 'component', subjectId: id, subjectName: draft.name }, before, draft)
  return getCircuit(tx, who, circuitId, now)
}

export async function addMark(tx: Tx, who: Actor, circuitId: string, draft: MarkDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  checkComponent(circuit, draft.componentId)
  const id = uuid()
  await insertRow(tx, 'watch_mark', { company_id: who.companyId, id, customer_id: circuit.customerId, circuit_id: circuitId, person_id: who.personId, ...toColumns(draft) })
  await trail.record(tx, who, { action: 'create', subject: 'watch-mark', subjectId: id, subjectName: draft.text, after: { ...draft, circuitId } })
  return getCircuit(tx, who, circuitId, now)
}

export async function resolveMark(tx: Tx, who: Actor, id: string, resolvedOn: string, now: Date): Promise<WireCircuit> {
  const circuitId = await circuitOf(tx, who, 'watch_mark', id)
  const mark = (await getCircuit(tx, who, circuitId, now)).marks.find((each) => each.id === id)
  if (!mark) throw notFound('watch_mark')
  if (resolvedOn < mark.markedOn) throw badField('resolvedOn', 'dateOrder')
  await tx.query('update watch_mark set resolved_on = $3 where company_id = $1 and id = $2', [who.companyId, id, resolvedOn])
  await trail.recordChange(tx, who, { action: 'resolve', subject: 'watch-mark', subjectId: id, subjectName: mark.text }, mark, { resolvedOn })
  return getCircuit(tx, who, circuitId, now)
}

/** A leak has the id that the device made; the same id again changes nothing. */
export async function addLeak(tx: Tx, who: Actor, circuitId: string, draft: LeakDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  checkComponent(circuit, draft.componentId)
  const isNew = await insertOnce(tx, 'leak', { company_id: who.companyId, customer_id: circuit.customerId, circuit_id: circuitId, person_id: who.personId, ...toColumns(draft) })
  if (!isNew) return knownPart(tx, who, 'leak', draft.id, circuitId, now)
  await trail.record(tx, who, { action: 'create', subject: 'leak', subjectId: draft.id, subjectName: draft.position ?? draft.cause, after: { ...draft, circuitId } })
  return getCircuit(tx, who, circuitId, now)
}

export async function repairLeak(tx: Tx, who: Actor, id: string, draft: RepairDraft, now: Date): Promise<WireCircuit> {
  const circuitId = await circuitOf(tx, who, 'leak', id)
  const circuit = await getCircuit(tx, who, circuitId, now)
  const leak = circuit.leaks.find((each) => each.id === id)
  if (!leak) throw notFound('leak')
  if (draft.repairedOn < leak.foundOn) throw badField('repairedOn', 'dateOrder')
  await tx.query('update leak set repaired_on = $3, repair = $4 where company_id = $1 and id = $2', [who.companyId, id, draft.repairedOn, draft.repair])
  await trail.recordChange(tx, who, { action: 'repair', subject: 'leak', subjectId: id, subjectName: leak.position ?? leak.cause }, leak, draft)
  return getCircuit(tx, who, circuitId, now)
}

/** A test has the id that the device made; the same id again changes nothing. A passed follow-up that showed all leaks repaired restarts the rolling window. */
export async function addVerification(tx: Tx, who: Actor, circuitId: string, draft: VerificationDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  if (draft.leakId && !circuit.leaks.some((leak) => leak.id === draft.leakId)) throw badField('leakId', 'posting.unknown-leak')
  if (draft.showsAllRepaired && !draft.passed) throw badField('showsAllRepaired', 'notHere')
  const isNew = await insertOnce(tx, 'verification', { company_id: who.companyId, customer_id: circuit.customerId, circuit_id: circuitId, person_id: who.personId, ...toColumns(draft) })
  if (!isNew) return knownPart(tx, who, 'verification', draft.id, circuitId, now)
  await trail.record(tx, who, { action: 'create', subject: 'verification', subjectId: draft.id, subjectName: draft.type, after: { ...draft, circuitId } })
  await standing.reviewCircuits(tx, who.companyId, [circuitId])
  return getCircuit(tx, who, circuitId, now)
}

/** The answer to an id that is there already. @throws Problem bad-input where it stands at another circuit */
async function knownPart(tx: Tx, who: Actor, table: 'leak' | 'verification', id: string, circuitId: string, now: Date): Promise<WireCircuit> {
  if ((await circuitOfPart(tx, table, who.companyId, id)) !== circuitId) throw badField('id', 'idReused')
  return getCircuit(tx, who, circuitId, now)
}

async function circuitOf(tx: Tx, who: Actor, table: 'component' | 'watch_mark' | 'leak', id: string): Promise<string> {
  const circuitId = await circuitOfPart(tx, table, who.companyId, id)
  if (!circuitId) throw notFound(table)
  return circuitId
}

function checkComponent(circuit: WireCircuit, componentId: string | null): void {
  if (componentId && !circuit.components.some((component) => component.id === componentId)) throw badField('componentId', 'unknownComponent')
}
