import type { PlainDate } from './plain-date'

const formats = new Map<string, Intl.DateTimeFormat>()

/**
 * The instant at which a clock at a site shows a date and time. An hour that the clock shows twice is taken
 * the first time; one that it leaves out is taken as much later as the clock jumped.
 *
 * @param time  "HH:MM", 24 hours
 * @param timeZone  IANA zone name such as "America/Chicago"
 * @returns ISO 8601 instant in UTC
 * @throws RangeError if the time cannot be read or the zone is unknown
 */
export function instantOfLocal({ date, time, timeZone }: { date: PlainDate; time: string; timeZone: string }): string {
  if (!/^([01]\d|2[0-3]):[0-5]\d$/.test(time)) throw new RangeError(`"${time}" is not a time such as 14:05.`)
  const wall = Date.parse(`${date}T${time}:00Z`)
  // The clock's offset a day before and a day after: one of them holds, or both do in the hour shown twice.
  const before = offsetMs(wall - DAY_MS, timeZone)
  const after = offsetMs(wall + DAY_MS, timeZone)
  const fitting = [wall - before, wall - after].filter((instant) => instant + offsetMs(instant, timeZone) === wall)
  return new Date(fitting.length > 0 ? Math.min(...fitting) : wall - before).toISOString()
}

/**
 * What a clock at a site shows at an instant. @returns "HH:MM", 24 hours
 *
 * @param instant  ISO 8601 instant with Z or an offset
 * @throws RangeError if the instant cannot be read or the zone is unknown
 */
export function localTimeOf(instant: string, timeZone: string): string {
  const at = Date.parse(instant)
  return new Date(at + offsetMs(at, timeZone)).toISOString().slice(11, 16)
}

const DAY_MS = 86_400_000 // [ms]

/** @returns [ms] by which a clock in the zone is ahead of UTC at an instant */
function offsetMs(instant: number, timeZone: string): number {
  let format = formats.get(timeZone)
  if (!format) {
    format = new Intl.DateTimeFormat('en-US', {
      timeZone, hourCycle: 'h23', year: 'numeric', month: '2-digit', day: '2-digit', hour: '2-digit', minute: '2-digit', second: '2-digit',
    })
    formats.set(timeZone, format)
  }
  const parts = format.formatToParts(new Date(instant))
  const part = (type: Intl.DateTimeFormatPartTypes) => parts.find((each) => each.type === type)?.value ?? ''
  const year = part('year').padStart(4, '0')
  const wall = Date.parse(`${year}-${part('month')}-${part('day')}T${part('hour')}:${part('minute')}:${part('second')}Z`)
  return wall - Math.floor(instant / 1000) * 1000
}
