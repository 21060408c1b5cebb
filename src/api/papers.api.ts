import type { PlainDate } from '../../shared/dates/plain-date'
import { addressOf } from './client'

/** Where papers and exports are opened; the browser fetches them with the person's own session. */
export const leakRateSummaryAddress = (siteId: string, from: PlainDate, to: PlainDate): string => addressOf('/api/papers/leak-rate-summary.pdf', { siteId, from, to })
export const serviceRecordAddress = (visitId: string): string => addressOf('/api/papers/service-record.pdf', { visitId })
export const cylinderLedgerAddress = (year: number): string => addressOf('/api/papers/cylinder-ledger.csv', { year })
export const entriesAddress = (from: PlainDate, to: PlainDate): string => addressOf('/api/papers/entries.csv', { from, to })
