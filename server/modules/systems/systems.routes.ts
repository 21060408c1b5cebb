import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { SystemDraftDto, SystemsQuery } from './systems.dto'
import * as systems from './systems.service'

export const systemsRoutes = ({ database, now }: House): Route[] => [
  route({
    method: 'get', path: '/api/systems', may: 'system.read', summary: 'Systems with their circuits', query: SystemsQuery,
    handle: ({ who, query }) => database.inCompany(who, (tx) => systems.listSystems(tx, who, query, now())),
  }),
  route({
    method: 'post', path: '/api/systems', may: 'system.update', summary: 'Add a system', body: SystemDraftDto, problems: ['name-taken'],
    handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => systems.createSystem(tx, who, body, now()))),
  }),
  route({
    method: 'get', path: '/api/systems/:id', may: 'system.read', summary: 'One system', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => database.inCompany(who, (tx) => systems.getSystem(tx, who, params.id, now())),
  }),
  route({
    method: 'patch', path: '/api/systems/:id', may: 'system.update', summary: 'Change a system', params: IdParams, body: SystemDraftDto, needsVersion: true,
    problems: ['not-found', 'changed-meanwhile', 'version-missing', 'name-taken'],
    handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => systems.changeSystem(tx, who, params.id, version, body, now())),
  }),
]
