import { Email, Maybe, Nested, OneOf, OrNull, Text } from '../../fields'
import { IsString, MaxLength } from 'class-validator'
import { MASS_UNITS, type MassUnit } from '../../../shared/api/ledger'
import { CERTIFICATE_TYPES, PRESSURE_UNITS, TEMPERATURE_UNITS, THEMES, type Preferences, type SignIn, type Theme } from '../../../shared/api/people'

const MOST_PASSWORD = 300 // [characters] read at all; what is too long is then refused with a sentence

/** A password as typed: neither trimmed nor changed. */
const Password = (): PropertyDecorator => (target, property) => {
  IsString({ message: '{"key":"textNeeded","params":{"least":1,"most":300}}' })(target, property)
  MaxLength(MOST_PASSWORD, { message: '{"key":"passwordLong","params":{"most":72}}' })(target, property)
}

export class SignInDto implements SignIn {
  @Email() email: string
  @Password() password: string
}
export class ForgotDto {
  @Email() email: string
}
export class ResetDto {
  @Text(1, 300) token: string
  @Password() password: string
}
export class TokenParams {
  @Text(1, 300) token: string
}
export class AcceptDto {
  @Text(1, 120) name: string
  @Password() password: string
}
export class PasswordDto {
  @Password() current: string
  @Password() next: string
}
/** What is given changes; the rest stays. */
export class PreferencesDto implements Partial<Preferences> {
  @Maybe() @OneOf(MASS_UNITS) massUnit?: MassUnit
  @Maybe() @OneOf(PRESSURE_UNITS) pressureUnit?: Preferences['pressureUnit']
  @Maybe() @OneOf(TEMPERATURE_UNITS) temperatureUnit?: Preferences['temperatureUnit']
  @Maybe() @OneOf(THEMES) theme?: Theme
  @Maybe() @OneOf(['en']) locale?: string
}
export class MeDto {
  @Maybe() @Text(1, 120) name?: string
  @Maybe() @Nested(() => PreferencesDto) preferences?: PreferencesDto
  @Maybe() @OrNull() @Text(1, 60) certificateNumber?: string | null
  @Maybe() @OrNull() @OneOf(CERTIFICATE_TYPES) certificateType?: string | null
}
