/** A reading after the pump was valved off. */
export interface VacuumReading {
  /** [min] since the valve was closed */
  minutes: number
  /** [µm Hg] */
  microns: number
}

export const PULL_BELOW_MICRONS = 500 // [µm Hg] common practice, no published source
export const PASS_BELOW_MICRONS = 1000 // [µm Hg] common practice, no published source
export const WATCH_MINUTES = 10 // [min] common practice, no published source

/** The share of the first half's rise that the second half may still show where a curve is called levelling. Our reading. */
const LEVELLING_SHARE = 0.5

export type VacuumVerdict = 'not-deep-enough' | 'too-short' | 'passes' | 'moisture' | 'leak'

/**
 * What the rise of pressure in a closed, evacuated circuit says. It passes when it stays under the limit after
 * the watch and levels; levelling higher is moisture boiling off; rising straight on is a leak.
 *
 * @param readings  the first at the closing of the valve, ascending in time; at least three
 * @param limit  the equipment maker's figures where there are some, which go first
 * @throws RangeError if the readings do not ascend or one is not above zero
 */
export function judgeVacuumDecay(readings: readonly VacuumReading[], limit: { pullBelow?: number; passBelow?: number; watchMinutes?: number } = {}): VacuumVerdict {
  const { pullBelow = PULL_BELOW_MICRONS, passBelow = PASS_BELOW_MICRONS, watchMinutes = WATCH_MINUTES } = limit
  readings.forEach((reading, index) => {
    const before = readings[index - 1]
    if (!(reading.microns > 0) || (before && !(before.minutes < reading.minutes))) throw new RangeError('Readings ascend in time and lie above zero.')
  })
  const [first] = readings
  const last = readings.at(-1)
  if (!first || !last || readings.length < 3 || last.minutes - first.minutes < watchMinutes) return 'too-short'
  if (first.microns >= pullBelow) return 'not-deep-enough'
  const isLevelling = levels(readings, first, last)
  if (last.microns < passBelow && isLevelling) return 'passes'
  return isLevelling ? 'moisture' : 'leak'
}

/** Whether the second half of the watch rises clearly less than the first. */
function levels(readings: readonly VacuumReading[], first: VacuumReading, last: VacuumReading): boolean {
  const half = (first.minutes + last.minutes) / 2
  const middle = readings.reduce((nearest, reading) => (Math.abs(reading.minutes - half) < Math.abs(nearest.minutes - half) ? reading : nearest), first)
  const [early, late] = [middle.microns - first.microns, last.microns - middle.microns]
  return late <= 0 || late <= early * LEVELLING_SHARE
}
