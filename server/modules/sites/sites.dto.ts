import { JURISDICTIONS, LEAK_RATE_METHODS, type LeakRateMethod, type SiteDraft } from '../../../shared/api/places'
import { PACK_IDS } from '../../../shared/rules/packs'
import { Country, Id, ListDto, ListOf, Maybe, OneOf, OrNull, Text, TimeZone, Whole } from '../../fields'

const LOWEST_PLACE = -500 // [m] below the shore of the Dead Sea
const HIGHEST_PLACE = 6000 // [m] above every town

export class SiteDraftDto implements SiteDraft {
  @Id() customerId: string
  @Text(1, 120) name: string
  @Text(1, 200) street: string
  @Text(1, 100) city: string
  @OrNull() @Text(1, 100) region: string | null
  @OrNull() @Text(1, 20) postalCode: string | null
  @Country() country: string
  @TimeZone() timeZone: string
  @Whole(LOWEST_PLACE, HIGHEST_PLACE) elevationM: number
  @OneOf(JURISDICTIONS) jurisdiction: SiteDraft['jurisdiction']
  @OneOf(LEAK_RATE_METHODS) leakRateMethod: LeakRateMethod
  @ListOf(PACK_IDS) rulePacks: string[]
}

export class SitesQuery extends ListDto {
  @Maybe() @Id() customerId?: string
}
