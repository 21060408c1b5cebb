export const LENGTH_UNITS = ['m', 'mm', 'ft', 'in'] as const
export type LengthUnit = (typeof LENGTH_UNITS)[number]

/** Micrometres are whole numbers in each of these units, so metres from inches are the nearest a number can be. */
const MICROMETRES_PER: Record<LengthUnit, number> = {
  m: 1_000_000,
  mm: 1000,
  ft: 304_800, // exact, international foot, 1959
  in: 25_400, // exact, international inch, 1959
}

/** @returns [m] */
export const toMetres = (value: number, unit: LengthUnit): number => (value * MICROMETRES_PER[unit]) / MICROMETRES_PER.m
/** @param metres  [m] */
export const fromMetres = (metres: number, unit: LengthUnit): number => (metres * MICROMETRES_PER.m) / MICROMETRES_PER[unit]
