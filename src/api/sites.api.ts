import type { ListQuery, Page } from '../../shared/api/page'
import type { SiteDraft, WireSite } from '../../shared/api/places'
import { get, patch, post } from './client'

export type SiteFilter = 'customerId'
const pathOf = (id: string): string => `/api/sites/${encodeURIComponent(id)}`

export const listSites = (query: ListQuery & Partial<Record<SiteFilter, string>>, signal?: AbortSignal): Promise<Page<WireSite>> =>
  get('/api/sites', { query: { ...query }, signal })
export const getSite = (id: string): Promise<WireSite> => get(pathOf(id))
export const createSite = (body: SiteDraft): Promise<WireSite> => post('/api/sites', { body })
export const changeSite = (id: string, version: number, body: SiteDraft): Promise<WireSite> => patch(pathOf(id), { body, version })
