import type { Page } from '../../../shared/api/page'
import type { CircuitStanding, Standing, WireOverview } from '../../../shared/api/places'
import { may, type Actor } from '../../actor'
import type { Tx } from '../../database'
import * as repository from './overview.repository'

const LATEST_ROWS = 10

/** One page for the officer and the owner: how many circuits stand where, the worst first, stock and what was posted last. */
export async function overview(tx: Tx, who: Actor, worst: Page<CircuitStanding>): Promise<WireOverview> {
  const counts = new Map((await repository.countStandings(tx, who)).map((row) => [row.standing, row.count]))
  const count = (standing: Standing): number => counts.get(standing) ?? 0
  return {
    over: count('over'), flat: count('flat'), near: count('near'), far: count('far'), none: count('none'),
    circuits: worst.rows,
    stock: may(who, 'stock.read') ? await repository.stock(tx, who.companyId) : null,
    latest: await repository.latestPostings(tx, who, LATEST_ROWS),
  }
}
