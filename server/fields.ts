import 'reflect-metadata'
import { Transform, Type } from 'class-transformer'
import {
  IsArray, IsBoolean, IsEmail, IsIn, IsInt, IsISO31661Alpha2, IsOptional, IsUUID, Length, Matches, Max, Min, ArrayMaxSize, ArrayUnique,
  ValidateBy, ValidateIf, ValidateNested, buildMessage,
} from 'class-validator'
import { isPlainDate, isTimeZone } from '../shared/dates/plain-date'
import { isPositive, isZero, kg, type Mass } from '../shared/mass/mass'

/**
 * Field decorators of our DTOs. Each carries the key of its sentence under `validation` in the
 * language file, with its numbers, so that a person reads it in their language.
 */
const sentence = (key: string, params: Record<string, unknown> = {}): { message: string } => ({ message: JSON.stringify({ key, params }) })

const compose = (...decorators: PropertyDecorator[]): PropertyDecorator => (target, property) => {
  for (const decorate of decorators) decorate(target, property)
}

const check = (name: string, key: string, passes: (value: unknown) => boolean): PropertyDecorator =>
  ValidateBy({ name, validator: { validate: passes, defaultMessage: buildMessage(() => sentence(key).message) } })

/** Text that PostgreSQL can store: no NUL, no lone surrogate. */
const isStorable = (value: unknown): boolean => typeof value === 'string' && !value.includes('\0') && value.isWellFormed()

const isLonger = (value: unknown, most: number): boolean => typeof value === 'string' && value.length > most

/** A line of text, trimmed. */
export const Text = (least: number, most: number): PropertyDecorator => compose(
  Transform(({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value)),
  Length(least, most, { message: ({ value }) => sentence(isLonger(value, most) ? 'textTooLong' : 'textNeeded', { least, most }).message }),
  check('storable', 'textUnreadable', isStorable),
)
/** Null or absent is allowed and means none; an empty text becomes null. */
export const OrNull = (): PropertyDecorator => compose(
  Transform(({ value }: { value: unknown }) => (value === undefined || value === '' ? null : value)),
  ValidateIf((_object, value) => value !== null && value !== undefined),
)
/** May be absent; then the handler sees undefined. */
export const Maybe = (): PropertyDecorator => IsOptional()
export const Id = (): PropertyDecorator => IsUUID('all', sentence('id'))
export const IdV7 = (): PropertyDecorator => IsUUID(7, sentence('idV7'))
export const Ids = (most: number): PropertyDecorator => compose(
  IsArray(sentence('list')), ArrayMaxSize(most, sentence('listTooLong', { most })), ArrayUnique(sentence('listRepeats')),
  IsUUID('all', { ...sentence('id'), each: true }),
)
export const OneOf = (values: readonly string[]): PropertyDecorator => IsIn([...values], sentence('oneOf', { values: values.join(', ') }))
export const ListOf = (values: readonly string[]): PropertyDecorator => compose(
  IsArray(sentence('list')), ArrayUnique(sentence('listRepeats')), IsIn([...values], { ...sentence('oneOf', { values: values.join(', ') }), each: true }),
)
export const Flag = (): PropertyDecorator => IsBoolean(sentence('flag'))
export const Whole = (least: number, most: number): PropertyDecorator => compose(
  IsInt(sentence('whole', { least, most })), Min(least, sentence('whole', { least, most })), Max(most, sentence('whole', { least, most })),
)
/** A whole number in an address. */
export const WholeText = (least: number, most: number): PropertyDecorator => compose(
  Transform(({ value }: { value: unknown }) => (typeof value === 'string' && /^\d{1,9}$/.test(value) ? Number(value) : value)),
  Whole(least, most),
)
export const Email = (): PropertyDecorator => compose(
  Transform(({ value }: { value: unknown }) => (typeof value === 'string' ? value.trim() : value)),
  IsEmail({}, sentence('email')), Length(3, 254, sentence('email')), check('storable', 'email', isStorable),
)
export const DateText = (): PropertyDecorator => check('plainDate', 'date', (value) => typeof value === 'string' && isPlainDate(value) && value >= '1900-01-01' && value <= '2200-12-31')
/** An instant, ISO 8601 with Z or offset. */
export const InstantText = (): PropertyDecorator => compose(
  Matches(/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d{1,6})?)?(Z|[+-]\d{2}:\d{2})$/, sentence('instant')),
  check('instantReal', 'instant', (value) => typeof value === 'string' && !Number.isNaN(Date.parse(value)) && value >= '1900' && value < '2201'),
)
export const TimeZone = (): PropertyDecorator => check('timeZone', 'timeZone', (value) => typeof value === 'string' && value.length < 64 && isTimeZone(value))
export const Country = (): PropertyDecorator => IsISO31661Alpha2(sentence('country'))

const readMass = (value: unknown): Mass | null => {
  if (typeof value !== 'string' || value.length > 40) return null
  try {
    return kg(value)
  } catch {
    return null
  }
}
const MOST_KG = kg('500000') // far above any circuit or cylinder; what is above is a slip of the finger
const inReach = (mass: Mass | null): boolean => mass !== null && mass.abs().lessThanOrEqualTo(MOST_KG)
/** [kg] exact decimal text above zero. */
export const PositiveKg = (): PropertyDecorator => check('positiveKg', 'massPositive', (value) => {
  const mass = readMass(value)
  return mass !== null && inReach(mass) && isPositive(mass)
})
/** [kg] exact decimal text, zero allowed. */
export const Kg = (): PropertyDecorator => check('kg', 'mass', (value) => {
  const mass = readMass(value)
  return mass !== null && inReach(mass) && (isPositive(mass) || isZero(mass))
})
/** [kg] exact decimal text other than zero, of either sign. */
export const SignedKg = (): PropertyDecorator => check('signedKg', 'massNotZero', (value) => {
  const mass = readMass(value)
  return mass !== null && inReach(mass) && !isZero(mass)
})
export const Nested = (make: () => new () => object): PropertyDecorator => compose(
  check('object', 'object', (value) => typeof value === 'object' && value !== null && !Array.isArray(value)),
  ValidateNested(), Type(make),
)

/** The part of a path that names a row. */
export class IdParams {
  @Id() id: string
}

/** What every list takes; lists with filters of their own extend it. */
export class ListDto {
  @Maybe() @Text(0, 100) search?: string
  @Maybe() @Matches(/^-?[a-z-]{1,30}$/i, sentence('sort')) sort?: string
  @Maybe() @Matches(/^[A-Za-z0-9_-]{1,600}$/, sentence('after')) after?: string
  @Maybe() @WholeText(1, 200) limit?: number
}
