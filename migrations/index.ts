import { CompaniesAndPeople1796083200000 } from './1796083200000-companies-and-people'
import { Places1796083201000 } from './1796083201000-places'
import { Ledger1796083202000 } from './1796083202000-ledger'
import { Standing1796083203000 } from './1796083203000-standing'
import { VisitCalculations1796083204000 } from './1796083204000-visit-calculations'

/** In the order in which they run. */
export const migrations = [
  CompaniesAndPeople1796083200000,
  Places1796083201000,
  Ledger1796083202000,
  Standing1796083203000,
  VisitCalculations1796083204000,
]
