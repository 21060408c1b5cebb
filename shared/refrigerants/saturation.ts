import document from './data/saturation.json'

/** A row of the table: [°C, bubble kPa abs, dew kPa abs, saturated liquid kg/m³ at the bubble point, saturated vapour kg/m³ at the dew point]. */
type Row = readonly number[]
interface Table { rows: readonly Row[] }

const tables = document.refrigerants as unknown as Record<string, Table>
const KELVIN = 273.15

export const SATURATION_SOURCE = `${document.source}, Bell et al., Ind. Eng. Chem. Res. 53 (2014) 2498`

/** A value from the table, or the range that the table has. Nothing is extrapolated. */
export type Looked = { ok: true; value: number } | { ok: false; code: 'outside-table'; lowest: number; highest: number } | { ok: false; code: 'no-table' }

const COLUMN = { bubbleKpa: 1, dewKpa: 2, liquidDensity: 3, vapourDensity: 4 } as const
export type SaturationColumn = keyof typeof COLUMN

/** ln of a column between two rows: a cubic of u = 1/T − from, with u from 0 to width [1/K]. */
interface Segment { from: number; width: number; c0: number; c1: number; c2: number; c3: number }
/** ln of a column over 1/T [1/K] as a cubic Hermite spline; segments ascend in 1/T, and `isRising` says whether the values do. */
interface Curve { first: number; last: number; isRising: boolean; segments: readonly Segment[] }
const curves = new Map<string, Partial<Record<SaturationColumn, Curve>>>()

/**
 * A saturation property at a temperature, by cubic interpolation of its logarithm in 1/T.
 *
 * @param celsius  [°C]
 * @returns [kPa absolute] or [kg/m³]
 */
export function saturationAt(refrigerant: string, column: SaturationColumn, celsius: number): Looked {
  const curve = curveOf(refrigerant, column)
  if (!curve) return { ok: false, code: 'no-table' }
  const x = 1 / (celsius + KELVIN)
  if (!(x >= curve.first && x <= curve.last)) return { ok: false, code: 'outside-table', lowest: 1 / curve.last - KELVIN, highest: 1 / curve.first - KELVIN }
  return { ok: true, value: Math.exp(interpolate(curve, x)) }
}

/**
 * The temperature at which a saturation property has a value; the pressures and the vapour density rise with
 * temperature, the liquid density falls.
 *
 * @param value  [kPa absolute] or [kg/m³]
 * @returns [°C] to a millionth of a kelvin, or the range of the property in the table
 */
export function temperatureAt(refrigerant: string, column: SaturationColumn, value: number): Looked {
  const curve = curveOf(refrigerant, column)
  if (!curve) return { ok: false, code: 'no-table' }
  const ends = [Math.exp(interpolate(curve, curve.first)), Math.exp(interpolate(curve, curve.last))]
  const [lowest, highest] = [Math.min(...ends), Math.max(...ends)]
  if (!(value >= lowest && value <= highest)) return { ok: false, code: 'outside-table', lowest, highest }
  const sought = Math.log(value)
  const segment = lastSegment(curve, ({ c0 }) => (curve.isRising ? c0 <= sought : c0 >= sought))
  return { ok: true, value: segment ? 1 / (segment.from + solve(segment, sought, curve.isRising)) - KELVIN : Number.NaN }
}

/**
 * Temperature glide: how far bubble and dew temperature lie apart at one pressure; none for a pure fluid.
 *
 * @param kPa  [kPa absolute]
 * @returns [K] ≥ 0
 */
export function glideAt(refrigerant: string, kPa: number): Looked {
  const bubble = temperatureAt(refrigerant, 'bubbleKpa', kPa)
  const dew = temperatureAt(refrigerant, 'dewKpa', kPa)
  if (!bubble.ok) return bubble
  return dew.ok ? { ok: true, value: Math.max(0, dew.value - bubble.value) } : dew
}

/** The temperatures that the table of a refrigerant reaches. @returns [°C]; null without a table */
export function tableRange(refrigerant: string): { lowest: number; highest: number } | null {
  const rows = tables[refrigerant]?.rows
  return rows ? { lowest: rows[0]?.[0] ?? 0, highest: rows.at(-1)?.[0] ?? 0 } : null
}

/** Curves are made at the first question and kept: 61 refrigerants times four would delay every start. */
function curveOf(refrigerant: string, column: SaturationColumn): Curve | null {
  const table = tables[refrigerant]
  if (!table) return null
  const known = curves.get(refrigerant) ?? {}
  const curve = known[column] ?? curveThrough(table.rows.map((row) => [row[0] ?? 0, row[COLUMN[column]] ?? 0] as const))
  if (!known[column]) curves.set(refrigerant, { ...known, [column]: curve })
  return curve
}

/** The curve through rows of [°C, value above zero], ascending in temperature; three rows at least. */
function curveThrough(rows: readonly (readonly [celsius: number, value: number])[]): Curve {
  const falling = [...rows].reverse()
  const x = falling.map(([celsius]) => 1 / (celsius + KELVIN))
  const y = falling.map(([, value]) => Math.log(value))
  const segments = x.slice(1).map((to, index) => segmentBetween(x, y, index, to))
  return { first: x[0] ?? 0, last: x.at(-1) ?? 0, isRising: (y.at(-1) ?? 0) > (y[0] ?? 0), segments }
}

/** The Hermite cubic from one row to the next, in powers of the distance from the first. */
function segmentBetween(x: number[], y: number[], index: number, to: number): Segment {
  const from = x[index] ?? 0
  const width = to - from
  const [start, end] = [slopeAt(x, y, index), slopeAt(x, y, index + 1)]
  const mean = ((y[index + 1] ?? 0) - (y[index] ?? 0)) / width
  return { from, width, c0: y[index] ?? 0, c1: start, c2: (3 * mean - 2 * start - end) / width, c3: (start + end - 2 * mean) / width ** 2 }
}

/** The slope of the parabola through a row and its neighbours. */
function slopeAt(x: number[], y: number[], index: number): number {
  const middle = Math.min(Math.max(index, 1), x.length - 2)
  const [x0 = 0, x1 = 0, x2 = 0] = x.slice(middle - 1, middle + 2)
  const [y0 = 0, y1 = 0, y2 = 0] = y.slice(middle - 1, middle + 2)
  const at = x[index] ?? 0
  return y0 * (2 * at - x1 - x2) / ((x0 - x1) * (x0 - x2)) + y1 * (2 * at - x0 - x2) / ((x1 - x0) * (x1 - x2)) + y2 * (2 * at - x0 - x1) / ((x2 - x0) * (x2 - x1))
}

function interpolate(curve: Curve, at: number): number {
  const segment = lastSegment(curve, ({ from }) => from <= at)
  return segment ? valueIn(segment, at - segment.from) : Number.NaN
}

const valueIn = ({ c0, c1, c2, c3 }: Segment, u: number): number => c0 + u * (c1 + u * (c2 + u * c3))
const slopeIn = ({ c1, c2, c3 }: Segment, u: number): number => c1 + u * (2 * c2 + 3 * u * c3)

/** The last segment for which something holds that holds for the first and, once false, stays so; by halving. */
function lastSegment({ segments }: Curve, holds: (segment: Segment) => boolean): Segment | undefined {
  let low = 0
  let high = segments.length
  while (high - low > 1) {
    const middle = (low + high) >> 1
    const segment = segments[middle]
    if (segment && holds(segment)) low = middle
    else high = middle
  }
  return segments[low]
}

const SOLVED_WIDTH = 1e-13 // [1/K] less than a millionth of a kelvin everywhere in the tables
const MOST_STEPS = 60

/** Where a segment has a value: Newton's steps, and a halving where one would leave what is left. @returns [1/K] from its start */
function solve(segment: Segment, sought: number, isRising: boolean): number {
  let low = 0
  let high = segment.width
  let at = high / 2
  for (let step = 0; step < MOST_STEPS; step++) {
    const excess = valueIn(segment, at) - sought
    if (excess > 0 === isRising) high = at
    else low = at
    const tangent = at - excess / slopeIn(segment, at)
    if (Math.abs(tangent - at) < SOLVED_WIDTH) return Math.min(Math.max(tangent, 0), segment.width)
    at = tangent > low && tangent < high ? tangent : (low + high) / 2
  }
  return at
}
