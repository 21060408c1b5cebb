import document from './data/saturation.json'

/** A row of the table: [°C, bubble kPa abs, dew kPa abs, saturated liquid kg/m³ at the bubble point, saturated vapour kg/m³ at the dew point]. */
type Row = readonly number[]
interface Table { rows: readonly Row[] }

const tables = document.refrigerants as unknown as Record<string, Table>
const KELVIN = 273.15
const HALVINGS = 40 // of a table 170 K wide: far below a millionth of a kelvin

export const SATURATION_SOURCE = `${document.source}, Bell et al., Ind. Eng. Chem. Res. 53 (2014) 2498`

/** A value from the table, or the range that the table has. Nothing is extrapolated. */
export type Looked = { ok: true; value: number } | { ok: false; code: 'outside-table'; lowest: number; highest: number } | { ok: false; code: 'no-table' }

const COLUMN = { bubbleKpa: 1, dewKpa: 2, liquidDensity: 3, vapourDensity: 4 } as const
export type SaturationColumn = keyof typeof COLUMN

/** ln of a column over 1/T [1/K], ascending in 1/T, with the slope of a cubic Hermite spline at each row. */
export interface Curve { x: number[]; y: number[]; slope: number[] }
const curves = new Map<string, Curve>()

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
  const first = curve.x[0] ?? 0
  const last = curve.x.at(-1) ?? 0
  if (!(x >= first && x <= last)) return { ok: false, code: 'outside-table', lowest: 1 / last - KELVIN, highest: 1 / first - KELVIN }
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
  let [cold, hot] = [curve.x.at(-1) ?? 0, curve.x[0] ?? 0]
  const [atCold, atHot] = [Math.exp(interpolate(curve, cold)), Math.exp(interpolate(curve, hot))]
  const [lowest, highest] = [Math.min(atCold, atHot), Math.max(atCold, atHot)]
  if (!(value >= lowest && value <= highest)) return { ok: false, code: 'outside-table', lowest, highest }
  const isRising = atHot > atCold
  const sought = Math.log(value)
  for (let halving = 0; halving < HALVINGS; halving++) {
    const middle = (cold + hot) / 2
    const isBelow = interpolate(curve, middle) < sought
    if (isBelow === isRising) cold = middle
    else hot = middle
  }
  return { ok: true, value: 2 / (cold + hot) - KELVIN }
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

function curveOf(refrigerant: string, column: SaturationColumn): Curve | null {
  const key = `${refrigerant} ${column}`
  const known = curves.get(key)
  if (known) return known
  const table = tables[refrigerant]
  if (!table) return null
  const curve = curveThrough(table.rows.map((row) => [row[0] ?? 0, row[COLUMN[column]] ?? 0] as const))
  curves.set(key, curve)
  return curve
}

/** The curve through rows of [°C, value above zero], ascending in temperature; three rows at least. */
export function curveThrough(rows: readonly (readonly [celsius: number, value: number])[]): Curve {
  const falling = [...rows].reverse()
  const x = falling.map(([celsius]) => 1 / (celsius + KELVIN))
  const y = falling.map(([, value]) => Math.log(value))
  return { x, y, slope: x.map((_at, index) => slopeAt(x, y, index)) }
}

/** The value of a curve at a temperature within its rows. @param celsius [°C] */
export const readCurve = (curve: Curve, celsius: number): number => Math.exp(interpolate(curve, 1 / (celsius + KELVIN)))

/** The slope of the parabola through a row and its neighbours. */
function slopeAt(x: number[], y: number[], index: number): number {
  const middle = Math.min(Math.max(index, 1), x.length - 2)
  const [x0 = 0, x1 = 0, x2 = 0] = x.slice(middle - 1, middle + 2)
  const [y0 = 0, y1 = 0, y2 = 0] = y.slice(middle - 1, middle + 2)
  const at = x[index] ?? 0
  return y0 * (2 * at - x1 - x2) / ((x0 - x1) * (x0 - x2)) + y1 * (2 * at - x0 - x2) / ((x1 - x0) * (x1 - x2)) + y2 * (2 * at - x0 - x1) / ((x2 - x0) * (x2 - x1))
}

function interpolate({ x, y, slope }: Curve, at: number): number {
  let low = 0
  let high = x.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if ((x[middle] ?? 0) <= at) low = middle
    else high = middle
  }
  const [x0 = 0, y0 = 0, m0 = 0] = [x[low], y[low], slope[low]]
  const [x1 = 0, y1 = 0, m1 = 0] = [x[high], y[high], slope[high]]
  const h = x1 - x0
  const t = (at - x0) / h
  return (1 + 2 * t) * (1 - t) ** 2 * y0 + t * (1 - t) ** 2 * h * m0 + t * t * (3 - 2 * t) * y1 + t * t * (t - 1) * h * m1
}
