import { saturationAt } from '../refrigerants/saturation'

/** A run of pipe and what stands in it. */
export interface PipeRun {
  /** [m] */
  lengthM: number
  /** [m] inner diameter */
  innerDiameterM: number
  holds: 'liquid' | 'vapour'
  /** [°C] saturation temperature of what stands in it */
  celsius: number
}

export type Estimate = { ok: true; kg: number; runsKg: number[] } | { ok: false; code: 'outside-table' | 'no-table'; run: number }

/**
 * The mass in pipes, by volume times density, and in components by their own figures. An estimate: it is never
 * the full charge without a person's decision.
 *
 * @param componentsKg  [kg] of each component, from its maker
 * @returns [kg] in all, and of each run in the given order
 * @throws RangeError if a length, diameter or mass is below zero
 */
export function estimateCharge(refrigerant: string, runs: readonly PipeRun[], componentsKg: readonly number[]): Estimate {
  if (componentsKg.some((mass) => !(mass >= 0))) throw new RangeError('The mass of a component is not below zero.')
  const runsKg: number[] = []
  for (const [run, { lengthM, innerDiameterM, holds, celsius }] of runs.entries()) {
    if (!(lengthM >= 0) || !(innerDiameterM >= 0)) throw new RangeError('A length and a diameter are not below zero.')
    const density = saturationAt(refrigerant, holds === 'liquid' ? 'liquidDensity' : 'vapourDensity', celsius)
    if (!density.ok) return { ok: false, code: density.code, run }
    runsKg.push(Math.PI * (innerDiameterM / 2) ** 2 * lengthM * density.value)
  }
  const kg = [...runsKg, ...componentsKg].reduce((sum, mass) => sum + mass, 0)
  return { ok: true, kg, runsKg }
}
