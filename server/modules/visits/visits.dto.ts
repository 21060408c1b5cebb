import type { VisitDraft } from '../../../shared/api/places'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { DateText, Id, IdV7, ListDto, Maybe, OrNull, Text } from '../../fields'

export class VisitDto implements VisitDraft {
  @IdV7() id: string
  @Id() siteId: string
  @DateText() visitedOn: PlainDate
  @OrNull() @Text(1, 2000) remark: string | null
}

export class VisitsQuery extends ListDto {
  @Maybe() @Id() siteId?: string
  @Maybe() @Id() circuitId?: string
}
