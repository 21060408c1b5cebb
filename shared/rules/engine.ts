import { addDays, addMonths, addYears, plainDate, yearOf, type PlainDate } from '../dates/plain-date'
import { isAbove, type Percent } from '../leak-rate/percent'
import { lessThan, type Mass } from '../mass/mass'
import { Exact } from '../units/decimal'
import type { Category } from './categories'
import { valueOn, valueOnOrNone, type Source } from './dated'
import type { Due, DutyRule, DutyTrigger, RulePack } from './pack'

/** What the rules need to know of a circuit, which is what the law calls the appliance. */
export interface CircuitFacts {
  /** Ids of the packs that the site has switched on. */
  packIds: readonly string[]
  refrigerant: { isOzoneDepleting: boolean; containsHfc: boolean; gwp: string | null }
  category: Category
  /** [kg] null while nobody has determined it */
  fullChargeKg: Mass | null
  /** Whether the owner counts the unit to the excepted residential and light commercial subsector; null: not decided. */
  subsectorDecision: 'excepted' | 'not-excepted' | null
}

export const REASON_CODES = [
  'switched-off', 'not-in-force', 'no-longer-in-force', 'not-ozone-depleting', 'ozone-depleting', 'no-hfc-and-low-gwp', 'contains-hfc', 'substitute-above-gwp',
  'gwp-unknown', 'charge-unknown', 'charge-below', 'charge-reached', 'subsector-excepted', 'subsector-undecided', 'subsector-not-excepted',
] as const
/** Why a pack applies or not; a code under `rules.reasons` in the language file, with what its sentence needs. */
export interface Reason {
  code: (typeof REASON_CODES)[number]
  params: Record<string, string>
  /** [kg] the charge that the sentence names, if it does; formatted where it is shown */
  chargeKg: Mass | null
}
export interface PackDecision {
  packId: string
  applies: 'yes' | 'no' | 'undecided'
  reasons: Reason[]
}

const reason = (code: Reason['code'], params: Record<string, string> = {}, chargeKg: Mass | null = null): Reason => ({ code, params, chargeKg })

/** Which packs apply to a circuit on a day, and why; every pack is answered for. */
export const packsFor = (circuit: CircuitFacts, packs: readonly RulePack[], on: PlainDate): PackDecision[] =>
  packs.map((pack) => decide(circuit, pack, on))

function decide(circuit: CircuitFacts, pack: RulePack, on: PlainDate): PackDecision {
  const answer = (applies: PackDecision['applies'], ...reasons: Reason[]): PackDecision => ({ packId: pack.id, applies, reasons })
  if (!circuit.packIds.includes(pack.id)) return answer('no', reason('switched-off'))
  const least = valueOnOrNone(pack.scope.leastChargeKg, on)
  if (!least) return answer('no', notInForce(pack, on))
  const gas = refrigerantReason(circuit, pack, on)
  if (!gas.isCovered) return answer('no', gas.why)
  if (!circuit.fullChargeKg) return answer('undecided', gas.why, reason('charge-unknown', {}, least.value))
  if (lessThan(circuit.fullChargeKg, least.value)) return answer('no', reason('charge-below', {}, least.value))
  const reached = reason('charge-reached', {}, least.value)
  if (!pack.scope.exceptsSubsector || circuit.category !== 'comfort-cooling') return answer('yes', gas.why, reached)
  switch (circuit.subsectorDecision) {
    case 'excepted': return answer('no', reason('subsector-excepted'))
    case 'not-excepted': return answer('yes', gas.why, reached, reason('subsector-not-excepted'))
    case null: return answer('undecided', gas.why, reached, reason('subsector-undecided'))
    default: return circuit.subsectorDecision satisfies never
  }
}

function notInForce({ scope: { leastChargeKg: { values } } }: RulePack, on: PlainDate): Reason {
  const next = values.find(({ from }) => from > on)
  return next ? reason('not-in-force', { from: next.from }) : reason('no-longer-in-force', { until: values.at(-1)?.until ?? '' })
}

function refrigerantReason({ refrigerant }: CircuitFacts, pack: RulePack, on: PlainDate): { isCovered: boolean; why: Reason } {
  const { refrigerants } = pack.scope
  if (refrigerants.kind === 'ozone-depleting')
    return refrigerant.isOzoneDepleting ? { isCovered: true, why: reason('ozone-depleting') } : { isCovered: false, why: reason('not-ozone-depleting') }
  // A blend of an HCFC and an HFC, such as R-408A, is under both sets of rules: this one goes by what it contains.
  if (refrigerant.containsHfc) return { isCovered: true, why: reason('contains-hfc') }
  // A class I or class II substance is what was replaced, not a substitute, whatever its GWP.
  if (refrigerant.isOzoneDepleting) return { isCovered: false, why: reason('ozone-depleting') }
  const { value: gwpAbove } = valueOn(refrigerants.gwpAbove, on)
  if (refrigerant.gwp === null) return { isCovered: true, why: reason('gwp-unknown', { gwp: gwpAbove }) }
  return new Exact(refrigerant.gwp).greaterThan(gwpAbove)
    ? { isCovered: true, why: reason('substitute-above-gwp', { gwp: gwpAbove }) }
    : { isCovered: false, why: reason('no-hfc-and-low-gwp', { gwp: gwpAbove }) }
}

/** A threshold in force for a circuit, with its source. */
export interface Threshold {
  packId: string
  /** [% of full charge per 12 months] above it, not at it, action is due */
  threshold: Percent
  source: Source
  checkedOn: PlainDate
}

/**
 * The thresholds of all packs that apply on a day. A pack that a person has not settled yet (`undecided`)
 * counts: a warning too many is safer than one too few.
 */
export function thresholdsFor(circuit: CircuitFacts, packs: readonly RulePack[], on: PlainDate): Threshold[] {
  return appliedPacks(circuit, packs, on).map((pack) => {
    const { value, source, checkedOn } = valueOn(pack.threshold, on)
    return { packId: pack.id, threshold: value[circuit.category], source, checkedOn }
  })
}

/** The packs that apply on a day, those that a person has not settled yet among them. */
export function appliedPacks(circuit: CircuitFacts, packs: readonly RulePack[], on: PlainDate): RulePack[] {
  const applied = new Set(packsFor(circuit, packs, on).filter(({ applies }) => applies !== 'no').map(({ packId }) => packId))
  return packs.filter((pack) => applied.has(pack.id))
}

/** The lowest of some thresholds decides: who keeps below it keeps below all. */
export const lowestThreshold = (thresholds: readonly Threshold[]): Threshold | null =>
  thresholds.reduce<Threshold | null>((lowest, each) => (lowest && !lowest.threshold.greaterThan(each.threshold) ? lowest : each), null)

/** A duty that runs, with the day on which it is due; its texts stand under `rules.duties` by `code`. */
export interface Duty {
  packId: string
  code: string
  trigger: DutyTrigger
  triggeredOn: PlainDate
  dueOn: PlainDate
  /** [d] where the due date is a span of days, for the sentence that explains it */
  days: number | null
  /** The later day where an industrial process must be shut down for the repair. */
  dueWithProcessShutdownOn: PlainDate | null
  source: Source
  checkedOn: PlainDate
}

/** The duties that a trigger starts for a circuit, the first due first. */
export function dutiesStarted({ circuit, packs, trigger, on }: {
  circuit: CircuitFacts
  packs: readonly RulePack[]
  trigger: DutyTrigger
  on: PlainDate
}): Duty[] {
  const duties = appliedPacks(circuit, packs, on).flatMap((pack) =>
    pack.duties.filter((rule) => rule.trigger === trigger && isForCircuit(rule, circuit)).map((rule) => dutyOf(pack, rule, circuit, on)))
  return duties.sort((a, b) => (a.dueOn < b.dueOn ? -1 : a.dueOn > b.dueOn ? 1 : 0))
}

/** What an addition starts, by the rate that it gave: the duties of every pack whose threshold it is above. */
export function dutiesOfAddition({ circuit, packs, rate, on }: {
  circuit: CircuitFacts
  packs: readonly RulePack[]
  /** [%] null where the addition is exempt */
  rate: Percent | null
  on: PlainDate
}): Duty[] {
  if (!rate) return []
  const passed = new Set(thresholdsFor(circuit, packs, on).filter(({ threshold }) => isAbove(rate, threshold)).map(({ packId }) => packId))
  return dutiesStarted({ circuit, packs: packs.filter((pack) => passed.has(pack.id)), trigger: 'above-threshold', on })
}

function isForCircuit(rule: DutyRule, { category, fullChargeKg }: CircuitFacts): boolean {
  if (rule.categories && !rule.categories.includes(category)) return false
  if (rule.leastChargeKg && (!fullChargeKg || lessThan(fullChargeKg, rule.leastChargeKg))) return false
  return !(rule.belowChargeKg && fullChargeKg && !lessThan(fullChargeKg, rule.belowChargeKg))
}

function dutyOf(pack: RulePack, rule: DutyRule, circuit: CircuitFacts, on: PlainDate): Duty {
  const { value, source, checkedOn } = valueOn(rule.due, on)
  const longerDays = 'days' in value && circuit.category === 'industrial-process' ? value.withProcessShutdownDays : undefined
  return {
    packId: pack.id, code: rule.code, trigger: rule.trigger, triggeredOn: on, dueOn: dueOn(value, on), days: 'days' in value ? value.days : null,
    dueWithProcessShutdownOn: longerDays === undefined ? null : addDays(on, longerDays), source, checkedOn,
  }
}

/** The day on which a duty that starts on `on` is due. */
export function dueOn(due: Due, on: PlainDate): PlainDate {
  if ('days' in due) return addDays(on, due.days)
  if ('years' in due) return addYears(on, due.years)
  if ('on' in due) return nextOccurrence(due.on, on)
  switch (due.schedule) {
    case 'quarterly': return addMonths(on, 3)
    case 'calendar-year': return plainDate(`${pad(yearOf(on) + 1, 4)}-12-31`)
    default: return due.schedule satisfies never
  }
}

const pad = (value: number, digits: number): string => String(value).padStart(digits, '0')

/** That day in the year after the one in which the trigger fell. */
function nextOccurrence({ month, day }: { month: number; day: number }, on: PlainDate): PlainDate {
  return plainDate(`${pad(yearOf(on) + 1, 4)}-${pad(month, 2)}-${pad(day, 2)}`)
}
