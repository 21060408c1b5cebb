import { route, type Route } from '../../route'
import type { House } from '../../house'
import { TrailQuery } from './trail.dto'
import { listTrail } from './trail.service'

export const trailRoutes = ({ database }: House): Route[] => [
  route({
    method: 'get', path: '/api/trail', may: 'trail.read', summary: 'Who changed what, newest first', query: TrailQuery,
    handle: ({ who, query }) => database.inCompany(who, (tx) => listTrail(tx, who, query)),
  }),
]
