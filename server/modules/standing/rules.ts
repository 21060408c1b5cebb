import type { WirePackDecision } from '../../../shared/api/places'
import type { PlainDate } from '../../../shared/dates/plain-date'
import { toKgText, type Mass } from '../../../shared/mass/mass'
import { factsOf } from '../../../shared/rules/circuit-facts'
import { packsFor, thresholdsFor, type CircuitFacts, type Threshold } from '../../../shared/rules/engine'
import { PACKS } from '../../../shared/rules/packs'
import type { CircuitRecord } from './history.repository'

const circuitFacts = (record: CircuitRecord, fullChargeKg: Mass | null): CircuitFacts =>
  factsOf({ packIds: record.rule_packs, refrigerant: record.refrigerant, category: record.category, fullChargeKg, subsectorDecision: record.subsector_decision })

/** The thresholds in force for a circuit on a day. */
export const thresholdsOn = (record: CircuitRecord, fullChargeKg: Mass | null, on: PlainDate): Threshold[] =>
  thresholdsFor(circuitFacts(record, fullChargeKg), PACKS, on)

/** Which packs apply to a circuit and why, as it goes over the wire. */
export const decisionsFor = (record: CircuitRecord, fullChargeKg: Mass | null, on: PlainDate): WirePackDecision[] =>
  packsFor(circuitFacts(record, fullChargeKg), PACKS, on).map(({ packId, applies, reasons }) => ({
    packId, applies,
    reasons: reasons.map(({ code, params, chargeKg }) => ({ code, params: chargeKg ? { ...params, chargeKg: toKgText(chargeKg) } : params })),
  }))
