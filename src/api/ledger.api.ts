import type { WireCylinder, WirePartner } from '../../shared/api/cylinders'
import type { PostingDraft, WirePosting } from '../../shared/api/ledger'
import type { ListQuery, Page } from '../../shared/api/page'
import { addressOf, get, post } from './client'

export type PostingFilter = 'circuitId' | 'cylinderId' | 'siteId' | 'visitId' | 'kind' | 'from' | 'to'

export const listPostings = (query: ListQuery & Partial<Record<PostingFilter, string>>, signal?: AbortSignal): Promise<Page<WirePosting>> =>
  get<Page<WirePosting>>('/api/postings', { query: { ...query }, signal })
export const getPosting = (id: string): Promise<WirePosting> => get<WirePosting>(`/api/postings/${encodeURIComponent(id)}`)
/** Sent under its own id, so that the same draft sent again is posted once. */
export const postPosting = (draft: PostingDraft): Promise<WirePosting> => post<WirePosting>('/api/postings', { body: draft, idempotencyKey: draft.id })

/** The cylinders that may be put on the scale; `holderId: 'me'` for one's own. */
export const listCylindersInUse = (query: ListQuery & { holderId?: string; refrigerant?: string }): Promise<Page<WireCylinder>> =>
  get<Page<WireCylinder>>('/api/cylinders', { query: { ...query, status: 'in-use' } })
export const getCylinderToWeigh = (id: string): Promise<WireCylinder> => get<WireCylinder>(`/api/cylinders/${encodeURIComponent(id)}`)
/** Suppliers, reclaimers and destroyers to post against. */
export const listPartnersToPost = (query: ListQuery): Promise<Page<WirePartner>> => get<Page<WirePartner>>('/api/partners', { query: { ...query } })

/** Where the service record of a visit, or of one posting without a visit, is opened. */
export const serviceRecordAddress = (of: { visitId: string } | { postingId: string }): string => addressOf('/api/papers/service-record.pdf', { ...of })
/** Where all entries of a period are downloaded as CSV. */
export const entriesAddress = (period: { from?: string; to?: string }): string => addressOf('/api/papers/entries.csv', { ...period })
