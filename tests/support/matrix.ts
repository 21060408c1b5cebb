import { v7 as uuid } from 'uuid'
import type { WireCircuit } from '../../shared/api/places'
import { send } from './answers'
import { aCircuit, aCylinder, aPartner, circuitDraft, customerDraft, cylinderDraft, siteDraft, systemDraft } from './builders'
import { aDraft } from './drafts'
import type { TestCompany } from './server'

/** One row of every kind that a route names, made in one company. */
export interface Rows {
  customer: string
  site: string
  system: string
  circuit: string
  component: string
  mark: string
  leak: string
  cylinder: string
  partner: string
  visit: string
  posting: string
  person: string
  device: string
}

export async function rowsOf(company: TestCompany): Promise<Rows> {
  const { officer, technician } = company
  const circuit = await aCircuit(officer)
  const add = async (client: typeof officer, path: string, body: object) => (await client.post(path, body).expect(201)).body as WireCircuit & { id: string }
  const component = await add(technician, `/api/circuits/${circuit.id}/components`, BODIES.component)
  const mark = await add(technician, `/api/circuits/${circuit.id}/marks`, BODIES.mark)
  const leak = { ...BODIES.leak, id: uuid() }
  await add(technician, `/api/circuits/${circuit.id}/leaks`, leak)
  const visit = await add(technician, '/api/visits', { id: uuid(), siteId: circuit.siteId, visitedOn: '2026-11-20', remark: null })
  const opening = aDraft({ kind: 'opening-charge', pounds: '60', circuitId: circuit.id })
  await send(officer, opening).expect(201)
  return {
    customer: circuit.customerId, site: circuit.siteId, system: circuit.systemId, circuit: circuit.id, component: component.components[0]?.id ?? '', mark: mark.marks[0]?.id ?? '',
    leak: leak.id, cylinder: (await aCylinder(officer)).id, partner: (await aPartner(officer)).id, visit: visit.id, posting: opening.id, person: technician.personId,
    device: (await technician.get('/api/me/devices').expect(200)).body[0].id as string,
  }
}

export const nowhere = (): Rows => {
  const kinds = ['customer', 'site', 'system', 'circuit', 'component', 'mark', 'leak', 'cylinder', 'partner', 'visit', 'posting', 'person', 'device'] as const
  return Object.fromEntries(kinds.map((kind) => [kind, uuid()])) as Record<(typeof kinds)[number], string>
}

const BODIES = {
  component: { kind: 'condenser-coil', name: 'Coil', position: null },
  mark: { componentId: null, text: 'Rubs', markedOn: '2026-11-20' },
  leak: { componentId: null, foundOn: '2026-11-20', cause: 'vibration-rub', method: 'electronic', position: null, note: null },
}
const { fullCharge, ...circuitChange } = circuitDraft(uuid())

/**
 * What each route that names a row is asked with: the kind of the row, and a body in which nothing else is
 * wrong, so that only the row can be the reason of a refusal. A route that is missing here fails the matrix.
 */
export const ROUTES_OF_ROWS: Record<string, { row: keyof Rows; body?: (rows: Rows) => object; query?: (id: string) => string }> = {
  'delete /api/me/devices/:id': { row: 'device' },
  'get /api/people/:id': { row: 'person' },
  'patch /api/people/:id': { row: 'person', body: () => ({ name: 'Forged', email: `${uuid()}@people.example`, role: 'auditor', certificateNumber: null, certificateType: null, customerIds: [] }) },
  'post /api/people/:id/invite': { row: 'person' },
  'post /api/people/:id/disable': { row: 'person' },
  'post /api/people/:id/enable': { row: 'person' },
  'get /api/customers/:id': { row: 'customer' },
  'patch /api/customers/:id': { row: 'customer', body: () => customerDraft() },
  'get /api/sites/:id': { row: 'site' },
  'patch /api/sites/:id': { row: 'site', body: (rows) => siteDraft(rows.customer) },
  'get /api/systems/:id': { row: 'system' },
  'patch /api/systems/:id': { row: 'system', body: (rows) => systemDraft(rows.site) },
  'get /api/circuits/:id': { row: 'circuit' },
  'patch /api/circuits/:id': { row: 'circuit', body: (rows) => ({ ...circuitChange, systemId: rows.system }) },
  'post /api/circuits/:id/full-charges': { row: 'circuit', body: () => ({ ...fullCharge }) },
  'post /api/circuits/:id/components': { row: 'circuit', body: () => BODIES.component },
  'patch /api/components/:id': { row: 'component', body: () => BODIES.component },
  'post /api/circuits/:id/marks': { row: 'circuit', body: () => BODIES.mark },
  'post /api/marks/:id/resolve': { row: 'mark', body: () => ({ resolvedOn: '2026-11-21' }) },
  'post /api/circuits/:id/leaks': { row: 'circuit', body: () => ({ ...BODIES.leak, id: uuid() }) },
  'post /api/leaks/:id/repair': { row: 'leak', body: () => ({ repairedOn: '2026-11-21', repair: 'Brazed' }) },
  'post /api/circuits/:id/verifications': { row: 'circuit', body: () => ({ id: uuid(), kind: 'initial', leakId: null, testedOn: '2026-11-21', type: 'Bubbles', passed: true, showsAllRepaired: false, note: null }) },
  'get /api/cylinders/:id': { row: 'cylinder' },
  'patch /api/cylinders/:id': { row: 'cylinder', body: () => cylinderDraft() },
  'get /api/partners/:id': { row: 'partner' },
  'patch /api/partners/:id': { row: 'partner', body: () => ({ name: 'Forged', kind: 'supplier', address: null, certificate: null }) },
  'get /api/postings/:id': { row: 'posting' },
  'get /api/visits/:id': { row: 'visit' },
  'post /api/visits/:id/calculations': { row: 'visit', body: () => ({ id: uuid(), calculator: 'superheat', title: 'Superheat', lines: [] }) },
  'get /api/papers/leak-rate-summary.pdf': { row: 'site', query: (id) => `?siteId=${id}&from=2026-01-01&to=2026-12-31` },
  'get /api/papers/service-record.pdf': { row: 'visit', query: (id) => `?visitId=${id}` },
}
