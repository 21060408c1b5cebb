import { yearOf, type PlainDate } from '../dates/plain-date'
import { percentOfQuotient, type Percent } from '../leak-rate/percent'
import { isNegative, isPositive, plus, ZERO_MASS, type Mass } from '../mass/mass'
import { valueOnOrNone } from './dated'
import { appliedPacks, dutiesStarted, type CircuitFacts, type Duty } from './engine'
import type { RulePack } from './pack'

/** What a circuit lost, on the day on which it showed. */
export interface Loss {
  on: PlainDate
  /** [kg] ≥ 0 */
  lostKg: Mass
}

/** A calendar year in which a circuit lost as much as a pack calls chronic. */
export interface ChronicLeak {
  packId: string
  year: number
  /** The day on which the losses of the year reached it. */
  reachedOn: PlainDate
  /** [kg] lost in the year, what came after that day included */
  lostKg: Mass
  /** [% of full charge] the same */
  share: Percent
  /** What is due then: the report on 1 March of the next year. */
  duties: Duty[]
}

/**
 * The calendar years in which a circuit leaked chronically, pack by pack, the earliest first.
 *
 * @param circuit  with the full charge that its losses are measured by; without one there is no answer yet, and none is given
 * @param losses  in any order, of any years
 * @throws RangeError if a loss is below zero
 * @see 40 CFR 82.157(j), 84.106(j), from memory: 125 % of the full charge or more in a calendar year
 */
export function chronicLeaks({ circuit, packs, losses }: { circuit: CircuitFacts; packs: readonly RulePack[]; losses: readonly Loss[] }): ChronicLeak[] {
  if (losses.some(({ lostKg }) => isNegative(lostKg))) throw new RangeError('A loss is not below zero.')
  const { fullChargeKg } = circuit
  if (!fullChargeKg || !isPositive(fullChargeKg)) return []
  const sorted = [...losses].sort((a, b) => (a.on < b.on ? -1 : a.on > b.on ? 1 : 0))
  const years = new Set(sorted.map(({ on }) => yearOf(on)))
  return [...years].flatMap((year) => {
    const ofYear = sorted.filter(({ on }) => yearOf(on) === year)
    return packs.flatMap((pack) => chronicYear({ circuit, pack, fullChargeKg, losses: ofYear }) ?? [])
  })
}

function chronicYear({ circuit, pack, fullChargeKg, losses }: { circuit: CircuitFacts; pack: RulePack; fullChargeKg: Mass; losses: readonly Loss[] }): ChronicLeak | null {
  let lostKg = ZERO_MASS
  let reachedOn: PlainDate | null = null
  for (const loss of losses) {
    lostKg = plus(lostKg, loss.lostKg)
    const limit = valueOnOrNone(pack.chronicLoss, loss.on)
    if (!reachedOn && limit && !percentOfQuotient(lostKg, fullChargeKg).lessThan(limit.value) && appliedPacks(circuit, [pack], loss.on).length > 0) reachedOn = loss.on
  }
  if (!reachedOn) return null
  const duties = dutiesStarted({ circuit, packs: [pack], trigger: 'chronic-leak', on: reachedOn })
  return { packId: pack.id, year: yearOf(reachedOn), reachedOn, lostKg, share: percentOfQuotient(lostKg, fullChargeKg), duties }
}
