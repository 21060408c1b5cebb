import { created, route, type Route } from '../../route'
import type { House } from '../../house'
import { IdParams } from '../../fields'
import { CalculationDto, VisitDto, VisitsQuery } from './visits.dto'
import * as visits from './visits.service'

export const visitsRoutes = ({ database }: House): Route[] => [
  route({
    method: 'get', path: '/api/visits', may: 'visit.read', summary: 'Visits, newest first', query: VisitsQuery,
    handle: ({ who, query }) => database.inCompany(who, (tx) => visits.listVisits(tx, who, query)),
  }),
  route({
    method: 'post', path: '/api/visits', may: 'visit.update', summary: 'Begin a visit; the same id again changes nothing', body: VisitDto,
    handle: async ({ who, body }) => created(await database.inCompany(who, (tx) => visits.createVisit(tx, who, body))),
  }),
  route({
    method: 'get', path: '/api/visits/:id', may: 'visit.read', summary: 'One visit', params: IdParams, problems: ['not-found'],
    handle: ({ who, params }) => database.inCompany(who, (tx) => visits.getVisit(tx, who, params.id)),
  }),
  route({
    method: 'post', path: '/api/visits/:id/calculations', may: 'visit.update', summary: 'Put the result of a calculator into a visit', params: IdParams, body: CalculationDto, problems: ['not-found'],
    handle: async ({ who, params, body }) => created(await database.inCompany(who, (tx) => visits.attachCalculation(tx, who, params.id, body))),
  }),
]
