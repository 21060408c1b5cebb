import { computed, inject } from 'vue'
import { useI18n } from 'vue-i18n'
import type { MassUnit } from '../../shared/api/ledger'
import type { PlainDate } from '../../shared/dates/plain-date'
import { kg } from '../../shared/mass/mass'
import type { Mass } from '../../shared/mass/mass'
import { massIn, parseMass } from '../../shared/units/mass-units'
import type { Reading } from '../../shared/units/mass-units'
import { PREFERENCES } from './preferences'

/** Digits after the point that a mass is shown with; the exact value stays behind it. */
const SHOWN_DIGITS: Record<MassUnit, number> = { lb: 2, 'lb-oz': 1, oz: 1, kg: 3, g: 0 }

interface MassOptions {
  unit?: MassUnit
  digits?: number
}

/** Masses, percentages, dates and instants as this person likes to read and write them. */
export function useUnits() {
  const { t } = useI18n()
  const preferences = inject(PREFERENCES, null)
  const massUnit = computed<MassUnit>(() => preferences?.value.massUnit ?? 'lb')
  const locale = computed(() => preferences?.value.locale ?? 'en')

  const numberText = (value: string | number, digits: number, leastDigits = digits): string =>
    new Intl.NumberFormat(locale.value, { minimumFractionDigits: leastDigits, maximumFractionDigits: digits }).format(Number(value))

  /** Number and unit apart, so that they can stand in columns; lb-oz is "12 lb 4.5" and "oz". */
  function massParts(mass: Mass | string, { unit = massUnit.value, digits = SHOWN_DIGITS[unit] }: MassOptions = {}): { figures: string; unit: string } {
    const exact = typeof mass === 'string' ? kg(mass) : mass
    const parts = massIn(exact, unit, digits)
    if (parts.unit !== 'lb-oz') return { figures: withMinus(numberText(parts.value, digits)), unit: t(`units.${parts.unit}`) }
    const pounds = `${parts.isNegative ? '−' : ''}${numberText(parts.pounds, 0)}`
    return { figures: `${pounds}\u00a0${t('units.lb')}\u00a0${numberText(parts.ounces, digits)}`, unit: t('units.oz') }
  }

  /** "12.50 lb" in the person's unit, rounded for the eye only. */
  function formatMass(mass: Mass | string, options: MassOptions = {}): string {
    const { figures, unit } = massParts(mass, options)
    return `${figures}\u00a0${unit}`
  }

  /** @param percent [%] decimal text */
  const formatPercent = (percent: string, digits = 1): string => `${numberText(percent, digits, Math.min(digits, 1))}\u00a0%`

  const formatDate = (date: PlainDate, style: 'medium' | 'long' | 'short' = 'medium'): string =>
    new Intl.DateTimeFormat(locale.value, { dateStyle: style, timeZone: 'UTC' }).format(new Date(`${date}T00:00:00Z`))

  /** An instant, in the person's zone or in the zone given, which is then named. */
  const formatInstant = (instant: string | Date, timeZone?: string): string =>
    new Intl.DateTimeFormat(locale.value, timeZone
      ? { year: 'numeric', month: 'short', day: 'numeric', hour: 'numeric', minute: '2-digit', timeZone, timeZoneName: 'short' }
      : { dateStyle: 'medium', timeStyle: 'short' }).format(new Date(instant))

  const formatTime = (instant: Date): string => new Intl.DateTimeFormat(locale.value, { timeStyle: 'short' }).format(instant)

  /** What was typed, in the unit it was typed in. */
  const readMass = (text: string, unit: MassUnit = massUnit.value): Reading => parseMass(text, unit)

  return { massUnit, locale, numberText, massParts, formatMass, formatPercent, formatDate, formatInstant, formatTime, readMass }
}

const withMinus = (figures: string): string => figures.replace('-', '−')
