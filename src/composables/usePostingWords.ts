import { useI18n } from 'vue-i18n'
import type { EnteredWeighing, WirePosting } from '../../shared/api/ledger'
import type { PostingWarning } from '../../shared/mass/warnings'
import type { Refusal } from '../../shared/mass/refusals'
import { useUnits } from './useUnits'

interface Names {
  cylinder?: string | null
  toCylinder?: string | null
  toCylinderId?: string | null
}

type Move = Pick<WirePosting, 'kind' | 'circuitName' | 'siteName' | 'cylinderNumber' | 'toCylinderNumber' | 'partnerName'>

/** Refusals, warnings, moves and readings of a posting as sentences, with masses in the person's unit. */
export function usePostingWords() {
  const { t } = useI18n()
  const { formatMass, formatDate } = useUnits()

  /** The same words as the server's problem of that code. */
  function refusalWords(refusal: Refusal, { cylinder, toCylinder, toCylinderId }: Names): { title: string; detail: string } {
    const isTo = 'cylinderId' in refusal && toCylinderId !== undefined && refusal.cylinderId === toCylinderId
    const params: Record<string, string> = { cylinder: (isTo ? toCylinder : cylinder) ?? '' }
    switch (refusal.code) {
      case 'wrong-refrigerant':
        Object.assign(params, {
          holds: refusal.holds, offered: refusal.offered,
          where: refusal.where === 'circuit' ? t('problems.whereCircuit') : t('problems.whereCylinder', { number: (refusal.where === 'to-cylinder' ? toCylinder : cylinder) ?? '' }),
        })
        break
      case 'test-date-passed':
        params.testDueOn = formatDate(refusal.testDueOn)
        break
      case 'fill-limit-exceeded':
        Object.assign(params, { limit: formatMass(refusal.limitKg), room: formatMass(refusal.roomKg) })
        break
      case 'cylinder-negative':
        params.content = formatMass(refusal.contentKg)
        break
      case 'circuit-negative':
        params.content = formatMass(refusal.bookKg)
        break
    }
    return { title: t(`problems.${refusal.code}.title`), detail: t(`problems.${refusal.code}.detail`, params) }
  }

  function warningWords(warning: PostingWarning): string {
    const key = `weighIn.warnings.${warning.code}`
    switch (warning.code) {
      case 'above-full-charge': return t(key, { over: formatMass(warning.overKg), full: formatMass(warning.fullChargeKg) })
      case 'more-than-booked': return t(key, { excess: formatMass(warning.excessKg), book: formatMass(warning.bookKg) })
      case 'circuit-below-zero': return t(key, { book: formatMass(warning.bookKg) })
      case 'contents-change': return t(key, { from: t(`kinds.contents.${warning.from}`), to: t(`kinds.contents.${warning.to}`) })
      case 'date-long-past': return t(key, { days: warning.days })
      case 'full-charge-unknown': case 'circuit-mothballed': return t(key)
      default: return warning satisfies never
    }
  }

  /** The readings as they were typed, with their unit. */
  function enteredWords(entered: EnteredWeighing | null): string[] {
    if (!entered) return []
    const value = (text: string): string => (entered.unit === 'lb-oz' ? text.replace('-', ` ${t('units.lb')} `) + ` ${t('units.oz')}` : `${text} ${t(`units.${entered.unit}`)}`)
    return [
      entered.before && t('posting.page.before', { value: value(entered.before) }),
      entered.after && t('posting.page.after', { value: value(entered.after) }),
      entered.amount && t('posting.page.amount', { value: value(entered.amount) }),
    ].filter((words): words is string => Boolean(words))
  }

  /** From where to where, by the names a person knows. */
  function moveWords({ kind, circuitName, siteName, cylinderNumber, toCylinderNumber, partnerName }: Move): string {
    const circuit = circuitName && [circuitName, siteName].filter(Boolean).join(', ')
    const [from, to] = ((): [string | null, string | null] => {
      switch (kind) {
        case 'charge': return [cylinderNumber, circuit]
        case 'recovery': return [circuit, cylinderNumber]
        case 'transfer': return [cylinderNumber, toCylinderNumber]
        case 'purchase': case 'receipt': return [partnerName, cylinderNumber]
        case 'return': case 'reclaim': case 'destruction': return [cylinderNumber, partnerName]
        default: return [circuit ?? cylinderNumber, null]
      }
    })()
    return from && to ? t('posting.list.move', { from, to }) : from ?? to ?? ''
  }

  return { refusalWords, warningWords, enteredWords, moveWords }
}
