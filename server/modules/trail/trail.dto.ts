import { Id, ListDto, Maybe, Text } from '../../fields'

export class TrailQuery extends ListDto {
  @Maybe() @Text(1, 40) subject?: string
  @Maybe() @Id() subjectId?: string
}
