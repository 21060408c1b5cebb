import { v7 as uuid } from 'uuid'
import type { Page } from '../../../shared/api/page'
import type { CircuitDraft, CircuitStanding, FullChargeDraft, WireCircuit } from '../../../shared/api/places'
import { plainDate } from '../../../shared/dates/plain-date'
import { kg, lessThan, plus, scaled, toKgText } from '../../../shared/mass/mass'
import { held, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { badField, notFound, Problem, type FieldFault } from '../../problem'
import { insertRow, toColumns, updateVersioned } from '../../versioned'
import { lockAccounts, openAccount } from '../ledger/accounts'
import * as standing from '../standing/standing.service'
import * as trail from '../trail/trail.service'
import * as repository from './circuits.repository'
import type { CircuitRow } from './circuits.repository'
import type { CircuitsQuery } from './circuits.dto'

export async function listCircuits(tx: Tx, who: Actor, query: CircuitsQuery, now: Date): Promise<Page<CircuitStanding>> {
  const page = await repository.pageOfCircuits(tx, who, query)
  return { ...page, rows: await withStanding(tx, who, page.rows, now) }
}

export async function circuitsOfSystems(tx: Tx, who: Actor, systemIds: string[], now: Date): Promise<CircuitStanding[]> {
  return withStanding(tx, who, await repository.circuitRows(tx, who, { systemIds }), now)
}

async function withStanding(tx: Tx, who: Actor, rows: CircuitRow[], now: Date): Promise<CircuitStanding[]> {
  const standings = await standing.standingsOf(tx, who.companyId, rows.map(({ id }) => id), standing.todayAt(now))
  return rows.map((row) => {
    const facts = standings.get(row.id)
    if (!facts) throw new RangeError(`Circuit ${row.id} has no standing.`)
    const { commissionedOn: _on, timeZone: _zone, elevationM: _elevation, leakRateMethod: _method, version: _version, ...names } = row
    return { ...names, ...facts }
  })
}

/** The circuit sheet. @throws Problem not-found */
export async function getCircuit(tx: Tx, who: Actor, id: string, now: Date): Promise<WireCircuit> {
  const [row] = await repository.circuitRows(tx, who, { ids: [id] })
  if (!row) throw notFound('circuit')
  const family = await circuitsOfSystems(tx, who, [row.systemId], now)
  const own = family.find((circuit) => circuit.id === id)
  if (!own) throw notFound('circuit')
  const sheet = await standing.sheetOf(tx, who.companyId, id, standing.todayAt(now))
  return {
    ...own, ...sheet,
    commissionedOn: row.commissionedOn ? plainDate(row.commissionedOn) : null,
    siteTimeZone: row.timeZone, siteElevationM: row.elevationM, leakRateMethod: row.leakRateMethod,
    fullCharges: await repository.fullChargesOf(tx, who.companyId, id),
    components: await repository.componentsOf(tx, who.companyId, id),
    marks: await repository.marksOf(tx, who.companyId, family.map((circuit) => circuit.id)),
    leaks: await repository.leaksOf(tx, who.companyId, id),
    verifications: await repository.verificationsOf(tx, who.companyId, id),
    sisters: family.filter((circuit) => circuit.id !== id),
    version: row.version,
    may: held(who, ['circuit.update', 'component.update', 'leak.update', 'posting.create', 'posting.reverse']),
  }
}

/** @throws Problem bad-input where the system is not ours or the full charge does not hold together */
export async function createCircuit(tx: Tx, who: Actor, draft: CircuitDraft, now: Date, id: string = uuid()): Promise<WireCircuit> {
  const system = await systemOf(tx, who, draft.systemId)
  const { fullCharge, ...own } = draft
  await insertRow(tx, 'circuit', { company_id: who.companyId, id, customer_id: system.customer_id, site_id: system.site_id, ...toColumns(own) })
  await openAccount(tx, who.companyId, { id, kind: 'circuit', customerId: system.customer_id })
  if (fullCharge) await insertFullCharge(tx, who, { id, customerId: system.customer_id }, fullCharge, 'fullCharge.')
  await trail.record(tx, who, { action: 'create', subject: 'circuit', subjectId: id, subjectName: draft.name, after: draft })
  await standing.reviewCircuits(tx, who.companyId, [id])
  return getCircuit(tx, who, id, now)
}

async function systemOf(tx: Tx, who: Actor, systemId: string): Promise<{ customer_id: string; site_id: string }> {
  const [system] = await tx.query('select customer_id, site_id from system where company_id = $1 and id = $2', [who.companyId, systemId]) as { customer_id: string; site_id: string }[]
  if (!system) throw badField('systemId', 'unknownSystem')
  return system
}

/**
 * Changes a circuit. The refrigerant may change only while nothing was posted: a retrofit of a circuit with a
 * history is a new circuit, so that each refrigerant keeps its own ledger.
 *
 * @throws Problem not-found, changed-meanwhile, bad-input
 */
export async function changeCircuit(tx: Tx, who: Actor, id: string, version: number, draft: Omit<CircuitDraft, 'fullCharge'>, now: Date): Promise<WireCircuit> {
  await lockAccounts(tx, who.companyId, [id])
  const before = await getCircuit(tx, who, id, now)
  const faults: FieldFault[] = []
  if (draft.systemId !== before.systemId) faults.push({ field: 'systemId', key: 'systemStays' })
  if (draft.refrigerant !== before.refrigerant && (await repository.hasPostings(tx, who.companyId, id))) faults.push({ field: 'refrigerant', key: 'refrigerantStays' })
  if (faults.length > 0) throw new Problem('bad-input', {}, faults)
  await updateVersioned(tx, 'circuit', { companyId: who.companyId, id, version }, toColumns(draft))
  await trail.recordChange(tx, who, { action: 'change', subject: 'circuit', subjectId: id, subjectName: draft.name }, before, draft)
  await standing.reviewCircuits(tx, who.companyId, [id])
  return getCircuit(tx, who, id, now)
}

/** A revision of the full charge; the earlier ones stay. @throws Problem not-found, bad-input */
export async function reviseFullCharge(tx: Tx, who: Actor, circuitId: string, draft: FullChargeDraft, now: Date): Promise<WireCircuit> {
  const circuit = await getCircuit(tx, who, circuitId, now)
  await insertFullCharge(tx, who, circuit, draft, '')
  await trail.record(tx, who, {
    action: 'revise-full-charge', subject: 'circuit', subjectId: circuitId, subjectName: circuit.name, before: { fullChargeKg: circuit.fullChargeKg }, after: draft,
  })
  await standing.reviewCircuits(tx, who.companyId, [circuitId])
  return getCircuit(tx, who, circuitId, now)
}

async function insertFullCharge(tx: Tx, who: Actor, circuit: { id: string; customerId: string }, draft: FullChargeDraft, path: string): Promise<void> {
  await insertRow(tx, 'full_charge', {
    company_id: who.companyId, id: uuid(), customer_id: circuit.customerId, circuit_id: circuit.id, person_id: who.personId,
    ...toColumns({ ...draft, massKg: fullChargeMass(draft, path) }),
  })
}

/** The midpoint of a range, else the figure itself. @throws Problem bad-input where what the method needs is missing */
function fullChargeMass(draft: FullChargeDraft, path: string): string {
  if (draft.method !== 'range') {
    if (draft.massKg === null) throw badField(`${path}massKg`, 'massPositive')
    return draft.massKg
  }
  const missing = (['rangeLowKg', 'rangeHighKg'] as const).filter((field) => draft[field] === null)
  if (draft.rangeLowKg === null || draft.rangeHighKg === null) throw new Problem('bad-input', {}, missing.map((field) => ({ field: `${path}${field}`, key: 'massPositive' })))
  const [low, high] = [kg(draft.rangeLowKg), kg(draft.rangeHighKg)]
  if (lessThan(high, low)) throw badField(`${path}rangeHighKg`, 'rangeOrder')
  return toKgText(scaled(plus(low, high), '0.5'))
}
