import { ROLES, type Role } from '../../../shared/access/roles'
import { CERTIFICATE_TYPES, type PersonDraft } from '../../../shared/api/people'
import { Email, Ids, ListDto, Maybe, OneOf, OrNull, Text } from '../../fields'

const MOST_CUSTOMERS = 200 // of one owner's account

export class PersonDraftDto implements PersonDraft {
  @Text(1, 120) name: string
  @Email() email: string
  @OneOf(ROLES) role: Role
  @OrNull() @Text(1, 60) certificateNumber: string | null
  @OrNull() @OneOf(CERTIFICATE_TYPES) certificateType: PersonDraft['certificateType']
  @Ids(MOST_CUSTOMERS) customerIds: string[]
}

export class PeopleQuery extends ListDto {
  @Maybe() @OneOf(ROLES) role?: Role
}
