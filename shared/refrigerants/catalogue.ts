import type { Source } from '../rules/dated'
import { Exact } from '../units/decimal'

/** ASHRAE Standard 34: toxicity A or B, flammability 1, 2L, 2 or 3. */
export type SafetyClass = 'A1' | 'A2L' | 'A2' | 'A3' | 'B1' | 'B2L'

export interface Refrigerant {
  /** ASHRAE Standard 34 designation. */
  id: string
  safetyClass: SafetyClass
  /** [% by mass] of each component; one component of 100 for a pure fluid */
  composition: Readonly<Record<string, string>>
  /** Whether the saturation table rests on mixing rules without fitted data; then it is shown as approximate. */
  isEstimated?: boolean
}

/**
 * The refrigerants that Weighback knows; where each entry is from stands in `CATALOGUE_SOURCES`.
 *
 * @see ASHRAE Standard 34 for designations, nominal compositions and safety classes
 */
export const REFRIGERANTS: readonly Refrigerant[] = [
  { id: 'R-11', safetyClass: 'A1', composition: { 'R-11': '100' } },
  { id: 'R-12', safetyClass: 'A1', composition: { 'R-12': '100' } },
  { id: 'R-13', safetyClass: 'A1', composition: { 'R-13': '100' } },
  { id: 'R-22', safetyClass: 'A1', composition: { 'R-22': '100' } },
  { id: 'R-23', safetyClass: 'A1', composition: { 'R-23': '100' } },
  { id: 'R-32', safetyClass: 'A2L', composition: { 'R-32': '100' } },
  { id: 'R-114', safetyClass: 'A1', composition: { 'R-114': '100' } },
  { id: 'R-123', safetyClass: 'B1', composition: { 'R-123': '100' } },
  { id: 'R-124', safetyClass: 'A1', composition: { 'R-124': '100' } },
  { id: 'R-125', safetyClass: 'A1', composition: { 'R-125': '100' } },
  { id: 'R-134a', safetyClass: 'A1', composition: { 'R-134a': '100' } },
  { id: 'R-143a', safetyClass: 'A2L', composition: { 'R-143a': '100' } },
  { id: 'R-152a', safetyClass: 'A2', composition: { 'R-152a': '100' } },
  { id: 'R-227ea', safetyClass: 'A1', composition: { 'R-227ea': '100' } },
  { id: 'R-236fa', safetyClass: 'A1', composition: { 'R-236fa': '100' } },
  { id: 'R-245fa', safetyClass: 'B1', composition: { 'R-245fa': '100' } },
  { id: 'R-290', safetyClass: 'A3', composition: { 'R-290': '100' } },
  { id: 'R-401A', safetyClass: 'A1', composition: { 'R-22': '53', 'R-152a': '13', 'R-124': '34' }, isEstimated: true },
  { id: 'R-402A', safetyClass: 'A1', composition: { 'R-125': '60', 'R-290': '2', 'R-22': '38' }, isEstimated: true },
  { id: 'R-402B', safetyClass: 'A1', composition: { 'R-125': '38', 'R-290': '2', 'R-22': '60' }, isEstimated: true },
  { id: 'R-404A', safetyClass: 'A1', composition: { 'R-125': '44', 'R-143a': '52', 'R-134a': '4' } },
  { id: 'R-407A', safetyClass: 'A1', composition: { 'R-32': '20', 'R-125': '40', 'R-134a': '40' } },
  { id: 'R-407C', safetyClass: 'A1', composition: { 'R-32': '23', 'R-125': '25', 'R-134a': '52' } },
  { id: 'R-407F', safetyClass: 'A1', composition: { 'R-32': '30', 'R-125': '30', 'R-134a': '40' } },
  { id: 'R-407H', safetyClass: 'A1', composition: { 'R-32': '32.5', 'R-125': '15', 'R-134a': '52.5' } },
  { id: 'R-408A', safetyClass: 'A1', composition: { 'R-125': '7', 'R-143a': '46', 'R-22': '47' }, isEstimated: true },
  { id: 'R-409A', safetyClass: 'A1', composition: { 'R-22': '60', 'R-124': '25', 'R-142b': '15' }, isEstimated: true },
  { id: 'R-410A', safetyClass: 'A1', composition: { 'R-32': '50', 'R-125': '50' } },
  { id: 'R-417A', safetyClass: 'A1', composition: { 'R-125': '46.6', 'R-134a': '50', 'R-600': '3.4' } },
  { id: 'R-421A', safetyClass: 'A1', composition: { 'R-125': '58', 'R-134a': '42' } },
  { id: 'R-422A', safetyClass: 'A1', composition: { 'R-125': '85.1', 'R-134a': '11.5', 'R-600a': '3.4' } },
  { id: 'R-422B', safetyClass: 'A1', composition: { 'R-125': '55', 'R-134a': '42', 'R-600a': '3' } },
  { id: 'R-422D', safetyClass: 'A1', composition: { 'R-125': '65.1', 'R-134a': '31.5', 'R-600a': '3.4' } },
  { id: 'R-427A', safetyClass: 'A1', composition: { 'R-32': '15', 'R-125': '25', 'R-143a': '10', 'R-134a': '50' } },
  { id: 'R-438A', safetyClass: 'A1', composition: { 'R-32': '8.5', 'R-125': '45', 'R-134a': '44.2', 'R-600': '1.7', 'R-601a': '0.6' }, isEstimated: true },
  { id: 'R-448A', safetyClass: 'A1', composition: { 'R-32': '26', 'R-125': '26', 'R-1234yf': '20', 'R-134a': '21', 'R-1234ze(E)': '7' } },
  { id: 'R-449A', safetyClass: 'A1', composition: { 'R-32': '24.3', 'R-125': '24.7', 'R-1234yf': '25.3', 'R-134a': '25.7' } },
  { id: 'R-450A', safetyClass: 'A1', composition: { 'R-134a': '42', 'R-1234ze(E)': '58' } },
  { id: 'R-452A', safetyClass: 'A1', composition: { 'R-32': '11', 'R-125': '59', 'R-1234yf': '30' } },
  { id: 'R-452B', safetyClass: 'A2L', composition: { 'R-32': '67', 'R-125': '7', 'R-1234yf': '26' } },
  { id: 'R-454A', safetyClass: 'A2L', composition: { 'R-32': '35', 'R-1234yf': '65' } },
  { id: 'R-454B', safetyClass: 'A2L', composition: { 'R-32': '68.9', 'R-1234yf': '31.1' } },
  { id: 'R-454C', safetyClass: 'A2L', composition: { 'R-32': '21.5', 'R-1234yf': '78.5' } },
  { id: 'R-455A', safetyClass: 'A2L', composition: { 'R-744': '3', 'R-32': '21.5', 'R-1234yf': '75.5' } },
  { id: 'R-466A', safetyClass: 'A1', composition: { 'R-32': '49', 'R-125': '11.5', 'R-13I1': '39.5' } },
  { id: 'R-500', safetyClass: 'A1', composition: { 'R-12': '73.8', 'R-152a': '26.2' } },
  { id: 'R-502', safetyClass: 'A1', composition: { 'R-22': '48.8', 'R-115': '51.2' } },
  { id: 'R-507A', safetyClass: 'A1', composition: { 'R-125': '50', 'R-143a': '50' } },
  { id: 'R-508B', safetyClass: 'A1', composition: { 'R-23': '46', 'R-116': '54' } },
  { id: 'R-513A', safetyClass: 'A1', composition: { 'R-1234yf': '56', 'R-134a': '44' } },
  { id: 'R-514A', safetyClass: 'B1', composition: { 'R-1336mzz(Z)': '74.7', 'R-1130(E)': '25.3' } },
  { id: 'R-515B', safetyClass: 'A1', composition: { 'R-1234ze(E)': '91.1', 'R-227ea': '8.9' } },
  { id: 'R-600a', safetyClass: 'A3', composition: { 'R-600a': '100' } },
  { id: 'R-717', safetyClass: 'B2L', composition: { 'R-717': '100' } },
  { id: 'R-744', safetyClass: 'A1', composition: { 'R-744': '100' } },
  { id: 'R-1233zd(E)', safetyClass: 'A1', composition: { 'R-1233zd(E)': '100' } },
  { id: 'R-1234yf', safetyClass: 'A2L', composition: { 'R-1234yf': '100' } },
  { id: 'R-1234ze(E)', safetyClass: 'A2L', composition: { 'R-1234ze(E)': '100' } },
  { id: 'R-1270', safetyClass: 'A3', composition: { 'R-1270': '100' } },
  { id: 'R-1336mzz(E)', safetyClass: 'A1', composition: { 'R-1336mzz(E)': '100' } },
  { id: 'R-1336mzz(Z)', safetyClass: 'A1', composition: { 'R-1336mzz(Z)': '100' } },
]

const byId = new Map(REFRIGERANTS.map((refrigerant) => [refrigerant.id, refrigerant]))

/** @returns null for a designation that is not in the catalogue */
export const refrigerantById = (id: string): Refrigerant | null => byId.get(id) ?? null
/** @throws RangeError if the designation is not in the catalogue */
export function refrigerantOf(id: string): Refrigerant {
  const refrigerant = byId.get(id)
  if (!refrigerant) throw new RangeError(`Refrigerant ${id} is not in the catalogue.`)
  return refrigerant
}

/** Class I (CFC) and class II (HCFC) substances among the components. */
const CLASS_I: readonly string[] = ['R-11', 'R-12', 'R-13', 'R-114', 'R-115']
const CLASS_II: readonly string[] = ['R-22', 'R-123', 'R-124', 'R-142b']
/** Regulated HFCs among the components. */
const REGULATED_HFCS: readonly string[] = ['R-23', 'R-32', 'R-125', 'R-134a', 'R-143a', 'R-152a', 'R-227ea', 'R-236fa', 'R-245fa']
/** Unsaturated fluorocarbons among the components. */
const UNSATURATED: readonly string[] = ['R-1234yf', 'R-1234ze(E)', 'R-1233zd(E)', 'R-1336mzz(E)', 'R-1336mzz(Z)']

/** Where each kind of entry in this file is from, and how well it is founded. */
export const CATALOGUE_SOURCES = {
  composition: { cite: 'ASHRAE Standard 34, nominal compositions', basis: 'memory' },
  safetyClass: { cite: 'ASHRAE Standard 34, safety groups', basis: 'memory' },
  isEstimated: { cite: 'CoolProp 8.0.0: binary pairs without fitted parameters', basis: 'read' },
  ozoneClass: { cite: '40 CFR part 82 subpart A, appendices A and B', basis: 'memory' },
  containsHfc: { cite: '42 U.S.C. 7675(c)(1), the list of 18 regulated substances', basis: 'memory' },
  containsUnsaturated: { cite: 'Regulation (EU) 2024/573, Annex II section 1', basis: 'memory' },
} as const satisfies Record<string, Source>

const hasAnyOf = (refrigerant: Refrigerant, components: readonly string[]): boolean =>
  Object.keys(refrigerant.composition).some((component) => components.includes(component))

/** 'I' or 'II' for a class I or class II substance or a blend that contains one, else null. */
export function ozoneClass(refrigerant: Refrigerant): 'I' | 'II' | null {
  if (hasAnyOf(refrigerant, CLASS_I)) return 'I'
  return hasAnyOf(refrigerant, CLASS_II) ? 'II' : null
}
export const isOzoneDepleting = (refrigerant: Refrigerant): boolean => ozoneClass(refrigerant) !== null
export const containsHfc = (refrigerant: Refrigerant): boolean => hasAnyOf(refrigerant, REGULATED_HFCS)
export const containsUnsaturated = (refrigerant: Refrigerant): boolean => hasAnyOf(refrigerant, UNSATURATED)
/** Flammable as ASHRAE 34 classes it: 2L, 2 or 3. */
export const isFlammableClass = (safetyClass: SafetyClass): boolean => !safetyClass.endsWith('1')
/** Of higher toxicity as ASHRAE 34 classes it: B. */
export const isToxicClass = (safetyClass: SafetyClass): boolean => safetyClass.startsWith('B')
export const isFlammable = (refrigerant: Refrigerant): boolean => isFlammableClass(refrigerant.safetyClass)
export const isBlend = (refrigerant: Refrigerant): boolean => Object.keys(refrigerant.composition).length > 1

/** The components with their share of the mass, which sum to one. @returns [dimensionless] exact */
export function massShares(refrigerant: Refrigerant): { component: string; share: Exact }[] {
  const parts = Object.entries(refrigerant.composition).map(([component, text]) => ({ component, share: new Exact(text) }))
  const total = parts.reduce((sum, part) => sum.plus(part.share), new Exact(0))
  return parts.map(({ component, share }) => ({ component, share: share.dividedBy(total) }))
}
