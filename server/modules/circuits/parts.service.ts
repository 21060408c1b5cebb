import { v7 as uuid } from 'uuid'
import type { ComponentDraft, LeakDraft, MarkDraft, RepairDraft, VerificationDraft, WireCircuit } from '../../../shared/api/places'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound } from '../../problem'
import { insertRow, toColumns } from '../../versioned'
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
  await tx.query('update watch_mark set resolved_on = $3 where company_id = $1 and id = $2', [who.companyId, id, resolvedOn])
  await trail.record(tx, who, { action: 'resolve', subject: 'watch-mark', subjectId: id, subjectName: resolvedOn, after: { resolvedOn } })
  return getCircuit(tx, who, circuitId, now)
}

/** A leak has the id that the device made; the same id again changes nothing. */
export async function addLeak(tx: Tx, who: Actor, circuitId: string, draft: LeakDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  if (circuit.leaks.some((leak) => leak.id === draft.id)) return circuit
  checkComponent(circuit, draft.componentId)
  await insertRow(tx, 'leak', { company_id: who.companyId, customer_id: circuit.customerId, circuit_id: circuitId, person_id: who.personId, ...toColumns(draft) })
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

/** A test has the id that the device made. A passed follow-up that showed all leaks repaired restarts the rolling window. */
export async function addVerification(tx: Tx, who: Actor, circuitId: string, draft: VerificationDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  if (circuit.verifications.some((test) => test.id === draft.id)) return circuit
  if (draft.leakId && !circuit.leaks.some((leak) => leak.id === draft.leakId)) throw badField('leakId', 'posting.unknown-leak')
  if (draft.showsAllRepaired && !draft.passed) throw badField('showsAllRepaired', 'notHere')
  await insertRow(tx, 'verification', { company_id: who.companyId, customer_id: circuit.customerId, circuit_id: circuitId, person_id: who.personId, ...toColumns(draft) })
  await trail.record(tx, who, { action: 'create', subject: 'verification', subjectId: draft.id, subjectName: draft.type, after: { ...draft, circuitId } })
  await standing.reviewCircuits(tx, who.companyId, [circuitId])
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
