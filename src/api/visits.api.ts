import type { ListQuery, Page } from '../../shared/api/page'
import type { CalculationDraft, VisitDraft, WireVisit } from '../../shared/api/places'
import { get, post } from './client'

export const listVisits = (query: ListQuery & { siteId?: string; circuitId?: string }): Promise<Page<WireVisit>> =>
  get<Page<WireVisit>>('/api/visits', { query: { ...query } })
/** The same id again changes nothing. */
export const createVisit = (body: VisitDraft): Promise<WireVisit> => post<WireVisit>('/api/visits', { body })
/** Puts the result of a calculator into a visit; the same id again changes nothing. */
export const attachCalculation = (visitId: string, body: CalculationDraft): Promise<WireVisit> =>
  post<WireVisit>(`/api/visits/${encodeURIComponent(visitId)}/calculations`, { body })
