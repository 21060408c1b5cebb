import type { PartnerDraft, WirePartner } from '../../shared/api/cylinders'
import type { ListQuery, Page } from '../../shared/api/page'
import { get, patch, post } from './client'

export type PartnerFilter = 'kind'
const pathOf = (id: string): string => `/api/partners/${encodeURIComponent(id)}`

export const listPartners = (query: ListQuery & Partial<Record<PartnerFilter, string>>, signal?: AbortSignal): Promise<Page<WirePartner>> =>
  get('/api/partners', { query: { ...query }, signal })
export const getPartner = (id: string): Promise<WirePartner> => get(pathOf(id))
export const createPartner = (body: PartnerDraft): Promise<WirePartner> => post('/api/partners', { body })
export const changePartner = (id: string, version: number, body: PartnerDraft): Promise<WirePartner> => patch(pathOf(id), { body, version })
