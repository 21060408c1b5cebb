import { PARTNER_KINDS, type PartnerDraft } from '../../../shared/api/cylinders'
import { ListDto, Maybe, OneOf, OrNull, Text } from '../../fields'

export class PartnerDraftDto implements PartnerDraft {
  @Text(1, 120) name: string
  @OneOf(PARTNER_KINDS) kind: PartnerDraft['kind']
  @OrNull() @Text(1, 500) address: string | null
  @OrNull() @Text(1, 100) certificate: string | null
}

export class PartnersQuery extends ListDto {
  @Maybe() @OneOf(PARTNER_KINDS) kind?: PartnerDraft['kind']
}
