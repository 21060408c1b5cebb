import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { CircuitChangeDto, CircuitDraftDto, CircuitsQuery, ComponentDto, FullChargeDto, LeakDto, MarkDto, RepairDto, ResolveDto, VerificationDto } from './circuits.dto'
import * as circuits from './circuits.service'
import * as parts from './parts.service'

export const circuitsRoutes = ({ database, now }: House): Route[] => [
  route({
    method: 'get', path: '/api/circuits', may: 'circuit.read', summary: 'Circuits with their standing, the worst first', query: CircuitsQuery,
    handle: ({ who, query }) => database.inCompany(who, (tx) => circuits.listCircuits(tx, who, query, now())),
  }),
  route({
    method: 'post', path: '/api/circuits', may: 'circuit.update', summary: 'Add a circuit', body: CircuitDraftDto, problems: ['name-taken'],
    handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => circuits.createCircuit(tx, who, body, now()))),
  }),
  route({
    method: 'get', path: '/api/circuits/:id', may: 'circuit.read', summary: 'The circuit sheet', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => database.inCompany(who, (tx) => circuits.getCircuit(tx, who, params.id, now())),
  }),
  route({
    method: 'patch', path: '/api/circuits/:id', may: 'circuit.update', summary: 'Change a circuit', params: IdParams, body: CircuitChangeDto, needsVersion: true,
    problems: ['not-found', 'changed-meanwhile', 'version-missing', 'name-taken'],
    handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => circuits.changeCircuit(tx, who, params.id, version, body, now())),
  }),
  route({
    method: 'post', path: '/api/circuits/:id/full-charges', may: 'circuit.update', summary: 'Revise the full charge', params: IdParams, body: FullChargeDto, problems: ['not-found'],
    handle: async ({ who, params, body }) => created(await database.inCompany(who, (tx) => circuits.reviseFullCharge(tx, who, params.id, body, now()))),
  }),
  route({
    method: 'post', path: '/api/circuits/:id/components', may: 'component.update', summary: 'Add a component', params: IdParams, body: ComponentDto, problems: ['not-found'],
    handle: async ({ who, params, body }) => created(await database.inCompany(who, (tx) => parts.addComponent(tx, who, params.id, body, now()))),
  }),
  route({
    method: 'patch', path: '/api/components/:id', may: 'component.update', summary: 'Change a component', params: IdParams, body: ComponentDto, problems: ['not-found'],
    handle: ({ who, params, body }) => database.inCompany(who, (tx) => parts.changeComponent(tx, who, params.id, body, now())),
  }),
  route({
    method: 'post', path: '/api/circuits/:id/marks', may: 'leak.update', summary: 'Leave a watch mark', params: IdParams, body: MarkDto, problems: ['not-found'],
    handle: async ({ who, params, body }) => created(await database.inCompany(who, (tx) => parts.addMark(tx, who, params.id, body, now()))),
  }),
  route({
    method: 'post', path: '/api/marks/:id/resolve', may: 'leak.update', summary: 'Take a watch mark off', params: IdParams, body: ResolveDto, problems: ['not-found'],
    handle: ({ who, params, body }) => database.inCompany(who, (tx) => parts.resolveMark(tx, who, params.id, body.resolvedOn, now())),
  }),
  route({
    method: 'post', path: '/api/circuits/:id/leaks', may: 'leak.update', summary: 'Record a leak', params: IdParams, body: LeakDto, problems: ['not-found'],
    handle: async ({ who, params, body }) => created(await database.inCompany(who, (tx) => parts.addLeak(tx, who, params.id, body, now()))),
  }),
  route({
    method: 'post', path: '/api/leaks/:id/repair', may: 'leak.update', summary: 'Record the repair of a leak', params: IdParams, body: RepairDto, problems: ['not-found'],
    handle: ({ who, params, body }) => database.inCompany(who, (tx) => parts.repairLeak(tx, who, params.id, body, now())),
  }),
  route({
    method: 'post', path: '/api/circuits/:id/verifications', may: 'leak.update', summary: 'Record a verification test', params: IdParams, body: VerificationDto, problems: ['not-found'],
    handle: async ({ who, params, body }) => created(await database.inCompany(who, (tx) => parts.addVerification(tx, who, params.id, body, now()))),
  }),
]
