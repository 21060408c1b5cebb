import { v7 as uuid } from 'uuid'
import type { PostingDraft } from '../../shared/api/ledger'
import { plainDate } from '../../shared/dates/plain-date'
import { lb, toKgText } from '../../shared/mass/mass'

/** A draft of a posting in pounds; everything that is not given is what a plain one has. */
export function aDraft(given: Partial<Omit<PostingDraft, 'massKg' | 'occurredOn'>> & Pick<PostingDraft, 'kind'> & { pounds?: string; massKg?: string; on?: string }): PostingDraft {
  const { pounds, massKg, on = '2026-11-20', ...rest } = given
  return {
    id: uuid(), occurredOn: plainDate(on), occurredAt: `${on}T18:00:00.000Z`, refrigerant: 'R-22', massKg: massKg ?? toKgText(lb(pounds ?? '1')), entered: null,
    cylinderId: null, toCylinderId: null, circuitId: null, partnerId: null, visitId: null, leakId: null, purpose: null, isComplete: true,
    part: null, workDone: null, note: null, reversesId: null, reason: null, ...rest,
  }
}
