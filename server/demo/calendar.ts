import { addDays, daysBetween, plainDate, type PlainDate } from '../../shared/dates/plain-date'

const SOME_MONDAY = plainDate('2024-01-01')
const FRIDAY = 4 // days after Monday

/** The days of the demo, counted back from the day of loading. */
export class Calendar {
  constructor(readonly today: PlainDate) {}

  /** The day so long ago, or the Friday before it where it falls on a weekend. Never later than the day asked for. */
  workday(daysAgo: number): PlainDate {
    const day = addDays(this.today, -daysAgo)
    const afterMonday = ((daysBetween(SOME_MONDAY, day) % 7) + 7) % 7
    return addDays(day, Math.min(0, FRIDAY - afterMonday))
  }
}
