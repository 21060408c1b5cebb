import type { House } from './house'
import type { Route } from './route'
import { ledgerRoutes } from './modules/ledger/ledger.routes'
import { sessionRoutes } from './modules/session/session.routes'

/** Every route of the API. The role matrix test and the server read the same table. */
export const routeTable = (house: House): Route[] => [
  ...sessionRoutes(house),
  ...ledgerRoutes(house),
]
