import { plainDate } from '../../dates/plain-date'

/** The day on which the values of the United States packs were last compared with their sources. */
export const CHECKED_ON = plainDate('2026-12-01')
