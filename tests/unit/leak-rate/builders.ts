import { plainDate } from '../../../shared/dates/plain-date'
import type { Addition, CircuitHistory, FollowUpPassed, LeakRateEvent, Removal } from '../../../shared/leak-rate/history'
import type { RatedAddition } from '../../../shared/leak-rate/rated-additions'
import { lb, type Mass } from '../../../shared/mass/mass'

const at = (on: string, hour: number) => `${on}T${String(hour).padStart(2, '0')}:00:00.000Z`

/** An addition, at noon where no hour is given; its id tells day and hour. */
export function added(on: string, pounds: string, traits: Partial<Addition> & { hour?: number } = {}): Addition {
  const { hour = 12, ...rest } = traits
  return { kind: 'addition', postingId: `${on}/${hour}`, occurredOn: plainDate(on), occurredAt: at(on, hour), massKg: lb(pounds), leakId: null, purpose: 'leak', ...rest }
}

export function removed(on: string, pounds: string, traits: Partial<Removal> & { hour?: number } = {}): Removal {
  const { hour = 8, ...rest } = traits
  return { kind: 'removal', postingId: `${on}/${hour}`, occurredOn: plainDate(on), occurredAt: at(on, hour), massKg: lb(pounds), purpose: 'repair', ...rest }
}

export function followUp(on: string, hour: number | null = 16): FollowUpPassed {
  return { kind: 'follow-up-passed', occurredOn: plainDate(on), occurredAt: hour === null ? null : at(on, hour) }
}

/** A circuit of 100 lb by the annualizing method, without a commissioning date. */
export function aHistory(events: LeakRateEvent[], traits: Partial<CircuitHistory> & { fullLb?: string } = {}): CircuitHistory {
  const { fullLb = '100', ...rest } = traits
  return { method: 'annualizing', commissionedOn: null, fullCharges: [{ effectiveOn: plainDate('2015-01-01'), massKg: lb(fullLb) }], events, ...rest }
}

export const poundsOf = (mass: Mass): string => mass.dividedBy('0.45359237').toFixed()

/** What a table of expected rates compares: pounds and per cent as text, four digits at most. */
export function rowOf({ countedKg, addedKg, days, rate, exempt, basis }: RatedAddition) {
  return {
    counted: poundsOf(countedKg), added: poundsOf(addedKg), days, rate: rate && rate.toDecimalPlaces(4).toFixed(),
    exempt, basis,
  }
}
