import type { ListQuery, Page } from '../../shared/api/page'
import type { CustomerDraft, WireCustomer } from '../../shared/api/places'
import { get, patch, post } from './client'

const pathOf = (id: string): string => `/api/customers/${encodeURIComponent(id)}`

export const listCustomers = (query: ListQuery, signal?: AbortSignal): Promise<Page<WireCustomer>> => get('/api/customers', { query: { ...query }, signal })
export const getCustomer = (id: string): Promise<WireCustomer> => get(pathOf(id))
export const createCustomer = (body: CustomerDraft): Promise<WireCustomer> => post('/api/customers', { body })
export const changeCustomer = (id: string, version: number, body: CustomerDraft): Promise<WireCustomer> => patch(pathOf(id), { body, version })
