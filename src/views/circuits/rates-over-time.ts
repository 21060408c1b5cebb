import type { WireRate } from '../../../shared/api/places'
import { addDays, addMonths, daysBetween, plainDate } from '../../../shared/dates/plain-date'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { isNear } from '../../../shared/leak-rate/near'
import { percent } from '../../../shared/leak-rate/percent'

export type RateMark = 'above' | 'near' | 'below' | 'exempt'

/** One day with additions on the chart, by its highest rate; shares are 0 at the left and at the foot, 1 at the right and at the top. */
export interface RatePoint {
  rate: WireRate
  mark: RateMark
  x: number
  y: number
  /** Higher than the scale reaches: drawn at the top with its figure. */
  isBeyond: boolean
}

export interface RateChart {
  from: PlainDate
  to: PlainDate
  /** [% per 12 months] at the top */
  top: number
  points: RatePoint[]
  /** The threshold over time, as level pieces. */
  threshold: { fromX: number; toX: number; y: number; percent: string }[]
  /** The first days of the months in between. */
  months: { x: number; on: PlainDate }[]
}

const BEYOND_TIMES = 3 // thresholds; one runaway rate would press all others flat
const LEAST_SPAN = 365 // [d]
const EDGE_SHARE = 0.03 // of the span, so that no mark stands on the edge

/** Where everything stands on the chart of rates over time. Figures are rounded to the screen here, never to a verdict. */
export function rateChart(rates: readonly WireRate[], { thresholdPercent, today }: { thresholdPercent: string | null; today: PlainDate }): RateChart | null {
  const inOrder = rates.toSorted((a, b) => a.occurredOn.localeCompare(b.occurredOn))
  const [first] = inOrder
  if (!first) return null
  const span = Math.max(LEAST_SPAN, daysBetween(first.occurredOn, today))
  const edge = Math.ceil(span * EDGE_SHARE)
  const from = addDays(addDays(today, -span), -edge)
  const to = addDays(today, edge)
  const xOf = (on: PlainDate): number => daysBetween(from, on) / daysBetween(from, to)
  const highest = Math.max(...inOrder.map(({ ratePercent }) => Number(ratePercent ?? 0)))
  const limit = Number(thresholdPercent ?? inOrder.findLast((each) => each.thresholdPercent)?.thresholdPercent ?? 0)
  const top = limit > 0 ? Math.max(limit * 1.5, Math.min(highest * 1.15, limit * BEYOND_TIMES)) : Math.max(highest * 1.2, 1)
  return {
    from, to, top,
    points: highestOfEachDay(inOrder).map((rate) => {
      const value = Number(rate.ratePercent ?? 0)
      return { rate, mark: markOf(rate), x: xOf(rate.occurredOn), y: Math.min(value / top, 1), isBeyond: value > top }
    }),
    threshold: thresholdPieces(inOrder, { thresholdPercent, xOf, top }),
    months: monthsBetween(from, to).map((on) => ({ on, x: xOf(on) })),
  }
}

/** Additions of one day are one leak: what they came to in the end is what counts, and the table has each. */
function highestOfEachDay(rates: readonly WireRate[]): WireRate[] {
  const byDay = new Map<PlainDate, WireRate>()
  for (const rate of rates) {
    const other = byDay.get(rate.occurredOn)
    if (!other || Number(rate.ratePercent ?? -1) >= Number(other.ratePercent ?? -1)) byDay.set(rate.occurredOn, rate)
  }
  return [...byDay.values()]
}

function markOf({ ratePercent, thresholdPercent, isAbove }: WireRate): RateMark {
  if (ratePercent === null) return 'exempt'
  if (isAbove) return 'above'
  return thresholdPercent !== null && isNear(percent(ratePercent), percent(thresholdPercent)) ? 'near' : 'below'
}

/** A threshold holds from the first addition that was measured by it until the next one that was measured by another. */
function thresholdPieces(rates: readonly WireRate[], { thresholdPercent, xOf, top }: { thresholdPercent: string | null; xOf: (on: PlainDate) => number; top: number }): RateChart['threshold'] {
  const pieces: RateChart['threshold'] = []
  const measured = rates.filter((rate) => rate.thresholdPercent !== null)
  for (const { thresholdPercent: value, occurredOn } of measured) {
    const last = pieces.at(-1)
    if (value === null || last?.percent === value) continue
    if (last) last.toX = xOf(occurredOn)
    pieces.push({ fromX: last ? xOf(occurredOn) : 0, toX: 1, y: Number(value) / top, percent: value })
  }
  if (pieces.length === 0 && thresholdPercent !== null) pieces.push({ fromX: 0, toX: 1, y: Number(thresholdPercent) / top, percent: thresholdPercent })
  return pieces
}

function monthsBetween(from: PlainDate, to: PlainDate): PlainDate[] {
  const months: PlainDate[] = []
  for (let on = addMonths(plainDate(`${from.slice(0, 7)}-01`), 1); on <= to; on = addMonths(on, 1)) months.push(on)
  return months
}
