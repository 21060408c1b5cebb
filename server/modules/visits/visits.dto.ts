import type { CalculationDraft, VisitDraft } from '../../../shared/api/places'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { ArrayMaxSize, IsArray, ValidateNested } from 'class-validator'
import { Type } from 'class-transformer'
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

const MOST_LINES = 60 // of one result; the longest calculator has far fewer

export class CalculationLineDto {
  @Text(1, 200) label: string
  @Text(1, 200) value: string
}

export class CalculationDto implements CalculationDraft {
  @IdV7() id: string
  @Text(1, 40) calculator: string
  @Text(1, 120) title: string
  @IsArray() @ArrayMaxSize(MOST_LINES) @ValidateNested({ each: true }) @Type(() => CalculationLineDto) lines: CalculationLineDto[]
}
