import type { Basis } from '../rules/dated'
import type { Mass } from '../mass/mass'
import { Exact } from '../units/decimal'
import { massShares, refrigerantOf } from './catalogue'

/** A set of global warming potentials over 100 years, by component. A component that is missing has no value in that set. */
export interface GwpSet {
  id: string
  source: { cite: string; basis: Basis }
  values: Readonly<Record<string, string>>
  /** Components whose value is not in the set's own source, with where it is from; of the set's own basis. */
  added: Readonly<Record<string, string>>
}

/**
 * IPCC Fourth Assessment Report, 100 years: the values of 40 CFR part 84 appendix A and of Regulation (EU)
 * 2024/573 Annex I for HFCs. From memory, to be checked against the current text. Values for what those
 * annexes do not list are named in `added`.
 */
export const AR4: GwpSet = {
  id: 'ar4',
  source: { cite: 'IPCC AR4, 100 years, as in 40 CFR part 84 appendix A', basis: 'memory' },
  values: {
    'R-23': '14800', 'R-32': '675', 'R-125': '3500', 'R-134a': '1430', 'R-143a': '4470', 'R-152a': '124', 'R-227ea': '3220',
    'R-236fa': '9810', 'R-245fa': '1030', 'R-22': '1810', 'R-123': '77', 'R-11': '4750', 'R-12': '10900', 'R-13': '14400',
    'R-114': '10000', 'R-124': '609', 'R-115': '7370', 'R-142b': '2310', 'R-744': '1', 'R-290': '3', 'R-600a': '3', 'R-1270': '2',
    'R-717': '0', 'R-1234yf': '4', 'R-1234ze(E)': '7', 'R-1233zd(E)': '4.5', 'R-116': '12200', 'R-600': '4',
    'R-601a': '5', 'R-1336mzz(Z)': '9', 'R-1336mzz(E)': '18', 'R-13I1': '0.4', 'R-1130(E)': '1',
  },
  added: {
    'R-1234yf': 'Regulation (EU) 517/2014 Annex II', 'R-1234ze(E)': 'Regulation (EU) 517/2014 Annex II', 'R-1233zd(E)': 'Regulation (EU) 517/2014 Annex II',
    'R-290': 'Regulation (EU) 517/2014 Annex IV', 'R-600': 'Regulation (EU) 517/2014 Annex IV', 'R-600a': 'Regulation (EU) 517/2014 Annex IV',
    'R-1270': 'Regulation (EU) 517/2014 Annex IV', 'R-717': 'Regulation (EU) 517/2014 Annex IV',
    'R-601a': 'Regulation (EU) 517/2014 Annex IV', 'R-1336mzz(Z)': 'Regulation (EU) 517/2014 Annex II',
    'R-1336mzz(E)': 'WMO 2018', 'R-13I1': 'IPCC AR4 chapter 2: below 1', 'R-1130(E)': 'WMO 2018: below 1',
  },
}

/**
 * GWP of a refrigerant: for a blend the mean of its components by mass.
 *
 * @returns [kg CO2 per kg, 100 years] exact; null where a component has no value in the set, never a silent zero
 * @throws RangeError if the designation is not in the catalogue
 * @see 40 CFR 84 appendix A for the values; the mean by mass as in Regulation (EU) 2024/573 Annex VI
 */
export function gwpOf(id: string, set: GwpSet = AR4): Exact | null {
  let gwp = new Exact(0)
  for (const { component, share } of massShares(refrigerantOf(id))) {
    const value = set.values[component]
    if (value === undefined) return null
    gwp = gwp.plus(share.times(value))
  }
  return gwp
}

/** @returns [t CO2e] exact; null as `gwpOf` @throws RangeError as `gwpOf` */
export function co2eTonnes(mass: Mass, id: string, set: GwpSet = AR4): Exact | null {
  return gwpOf(id, set)?.times(mass).dividedBy(1000) ?? null
}
