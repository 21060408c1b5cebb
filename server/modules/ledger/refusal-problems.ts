import { LB_KG, type Mass } from '../../../shared/mass/mass'
import type { Refusal } from '../../../shared/mass/refusals'
import { Problem } from '../../problem'
import { say } from '../../language'
import type { StatesRow } from './ledger.repository'

/** "12.50 lb (5.67 kg)": both, since the server does not know in which unit the scale is read. */
export function massText(mass: Mass, locale: string): string {
  const format = new Intl.NumberFormat(locale, { minimumFractionDigits: 2, maximumFractionDigits: 2 })
  const shown = (value: string): string => format.format(value as `${number}`) // Intl reads exact text, TypeScript wants it spelled as a number
  return say(locale, 'units.poundsAndKilograms', {
    pounds: shown(mass.dividedBy(LB_KG).toFixed(6)), kilograms: shown(mass.toFixed(6)),
  })
}

/** A refusal of the trade as the problem that goes out, with the numbers and names its sentence needs. */
export function problemOfRefusal(refusal: Refusal, row: StatesRow, locale: string): Problem {
  const cylinder = 'cylinderId' in refusal
    ? (refusal.cylinderId === row.to_cylinder_id ? row.to_cylinder_number : row.cylinder_number)
    : null
  const mass = (value: Mass): string => massText(value, locale)
  switch (refusal.code) {
    case 'wrong-refrigerant': {
      const number = refusal.where === 'to-cylinder' ? row.to_cylinder_number : row.cylinder_number
      return new Problem(refusal.code, {
        holds: refusal.holds, offered: refusal.offered,
        where: say(locale, refusal.where === 'circuit' ? 'problems.whereCircuit' : 'problems.whereCylinder', { number }),
      })
    }
    case 'test-date-passed': return new Problem(refusal.code, { cylinder, testDueOn: refusal.testDueOn })
    case 'fill-limit-exceeded': return new Problem(refusal.code, { cylinder, room: mass(refusal.roomKg), limit: mass(refusal.limitKg) })
    case 'cylinder-negative': return new Problem(refusal.code, { cylinder, content: mass(refusal.contentKg) })
    case 'circuit-negative': return new Problem(refusal.code, { content: mass(refusal.bookKg) })
    case 'date-in-future': return new Problem(refusal.code, { today: refusal.today })
    case 'disposable-not-refillable': case 'mixed-not-chargeable': case 'recovered-of-another-owner': case 'cylinder-out-of-use':
      return new Problem(refusal.code, { cylinder })
    case 'circuit-retired': case 'already-reversed': case 'reversal-of-reversal':
      return new Problem(refusal.code)
    default: return refusal satisfies never
  }
}
