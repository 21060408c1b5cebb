import type { PlainDate } from '../dates/plain-date'
import type { PostingKind, PostingPurpose } from './ledger'
import type { Category } from '../rules/categories'

export interface CustomerDraft {
  name: string
  contactName: string | null
  email: string | null
  phone: string | null
  address: string | null
  note: string | null
}
export interface WireCustomer extends CustomerDraft {
  id: string
  siteCount: number
  version: number
  may: string[]
}

export const JURISDICTIONS = ['US', 'US-CA', 'EU', 'GB'] as const
export const LEAK_RATE_METHODS = ['annualizing', 'rolling'] as const
export type LeakRateMethod = (typeof LEAK_RATE_METHODS)[number]

export interface SiteDraft {
  customerId: string
  name: string
  street: string
  city: string
  region: string | null
  postalCode: string | null
  /** ISO 3166-1 alpha-2. */
  country: string
  /** IANA zone name. */
  timeZone: string
  /** [m] above sea level. */
  elevationM: number
  jurisdiction: (typeof JURISDICTIONS)[number]
  leakRateMethod: LeakRateMethod
  /** Ids of the rule packs switched on. */
  rulePacks: string[]
}
export interface WireSite extends SiteDraft {
  id: string
  customerName: string
  systemCount: number
  circuitCount: number
  overCount: number
  nearCount: number
  /** empty by the book */
  flatCount: number
  version: number
  may: string[]
}

export interface SystemDraft {
  siteId: string
  tag: string
  name: string
  location: string | null
  maker: string | null
  model: string | null
  serial: string | null
  category: Category
  installedOn: PlainDate | null
  /** Whether the owner counts the unit to the excepted residential and light commercial subsector (40 CFR 84.106); null: not decided. */
  subsectorDecision: 'excepted' | 'not-excepted' | null
  subsectorDecidedBy: string | null
  subsectorReason: string | null
}
export interface WireSystem extends SystemDraft {
  id: string
  customerId: string
  customerName: string
  siteName: string
  circuits: CircuitStanding[]
  version: number
  may: string[]
}

export const CIRCUIT_STATUSES = ['in-service', 'mothballed', 'retired'] as const
export type CircuitStatus = (typeof CIRCUIT_STATUSES)[number]
export const FULL_CHARGE_METHODS = ['manufacturer', 'calculated', 'measured', 'range'] as const

/** A full charge and how it was determined, 40 CFR 82.152. */
export interface FullChargeDraft {
  method: (typeof FULL_CHARGE_METHODS)[number]
  /** [kg] exact decimal text; for a range null: its midpoint is taken. */
  massKg: string | null
  rangeLowKg: string | null
  rangeHighKg: string | null
  effectiveOn: PlainDate
  note: string | null
}
export interface WireFullCharge extends Omit<FullChargeDraft, 'massKg'> {
  id: string
  massKg: string
  personName: string
  recordedAt: string
}

export interface CircuitDraft {
  systemId: string
  name: string
  refrigerant: string
  category: Category
  status: CircuitStatus
  commissionedOn: PlainDate | null
  /** Only when the circuit is created; later by POST /api/circuits/:id/full-charges. */
  fullCharge: FullChargeDraft | null
}

/** far: room left; near: at or over 70 % of the threshold; over; flat: the book says empty; none: nothing to rate. */
export const STANDINGS = ['over', 'flat', 'near', 'far', 'none'] as const
export type Standing = (typeof STANDINGS)[number]

/** What lists show of a circuit. Rates in per cent per 12 months as decimal text, six digits at most. */
export interface CircuitStanding {
  id: string
  name: string
  systemId: string
  systemTag: string
  systemName: string
  siteId: string
  siteName: string
  customerId: string
  customerName: string
  refrigerant: string
  category: Category
  status: CircuitStatus
  fullChargeKg: string | null
  bookChargeKg: string
  ratePercent: string | null
  ratedOn: PlainDate | null
  thresholdPercent: string | null
  /** [kg] still to be added today before the threshold is passed; null without a threshold. */
  roomKg: string | null
  standing: Standing
}

/** A threshold in force for a circuit, with everything the law requires beside it. */
export interface WireThreshold {
  packId: string
  percent: string
  cite: string
  basis: 'read' | 'memory' | 'ours'
  checkedOn: PlainDate
}
/** Whether a pack applies to this circuit and why; reasons are codes of the language file's `rules.reasons`. */
export interface WirePackDecision {
  packId: string
  applies: 'yes' | 'no' | 'undecided'
  reasons: { code: string; params: Record<string, string> }[]
}
/** The rate of one addition. */
export interface WireRate {
  postingId: string
  occurredOn: PlainDate
  massKg: string
  countedKg: string
  addedKg: string
  days: number | null
  fullChargeKg: string | null
  ratePercent: string | null
  thresholdPercent: string | null
  isAbove: boolean
  exempt: string | null
  basis: string[]
  leakId: string | null
}
export interface WireCircuit extends CircuitStanding {
  commissionedOn: PlainDate | null
  siteTimeZone: string
  siteElevationM: number
  leakRateMethod: LeakRateMethod
  fullCharges: WireFullCharge[]
  thresholds: WireThreshold[]
  packs: WirePackDecision[]
  rates: WireRate[]
  components: WireComponent[]
  marks: WireMark[]
  leaks: WireLeak[]
  verifications: WireVerification[]
  /** Tests, additions and removals, as shared/leak-rate reads them: the phone computes the look-ahead from it. */
  history: WireHistory
  sisters: CircuitStanding[]
  version: number
  may: string[]
}
export interface WireHistory {
  method: LeakRateMethod
  commissionedOn: PlainDate | null
  fullCharges: { effectiveOn: PlainDate; massKg: string }[]
  events: {
    kind: 'addition' | 'removal' | 'follow-up-passed'
    postingId: string | null
    occurredOn: PlainDate
    /** Null for a test of which only the day is known. */
    occurredAt: string | null
    massKg: string | null
    leakId: string | null
    purpose: PostingPurpose | null
  }[]
}

export const COMPONENT_KINDS = ['compressor', 'condenser-coil', 'evaporator-coil', 'valve', 'joint', 'drier', 'receiver', 'line', 'service-port', 'pressure-control', 'other'] as const
export interface ComponentDraft {
  kind: (typeof COMPONENT_KINDS)[number]
  name: string
  position: string | null
}
export interface WireComponent extends ComponentDraft { id: string; circuitId: string }

/** A weak spot that does not leak yet. */
export interface MarkDraft { componentId: string | null; text: string; markedOn: PlainDate }
export interface WireMark extends MarkDraft { id: string; circuitId: string; circuitName: string; componentName: string | null; personName: string; resolvedOn: PlainDate | null }

export const LEAK_CAUSES = ['vibration-rub', 'corrosion', 'joint', 'impact', 'wear', 'unknown'] as const
export const FINDING_METHODS = ['bubbles', 'electronic', 'ultrasonic', 'dye', 'trace-gas', 'visual', 'standing-pressure'] as const
export interface LeakDraft {
  id: string
  componentId: string | null
  foundOn: PlainDate
  cause: (typeof LEAK_CAUSES)[number]
  method: (typeof FINDING_METHODS)[number]
  position: string | null
  note: string | null
}
export interface WireLeak extends LeakDraft {
  circuitId: string
  componentName: string | null
  personName: string
  repairedOn: PlainDate | null
  repair: string | null
}
export interface RepairDraft { repairedOn: PlainDate; repair: string }

export interface VerificationDraft {
  id: string
  kind: 'initial' | 'follow-up'
  leakId: string | null
  testedOn: PlainDate
  type: string
  passed: boolean
  /** A passed follow-up that showed all identified leaks repaired restarts the rolling window. */
  showsAllRepaired: boolean
  note: string | null
}
export interface WireVerification extends VerificationDraft { circuitId: string; personName: string }

export interface WireOverview {
  over: number
  flat: number
  near: number
  far: number
  none: number
  /** First page, worst first; the rest by GET /api/circuits?sort=-severity */
  circuits: CircuitStanding[]
  stock: { refrigerant: string; massKg: string; cylinders: number }[] | null
  /** Cylinders and partners are the company's own: null for an owner. */
  latest: {
    id: string; occurredOn: PlainDate; kind: PostingKind; circuitName: string | null; siteName: string | null; cylinderNumber: string | null; toCylinderNumber: string | null
    partnerName: string | null; massKg: string; refrigerant: string; personName: string
  }[]
}

/** One call at one site by one technician. */
export interface VisitDraft { id: string; siteId: string; visitedOn: PlainDate; remark: string | null }
export interface WireVisit extends VisitDraft { siteName: string; customerName: string; personId: string; personName: string; postingCount: number; calculations: WireCalculation[]; may: string[] }

/** The result of a calculator that was put into the record of a visit, as it was shown. */
export interface CalculationDraft { id: string; calculator: string; title: string; lines: { label: string; value: string }[] }
export interface WireCalculation extends CalculationDraft { personName: string; recordedAt: string }
