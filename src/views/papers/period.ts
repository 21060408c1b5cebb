import { addYears, localDateOf } from '../../../shared/dates/plain-date'
import type { PlainDate } from '../../../shared/dates/plain-date'

export interface Period { from: PlainDate | null; to: PlainDate | null }

/** The date where the person sits. */
export const todayHere = (): PlainDate => localDateOf(new Date().toISOString(), Intl.DateTimeFormat().resolvedOptions().timeZone)

/** The twelve months up to today. */
export const lastYear = (): Period => ({ from: addYears(todayHere(), -1), to: todayHere() })
