import type { WireCircuit } from '../../../shared/api/places'
import { localDateOf } from '../../../shared/dates/plain-date'
import type { PlainDate } from '../../../shared/dates/plain-date'

/** The date at the circuit's site now. */
export const siteToday = ({ siteTimeZone }: Pick<WireCircuit, 'siteTimeZone'>): PlainDate => localDateOf(new Date().toISOString(), siteTimeZone)
