import { route, type Route } from '../../route'
import type { House } from '../../house'
import { listCircuits } from '../circuits/circuits.service'
import { overview } from './overview.service'

const WORST_ROWS = 20

export const overviewRoutes = (house: House): Route[] => [
  route({
    method: 'get', path: '/api/overview', may: 'circuit.read', summary: 'Where the circuits stand, the worst first',
    handle: ({ who }) => house.database.inCompany(who, async (tx) => {
      const worst = await listCircuits(tx, who, { sort: '-severity', limit: WORST_ROWS }, house.now())
      return overview(tx, who, worst)
    }),
  }),
]
