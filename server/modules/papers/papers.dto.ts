import type { PlainDate } from '../../../shared/dates/plain-date'
import { DateText, Id, Maybe, WholeText } from '../../fields'

const [FIRST_YEAR, LAST_YEAR] = [1990, 2200]

/** A site and a period; without one, the twelve months up to today. */
export class LeakRateSummaryQuery {
  @Id() siteId: string
  @Maybe() @DateText() from?: PlainDate
  @Maybe() @DateText() to?: PlainDate
}

/** Either a whole visit or one posting. */
export class ServiceRecordQuery {
  @Maybe() @Id() visitId?: string
  @Maybe() @Id() postingId?: string
}

export class YearQuery {
  @WholeText(FIRST_YEAR, LAST_YEAR) year: number
}

export class PeriodQuery {
  @Maybe() @DateText() from?: PlainDate
  @Maybe() @DateText() to?: PlainDate
}
