import { describe, expect, it } from 'vitest'
import type { PostingDraft } from '../../../shared/api/ledger'
import { contentText } from '../../../shared/mass/content'
import { lb } from '../../../shared/mass/mass'
import { aDraft } from './builders'

const draft = aDraft('charge', lb('10'), { entered: { unit: 'lb', before: '32.5', after: '22.5', amount: null } })

describe('the text under the content hash', () => {
  it('is the same for the same content, however it is written', () => {
    const { id, kind, massKg, ...rest } = draft
    const otherHand: PostingDraft = {
      ...rest, occurredAt: '2026-06-15T15:00:00Z', entered: { amount: null, after: '22.5', before: '32.5', unit: 'lb' },
      massKg: `${massKg}00`, kind, id: id.toUpperCase(),
    }
    expect(contentText(otherHand)).toBe(contentText(draft))
  })
  it('takes 1.50 kg for 1.5 kg', () => {
    expect(contentText({ ...draft, massKg: '1.50' })).toBe(contentText({ ...draft, massKg: '1.5' }))
  })
  it('keeps the readings word for word', () => {
    const rounded = { ...draft, entered: { unit: 'lb' as const, before: '32.50', after: '22.5', amount: null } }
    expect(contentText(rounded)).not.toBe(contentText(draft))
  })
  it.each<Partial<PostingDraft>>([
    { id: '0197c0de-0000-7000-8000-000000000002' }, { kind: 'recovery' }, { refrigerant: 'R-22' }, { massKg: '1.51' }, { entered: null },
    { occurredAt: '2026-06-15T15:00:00.001Z' }, { cylinderId: 'b' }, { toCylinderId: 'b' }, { circuitId: 'b' }, { partnerId: 'b' },
    { visitId: 'b' }, { leakId: 'b' }, { purpose: 'leak' }, { isComplete: true }, { part: 'b' }, { workDone: 'b' }, { note: 'b' },
    { reversesId: 'b' }, { reason: 'b' },
  ])('changes with %o', (change) => {
    expect(contentText({ ...draft, ...change })).not.toBe(contentText(draft))
  })
  it('keeps apart what a lazy joining of fields would confuse', () => {
    expect(contentText({ ...draft, part: 'a', workDone: null })).not.toBe(contentText({ ...draft, part: null, workDone: 'a' }))
  })
})
