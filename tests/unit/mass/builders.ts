import type { PostingDraft, PostingKind } from '../../../shared/api/ledger'
import { plainDate } from '../../../shared/dates/plain-date'
import { lb, toKgText, type Mass } from '../../../shared/mass/mass'
import { changeOf, type Posting } from '../../../shared/mass/postings'
import type { AccountRef, CircuitState, CylinderState } from '../../../shared/mass/states'

export const TODAY = plainDate('2026-06-15')

/** A 30 lb refillable cylinder of virgin R-410A, half full, in date and without an owner. */
export function aCylinder(traits: Partial<CylinderState> = {}): CylinderState {
  return {
    id: 'cylinder', refrigerant: 'R-410A', kind: 'refillable', contents: 'virgin', contentKg: lb('15'), tareKg: lb('17'),
    waterCapacityKg: lb('26.2'), fillLimitKg: lb('22'), testDueOn: plainDate('2028-01-31'), ownerCustomerId: null,
    status: 'in-use', ...traits,
  }
}

/** A circuit of 60 lb of R-410A that the book believes full. */
export function aCircuit(traits: Partial<CircuitState> = {}): CircuitState {
  return {
    id: 'circuit', refrigerant: 'R-410A', bookKg: lb('60'), fullChargeKg: lb('60'), status: 'in-service',
    ownerCustomerId: 'customer-a', ...traits,
  }
}

export function aDraft(kind: PostingKind, mass: Mass, traits: Partial<PostingDraft> = {}): PostingDraft {
  return {
    id: '0197c0de-0000-7000-8000-000000000001', kind, occurredOn: plainDate('2026-06-15'),
    occurredAt: '2026-06-15T15:00:00.000Z', refrigerant: 'R-410A', massKg: toKgText(mass), entered: null,
    cylinderId: 'cylinder', toCylinderId: 'to-cylinder', circuitId: 'circuit', partnerId: 'partner', visitId: null,
    leakId: null, purpose: null, isComplete: false, part: null, workDone: null, note: null,
    reversesId: kind === 'reversal' ? 'original' : null, reason: kind === 'reversal' ? 'Wrong cylinder' : null, ...traits,
  }
}

export const CYLINDER: AccountRef = { kind: 'cylinder', id: 'cylinder' }
export const TO_CYLINDER: AccountRef = { kind: 'cylinder', id: 'to-cylinder' }
export const CIRCUIT: AccountRef = { kind: 'circuit', id: 'circuit' }
export const PARTNER: AccountRef = { kind: 'partner', id: 'partner' }
export const AIR: AccountRef = { kind: 'air' }
export const VARIANCE: AccountRef = { kind: 'variance' }

/** The change of each account [lb] as text, so that a table of expected pounds reads like a ledger. */
export function poundsOf(posting: Posting): Record<string, string> {
  const accounts = { CYLINDER, TO_CYLINDER, CIRCUIT, PARTNER, AIR, VARIANCE }
  const pounds = Object.entries(accounts).map(([name, account]) => [name, changeOf(posting, account).dividedBy('0.45359237').toFixed()])
  return Object.fromEntries(pounds.filter(([, text]) => text !== '0'))
}
