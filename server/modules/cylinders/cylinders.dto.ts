import { CYLINDER_CONTENTS, CYLINDER_KINDS, CYLINDER_STATUSES, type CylinderDraft } from '../../../shared/api/cylinders'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { REFRIGERANTS } from '../../../shared/refrigerants/catalogue'
import { DateText, Id, Kg, ListDto, Maybe, OneOf, OrNull, PositiveKg, Text } from '../../fields'

const REFRIGERANT_IDS = REFRIGERANTS.map(({ id }) => id)

export class CylinderDraftDto implements CylinderDraft {
  @Text(1, 40) number: string
  @OneOf(CYLINDER_KINDS) kind: CylinderDraft['kind']
  @OneOf(REFRIGERANT_IDS) refrigerant: string
  @OneOf(CYLINDER_CONTENTS) contents: CylinderDraft['contents']
  @Kg() tareKg: string
  @OrNull() @PositiveKg() waterCapacityKg: string | null
  @OrNull() @DateText() testDueOn: PlainDate | null
  @OneOf(CYLINDER_STATUSES) status: CylinderDraft['status']
  @OrNull() @Id() holderId: string | null
  @OrNull() @Text(1, 120) place: string | null
  @OrNull() @Id() ownerCustomerId: string | null
}

export class CylindersQuery extends ListDto {
  @Maybe() @Text(1, 40) holderId?: string
  @Maybe() @OneOf(REFRIGERANT_IDS) refrigerant?: string
  @Maybe() @OneOf(CYLINDER_STATUSES) status?: CylinderDraft['status']
}
