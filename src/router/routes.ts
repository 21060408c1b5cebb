import type { RouteRecordRaw } from 'vue-router'
import { accountRoutes } from './account.routes'
import { benchRoutes } from './bench.routes'
import { circuitsRoutes } from './circuits.routes'
import { cylindersRoutes } from './cylinders.routes'
import { ledgerRoutes } from './ledger.routes'
import { overviewRoutes } from './overview.routes'
import { papersRoutes } from './papers.routes'
import { peopleRoutes } from './people.routes'
import { placesRoutes } from './places.routes'

/** Every screen, one file per area; each is fetched when it is opened. */
export const routes: RouteRecordRaw[] = [
  ...overviewRoutes, ...placesRoutes, ...circuitsRoutes, ...cylindersRoutes, ...ledgerRoutes,
  ...papersRoutes, ...peopleRoutes, ...benchRoutes, ...accountRoutes,
]
