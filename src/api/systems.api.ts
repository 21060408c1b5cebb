import type { ListQuery, Page } from '../../shared/api/page'
import type { SystemDraft, WireSystem } from '../../shared/api/places'
import { get, patch, post } from './client'

const pathOf = (id: string): string => `/api/systems/${encodeURIComponent(id)}`

export const listSystems = (query: ListQuery & { siteId?: string }, signal?: AbortSignal): Promise<Page<WireSystem>> => get('/api/systems', { query: { ...query }, signal })
export const getSystem = (id: string): Promise<WireSystem> => get(pathOf(id))
export const createSystem = (body: SystemDraft): Promise<WireSystem> => post('/api/systems', { body })
export const changeSystem = (id: string, version: number, body: SystemDraft): Promise<WireSystem> => patch(pathOf(id), { body, version })
