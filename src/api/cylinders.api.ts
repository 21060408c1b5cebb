import type { CylinderDraft, WireCylinder } from '../../shared/api/cylinders'
import type { ListQuery, Page } from '../../shared/api/page'
import { get, patch, post } from './client'

export type CylinderFilter = 'holderId' | 'refrigerant' | 'status'
const pathOf = (id: string): string => `/api/cylinders/${encodeURIComponent(id)}`

export const listCylinders = (query: ListQuery & Partial<Record<CylinderFilter, string>>, signal?: AbortSignal): Promise<Page<WireCylinder>> =>
  get('/api/cylinders', { query: { ...query }, signal })
export const getCylinder = (id: string): Promise<WireCylinder> => get(pathOf(id))
export const createCylinder = (body: CylinderDraft): Promise<WireCylinder> => post('/api/cylinders', { body })
export const changeCylinder = (id: string, version: number, body: CylinderDraft): Promise<WireCylinder> => patch(pathOf(id), { body, version })
