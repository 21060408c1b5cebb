import { Matches } from 'class-validator'
import {
  MASS_UNITS, POSTING_KINDS, POSTING_PURPOSES,
  type EnteredWeighing, type MassUnit, type PostingDraft, type PostingKind, type PostingPurpose,
} from '../../../shared/api/ledger'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { DateText, Flag, Id, IdV7, InstantText, ListDto, Maybe, Nested, OneOf, OrNull, SignedKg, Text } from '../../fields'

export class EnteredDto implements EnteredWeighing {
  @OneOf(MASS_UNITS) unit: MassUnit
  @OrNull() @Text(1, 40) before: string | null
  @OrNull() @Text(1, 40) after: string | null
  @OrNull() @Text(1, 40) amount: string | null
}

export class PostingDraftDto implements PostingDraft {
  @IdV7() id: string
  @OneOf(POSTING_KINDS) kind: PostingKind
  @DateText() occurredOn: PlainDate
  @InstantText() occurredAt: string
  @Matches(/^R-[0-9A-Za-z()]{1,15}$/, { message: '{"key":"refrigerant"}' }) refrigerant: string
  @SignedKg() massKg: string
  @OrNull() @Nested(() => EnteredDto) entered: EnteredDto | null
  @OrNull() @Id() cylinderId: string | null
  @OrNull() @Id() toCylinderId: string | null
  @OrNull() @Id() circuitId: string | null
  @OrNull() @Id() partnerId: string | null
  @OrNull() @Id() visitId: string | null
  @OrNull() @Id() leakId: string | null
  @OrNull() @OneOf(POSTING_PURPOSES) purpose: PostingPurpose | null
  @Flag() isComplete: boolean
  @OrNull() @Text(1, 200) part: string | null
  @OrNull() @Text(1, 2000) workDone: string | null
  @OrNull() @Text(1, 2000) note: string | null
  @OrNull() @Id() reversesId: string | null
  @OrNull() @Text(1, 500) reason: string | null
}

export class PostingsQuery extends ListDto {
  @Maybe() @Id() circuitId?: string
  @Maybe() @Id() cylinderId?: string
  @Maybe() @Id() siteId?: string
  @Maybe() @Id() visitId?: string
  @Maybe() @OneOf(POSTING_KINDS) kind?: PostingKind
  @Maybe() @DateText() from?: PlainDate
  @Maybe() @DateText() to?: PlainDate
}
