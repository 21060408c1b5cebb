import type { ListQuery, Page } from '../../shared/api/page'
import type {
  CircuitDraft, CircuitStanding, ComponentDraft, FullChargeDraft, LeakDraft, MarkDraft, RepairDraft, VerificationDraft, WireCircuit,
} from '../../shared/api/places'
import type { PlainDate } from '../../shared/dates/plain-date'
import { addressOf, get, patch, post } from './client'

export type CircuitFilter = 'siteId' | 'systemId' | 'customerId' | 'standing'

const pathOf = (id: string): string => `/api/circuits/${encodeURIComponent(id)}`

export const listCircuits = (query: ListQuery & Partial<Record<CircuitFilter, string>>, signal?: AbortSignal): Promise<Page<CircuitStanding>> =>
  get<Page<CircuitStanding>>('/api/circuits', { query: { ...query }, signal })
export const getCircuit = (id: string): Promise<WireCircuit> => get<WireCircuit>(pathOf(id))
export const createCircuit = (body: CircuitDraft): Promise<WireCircuit> => post<WireCircuit>('/api/circuits', { body })
export const changeCircuit = (id: string, version: number, body: Omit<CircuitDraft, 'fullCharge'>): Promise<WireCircuit> =>
  patch<WireCircuit>(pathOf(id), { body, version })

export const reviseFullCharge = (id: string, body: FullChargeDraft): Promise<WireCircuit> => post<WireCircuit>(`${pathOf(id)}/full-charges`, { body })
export const addComponent = (id: string, body: ComponentDraft): Promise<WireCircuit> => post<WireCircuit>(`${pathOf(id)}/components`, { body })
export const changeComponent = (componentId: string, body: ComponentDraft): Promise<WireCircuit> =>
  patch<WireCircuit>(`/api/components/${encodeURIComponent(componentId)}`, { body })
export const addMark = (id: string, body: MarkDraft): Promise<WireCircuit> => post<WireCircuit>(`${pathOf(id)}/marks`, { body })
export const resolveMark = (markId: string, resolvedOn: PlainDate): Promise<WireCircuit> =>
  post<WireCircuit>(`/api/marks/${encodeURIComponent(markId)}/resolve`, { body: { resolvedOn } })
export const addLeak = (id: string, body: LeakDraft): Promise<WireCircuit> => post<WireCircuit>(`${pathOf(id)}/leaks`, { body })
export const repairLeak = (leakId: string, body: RepairDraft): Promise<WireCircuit> => post<WireCircuit>(`/api/leaks/${encodeURIComponent(leakId)}/repair`, { body })
export const addVerification = (id: string, body: VerificationDraft): Promise<WireCircuit> => post<WireCircuit>(`${pathOf(id)}/verifications`, { body })

/** Where the leak-rate summary of a site for a period is opened. */
export const leakRateSummaryAddress = (siteId: string, from: PlainDate, to: PlainDate): string =>
  addressOf('/api/papers/leak-rate-summary.pdf', { siteId, from, to })
