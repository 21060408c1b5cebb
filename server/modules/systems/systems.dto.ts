import type { SystemDraft } from '../../../shared/api/places'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { CATEGORIES, type Category } from '../../../shared/rules/categories'
import { DateText, Id, ListDto, Maybe, OneOf, OrNull, Text } from '../../fields'

export class SystemDraftDto implements SystemDraft {
  @Id() siteId: string
  @Text(1, 40) tag: string
  @Text(1, 120) name: string
  @OrNull() @Text(1, 200) location: string | null
  @OrNull() @Text(1, 100) maker: string | null
  @OrNull() @Text(1, 100) model: string | null
  @OrNull() @Text(1, 100) serial: string | null
  @OneOf(CATEGORIES) category: Category
  @OrNull() @DateText() installedOn: PlainDate | null
  @OrNull() @OneOf(['excepted', 'not-excepted']) subsectorDecision: SystemDraft['subsectorDecision']
  @OrNull() @Text(1, 120) subsectorDecidedBy: string | null
  @OrNull() @Text(1, 500) subsectorReason: string | null
}

export class SystemsQuery extends ListDto {
  @Maybe() @Id() siteId?: string
}
