import type { LedgerCheck, WireTrailRow } from '../../shared/api/ledger-check'
import type { ListQuery, Page } from '../../shared/api/page'
import { get } from './client'

export type TrailFilter = 'subject' | 'subjectId'

export const checkLedger = (): Promise<LedgerCheck> => get('/api/ledger/check')
export const listTrail = (query: ListQuery & Partial<Record<TrailFilter, string>>, signal?: AbortSignal): Promise<Page<WireTrailRow>> => get('/api/trail', { query: { ...query }, signal })
