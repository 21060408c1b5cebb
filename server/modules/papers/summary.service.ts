import { addDays, addYears, isAfter, localDateOf, plainDate, type PlainDate } from '../../../shared/dates/plain-date'
import { kg } from '../../../shared/mass/mass'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import type { LeakRateSummary, SummaryCircuit } from '../../papers/leak-rate-summary'
import { badField, notFound } from '../../problem'
import * as standing from '../standing/standing.service'
import type { LeakRateSummaryQuery } from './papers.dto'
import { circuitRows, fullChargeRows, siteRow, type CircuitRow } from './places.repository'
import * as repository from './summary.repository'
import { fullChargeOf, groupedBy, ownerOf, rateOf, siteOf } from './wire'

/**
 * Everything the leak-rate summary of a site says.
 *
 * @throws Problem not-found where the site is not this person's to see; bad-input where the period ends before it begins
 */
export async function summaryOf(tx: Tx, who: Actor, query: LeakRateSummaryQuery, now: Date): Promise<LeakRateSummary> {
  const site = await siteRow(tx, who, query.siteId)
  if (!site) throw notFound('site')
  const period = periodOf(query, localDateOf(now.toISOString(), site.time_zone))
  const circuits = await circuitRows(tx, who.companyId, site.id, null)
  return { site: siteOf(site), owner: ownerOf(site), method: site.leak_rate_method, period, circuits: await circuitsOf(tx, who.companyId, circuits, period) }
}

type Period = LeakRateSummary['period']

function periodOf({ from, to }: LeakRateSummaryQuery, today: PlainDate): Period {
  const end = to ?? today
  const period = { from: from ?? addDays(addYears(end, -1), 1), to: end }
  if (isAfter(period.from, period.to)) throw badField('to', 'dateOrder')
  return period
}

async function circuitsOf(tx: Tx, companyId: string, circuits: CircuitRow[], period: Period): Promise<SummaryCircuit[]> {
  const asked = { companyId, circuitIds: circuits.map((circuit) => circuit.id), ...period }
  const ofCircuit = <Row extends { circuit_id: string }>(rows: Row[]) => groupedBy(rows, (row) => row.circuit_id)
  const fullCharges = ofCircuit(await fullChargeRows(tx, companyId, asked.circuitIds, period.to))
  const additions = ofCircuit(await repository.additionRows(tx, asked))
  const removals = ofCircuit(await repository.removalRows(tx, asked))
  const tests = ofCircuit(await repository.testRows(tx, asked))
  const reversed = ofCircuit(await repository.reversedCounts(tx, asked))
  const result: SummaryCircuit[] = []
  for (const circuit of circuits) {
    const { thresholds, packs } = await standing.sheetOf(tx, companyId, circuit.id, () => period.to)
    result.push({
      systemTag: circuit.system_tag, systemName: circuit.system_name, location: circuit.location, name: circuit.name, refrigerant: circuit.refrigerant,
      category: circuit.category, status: circuit.status, commissionedOn: circuit.commissioned_on ? plainDate(circuit.commissioned_on) : null,
      fullCharges: fullCharges(circuit.id).map(fullChargeOf),
      additions: additions(circuit.id).map((row) => ({ ...rateOf(row), occurredOn: plainDate(row.occurred_on), personName: row.person_name, massKg: kg(row.mass_kg) })),
      removals: removals(circuit.id).map((row) =>
        ({ kind: row.kind, occurredOn: plainDate(row.occurred_on), personName: row.person_name, massKg: kg(row.mass_kg), purpose: row.purpose })),
      tests: tests(circuit.id).map((row) => ({ kind: row.kind, testedOn: plainDate(row.tested_on), type: row.type, passed: row.passed, personName: row.person_name })),
      reversedCount: reversed(circuit.id)[0]?.count ?? 0,
      thresholds: thresholds.map((threshold) => ({ ...threshold, category: circuit.category })), packs,
    })
  }
  return result
}
