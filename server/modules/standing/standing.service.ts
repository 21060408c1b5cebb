import type { CircuitStanding, Standing, WireCircuit, WireRate } from '../../../shared/api/places'
import { localDateOf, plainDate, type PlainDate } from '../../../shared/dates/plain-date'
import { historyFromWire } from '../../../shared/leak-rate/from-wire'
import { fullChargeOn } from '../../../shared/leak-rate/history'
import { roomOn } from '../../../shared/leak-rate/look-ahead'
import { isNear } from '../../../shared/leak-rate/near'
import { isAbove, toPercentText, toTenThousandths, type Percent } from '../../../shared/leak-rate/percent'
import { rateAdditions, type RatedAddition } from '../../../shared/leak-rate/rated-additions'
import { isPositive, kg, toKgText } from '../../../shared/mass/mass'
import type { Tx } from '../../database'
import { lockAccounts } from '../ledger/accounts'
import { lowestThreshold } from '../../../shared/rules/engine'
import { decisionsFor, thresholdsOn } from './rules'
import * as repository from './history.repository'
import { type CircuitRecord } from './history.repository'

const RATE_DIGITS = 12 // as `numeric(30, 12)` keeps them; comparisons are made before rounding
const FLAT_SEVERITY = 900_000_000
const OVER_SEVERITY = 1_000_000_000
const MOST_SHARE = 99_999_999 // [1/10,000 of the threshold] beyond it every circuit is equally bad

/** The site's date of today. */
export type TodayAt = (timeZone: string) => PlainDate
export const todayAt = (now: Date): TodayAt => (timeZone) => localDateOf(now.toISOString(), timeZone)

const historyOf = (record: CircuitRecord) => historyFromWire(wireHistoryOf(record))
const wireHistoryOf = (record: CircuitRecord): WireCircuit['history'] => ({
  method: record.leak_rate_method,
  commissionedOn: record.commissioned_on ? plainDate(record.commissioned_on) : null,
  fullCharges: record.full_charges,
  events: record.events,
})

/**
 * Computes the rates and the standing of circuits anew from their whole history and keeps the result for
 * lists. Called in the transaction of whatever changed something they rest on. A posting in flight is
 * waited for: else the older of the two results could be kept last.
 */
export async function reviewCircuits(tx: Tx, companyId: string, circuitIds: string[]): Promise<void> {
  await lockAccounts(tx, companyId, circuitIds)
  await reviewLockedCircuits(tx, companyId, circuitIds)
}

/** As `reviewCircuits`, for the ledger, which holds the accounts already. */
export async function reviewLockedCircuits(tx: Tx, companyId: string, circuitIds: string[]): Promise<void> {
  for (const record of await repository.circuitRecords(tx, companyId, circuitIds)) {
    const rated = rateAdditions(historyOf(record))
    const rates = rated.map((addition, position) => rateToStore(record, addition, position))
    await repository.storeRates(tx, companyId, record, rates)
    await repository.storeStanding(tx, companyId, record, standingOf(record, rated))
  }
}

/** The threshold in force for a circuit on the day of an addition, the lowest of all packs that apply. */
function thresholdOn(record: CircuitRecord, on: PlainDate): Percent | null {
  return lowestThreshold(thresholdsOn(record, fullChargeOn(historyOf(record).fullCharges, on), on))?.threshold ?? null
}

function rateToStore(record: CircuitRecord, addition: RatedAddition, position: number): repository.RateToStore {
  const threshold = thresholdOn(record, addition.occurredOn)
  return {
    postingId: addition.postingId, occurredOn: addition.occurredOn, position, massKg: toKgText(addition.massKg),
    countedKg: toKgText(addition.countedKg), addedKg: toKgText(addition.addedKg), days: addition.days,
    fullChargeKg: addition.fullChargeKg && toKgText(addition.fullChargeKg),
    ratePercent: addition.rate && toPercentText(addition.rate, RATE_DIGITS),
    thresholdPercent: threshold && toPercentText(threshold, 4),
    isAbove: addition.rate !== null && threshold !== null && isAbove(addition.rate, threshold),
    exempt: addition.exempt, basis: addition.basis, leakId: addition.leakId,
  }
}

/** A retired circuit is rated no more; its rates stay in its own history. */
const RETIRED: repository.StandingToStore = { standing: 'none', ratePercent: null, ratedOn: null, thresholdPercent: null, severity: -1, rateTenThousandths: -1 }

/** Where a circuit stands: by the rate of its latest rated addition against the threshold of that day. */
function standingOf(record: CircuitRecord, rated: readonly RatedAddition[]): repository.StandingToStore {
  if (record.status === 'retired') return RETIRED
  const last = rated.findLast((addition) => addition.rate !== null)
  const rate = last?.rate ?? null
  const threshold = last ? thresholdOn(record, last.occurredOn) : null
  const share = rate && threshold ? Math.min(rate.times(10_000).dividedBy(threshold).floor().toNumber(), MOST_SHARE) : 0
  const isFlat = record.status === 'in-service' && record.full_charges.length > 0 && !isPositive(kg(record.book_kg))
  const standing: Standing = rate && threshold && isAbove(rate, threshold) ? 'over'
    : isFlat ? 'flat'
      : rate && threshold ? (isNear(rate, threshold) ? 'near' : 'far')
        : 'none'
  return {
    standing, ratePercent: rate && toPercentText(rate, RATE_DIGITS), ratedOn: last?.occurredOn ?? null,
    thresholdPercent: threshold && toPercentText(threshold, 4),
    severity: standing === 'over' ? OVER_SEVERITY + share : standing === 'flat' ? FLAT_SEVERITY + share : share,
    rateTenThousandths: rate ? toTenThousandths(rate) : -1,
  }
}

/** What lists show beside a circuit's own columns. */
export type StandingFacts = Pick<CircuitStanding, 'fullChargeKg' | 'bookChargeKg' | 'ratePercent' | 'ratedOn' | 'thresholdPercent' | 'roomKg' | 'standing'>

/** The standing of some circuits as of today: the rate as stored, the threshold and the room as they are now. */
export async function standingsOf(tx: Tx, companyId: string, circuitIds: string[], today: TodayAt): Promise<Map<string, StandingFacts>> {
  if (circuitIds.length === 0) return new Map()
  const records = await repository.circuitRecords(tx, companyId, circuitIds)
  const stored = new Map((await repository.standingRows(tx, companyId, circuitIds)).map((row) => [row.circuit_id, row]))
  return new Map(records.map((record) => [record.circuit_id, factsOf(record, stored.get(record.circuit_id) ?? null, today(record.time_zone))]))
}

function factsOf(record: CircuitRecord, stored: repository.StandingRow | null, on: PlainDate): StandingFacts {
  const history = historyOf(record)
  const fullChargeKg = fullChargeOn(history.fullCharges, on)
  const threshold = lowestThreshold(thresholdsOn(record, fullChargeKg, on))?.threshold ?? null
  const room = threshold && record.status === 'in-service' ? roomOn(history, on, threshold) : null
  return {
    fullChargeKg: fullChargeKg && toKgText(fullChargeKg), bookChargeKg: toKgText(kg(record.book_kg)),
    ratePercent: stored?.rate_percent ?? null, ratedOn: stored?.rated_on ? plainDate(stored.rated_on) : null,
    thresholdPercent: threshold ? threshold.toFixed() : null,
    roomKg: room && toKgText(room.roomKg), standing: (stored?.standing ?? 'none') as Standing,
  }
}

/** What the circuit sheet shows of the rules and the rates, and the history from which the phone computes ahead. */
export async function sheetOf(tx: Tx, companyId: string, circuitId: string, today: TodayAt): Promise<Pick<WireCircuit, 'thresholds' | 'packs' | 'rates' | 'history'>> {
  const [record] = await repository.circuitRecords(tx, companyId, [circuitId])
  if (!record) throw new RangeError(`Circuit ${circuitId} was not read.`)
  const on = today(record.time_zone)
  const fullChargeKg = fullChargeOn(historyOf(record).fullCharges, on)
  return {
    thresholds: thresholdsOn(record, fullChargeKg, on).map(({ packId, threshold, source, checkedOn }) =>
      ({ packId, percent: threshold.toFixed(), cite: source.cite, basis: source.basis, checkedOn })),
    packs: decisionsFor(record, fullChargeKg, on),
    rates: await repository.ratesOf<WireRate>(tx, companyId, circuitId),
    history: wireHistoryOf(record),
  }
}

