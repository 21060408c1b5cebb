import type { House } from './house'
import type { Route } from './route'
import { ledgerRoutes } from './modules/ledger/ledger.routes'
import { papersRoutes } from './modules/papers/papers.routes'
import { circuitsRoutes } from './modules/circuits/circuits.routes'
import { customersRoutes } from './modules/customers/customers.routes'
import { cylindersRoutes } from './modules/cylinders/cylinders.routes'
import { overviewRoutes } from './modules/overview/overview.routes'
import { partnersRoutes } from './modules/partners/partners.routes'
import { peopleRoutes } from './modules/people/people.routes'
import { sitesRoutes } from './modules/sites/sites.routes'
import { systemsRoutes } from './modules/systems/systems.routes'
import { trailRoutes } from './modules/trail/trail.routes'
import { visitsRoutes } from './modules/visits/visits.routes'
import { sessionRoutes } from './modules/session/session.routes'

/** Every route of the API. The role matrix test and the server read the same table. */
export const routeTable = (house: House): Route[] => [
  ...sessionRoutes(house),
  ...ledgerRoutes(house),
  ...papersRoutes(house),
  ...circuitsRoutes(house),
  ...customersRoutes(house),
  ...cylindersRoutes(house),
  ...overviewRoutes(house),
  ...partnersRoutes(house),
  ...peopleRoutes(house),
  ...sitesRoutes(house),
  ...systemsRoutes(house),
  ...trailRoutes(house),
  ...visitsRoutes(house),
]
