import type { CustomerDraft } from '../../../shared/api/places'
import { Email, OrNull, Text } from '../../fields'

export class CustomerDraftDto implements CustomerDraft {
  @Text(1, 120) name: string
  @OrNull() @Text(1, 120) contactName: string | null
  @OrNull() @Email() email: string | null
  @OrNull() @Text(1, 40) phone: string | null
  @OrNull() @Text(1, 500) address: string | null
  @OrNull() @Text(1, 2000) note: string | null
}
