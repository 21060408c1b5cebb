import {
  CIRCUIT_STATUSES, COMPONENT_KINDS, FINDING_METHODS, FULL_CHARGE_METHODS, LEAK_CAUSES, STANDINGS,
  type CircuitDraft, type CircuitStatus, type ComponentDraft, type FullChargeDraft, type LeakDraft, type MarkDraft, type RepairDraft, type Standing,
  type VerificationDraft,
} from '../../../shared/api/places'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { REFRIGERANTS } from '../../../shared/refrigerants/catalogue'
import { CATEGORIES, type Category } from '../../../shared/rules/categories'
import { DateText, Flag, Id, IdV7, ListDto, Maybe, Nested, OneOf, OrNull, PositiveKg, Text } from '../../fields'

const REFRIGERANT_IDS = REFRIGERANTS.map(({ id }) => id)

export class FullChargeDto implements FullChargeDraft {
  @OneOf(FULL_CHARGE_METHODS) method: FullChargeDraft['method']
  @OrNull() @PositiveKg() massKg: string | null
  @OrNull() @PositiveKg() rangeLowKg: string | null
  @OrNull() @PositiveKg() rangeHighKg: string | null
  @DateText() effectiveOn: PlainDate
  @OrNull() @Text(1, 500) note: string | null
}

export class CircuitChangeDto implements Omit<CircuitDraft, 'fullCharge'> {
  @Id() systemId: string
  @Text(1, 60) name: string
  @OneOf(REFRIGERANT_IDS) refrigerant: string
  @OneOf(CATEGORIES) category: Category
  @OneOf(CIRCUIT_STATUSES) status: CircuitStatus
  @OrNull() @DateText() commissionedOn: PlainDate | null
}

export class CircuitDraftDto extends CircuitChangeDto implements CircuitDraft {
  @OrNull() @Nested(() => FullChargeDto) fullCharge: FullChargeDto | null
}

export class CircuitsQuery extends ListDto {
  @Maybe() @Id() siteId?: string
  @Maybe() @Id() systemId?: string
  @Maybe() @Id() customerId?: string
  @Maybe() @OneOf(STANDINGS) standing?: Standing
}

export class ComponentDto implements ComponentDraft {
  @OneOf(COMPONENT_KINDS) kind: ComponentDraft['kind']
  @Text(1, 120) name: string
  @OrNull() @Text(1, 200) position: string | null
}

export class MarkDto implements MarkDraft {
  @OrNull() @Id() componentId: string | null
  @Text(1, 500) text: string
  @DateText() markedOn: PlainDate
}

export class ResolveDto {
  @DateText() resolvedOn: PlainDate
}

export class LeakDto implements LeakDraft {
  @IdV7() id: string
  @OrNull() @Id() componentId: string | null
  @DateText() foundOn: PlainDate
  @OneOf(LEAK_CAUSES) cause: LeakDraft['cause']
  @OneOf(FINDING_METHODS) method: LeakDraft['method']
  @OrNull() @Text(1, 200) position: string | null
  @OrNull() @Text(1, 2000) note: string | null
}

export class RepairDto implements RepairDraft {
  @DateText() repairedOn: PlainDate
  @Text(1, 2000) repair: string
}

export class VerificationDto implements VerificationDraft {
  @IdV7() id: string
  @OneOf(['initial', 'follow-up']) kind: VerificationDraft['kind']
  @OrNull() @Id() leakId: string | null
  @DateText() testedOn: PlainDate
  @Text(1, 200) type: string
  @Flag() passed: boolean
  @Flag() showsAllRepaired: boolean
  @OrNull() @Text(1, 2000) note: string | null
}
