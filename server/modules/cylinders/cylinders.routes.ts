import { localDateOf } from '../../../shared/dates/plain-date'
import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { CylinderDraftDto, CylindersQuery } from './cylinders.dto'
import * as cylinders from './cylinders.service'

export const cylindersRoutes = ({ database, now }: House): Route[] => {
  // A cylinder is at no site: whether it is past its test date goes by the date in UTC.
  const today = () => localDateOf(now().toISOString(), 'UTC')
  return [
    route({
      method: 'get', path: '/api/cylinders', may: 'cylinder.read', summary: 'Cylinders with what they hold by the book', query: CylindersQuery,
      handle: ({ who, query }) => database.inCompany(who, (tx) => cylinders.listCylinders(tx, who, query, today())),
    }),
    route({
      method: 'post', path: '/api/cylinders', may: 'cylinder.update', summary: 'Add a cylinder', body: CylinderDraftDto, problems: ['name-taken'],
      handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => cylinders.createCylinder(tx, who, body, today()))),
    }),
    route({
      method: 'get', path: '/api/cylinders/:id', may: 'cylinder.read', summary: 'One cylinder', params: IdParams, problems: ['not-found'],
      handle: ({ who, params }) => database.inCompany(who, (tx) => cylinders.getCylinder(tx, who, params.id, today())),
    }),
    route({
      method: 'patch', path: '/api/cylinders/:id', may: 'cylinder.update', summary: 'Change a cylinder', params: IdParams, body: CylinderDraftDto, needsVersion: true,
      problems: ['not-found', 'changed-meanwhile', 'version-missing', 'name-taken'],
      handle: ({ who, params, body, version }) => database.inCompany(who, (tx) => cylinders.changeCylinder(tx, who, params.id, version, body, today())),
    }),
  ]
}
