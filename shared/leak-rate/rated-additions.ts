import { addDays, daysBetween, isAfter, isBefore, type PlainDate } from '../dates/plain-date'
import { isPositive, minus, sumMass, ZERO_MASS, type Mass } from '../mass/mass'
import { Credits, creditKindOf } from './credits'
import { fullChargeOn, inOrder, type Addition, type CircuitHistory, type FollowUpPassed, type LeakRateEvent } from './history'
import type { Percent } from './percent'
import { annualizedLeakRate, rollingLeakRate, YEAR_DAYS, type LeakAddition } from './rates'

/** Why an addition has no leak rate. */
export const EXEMPTIONS = ['installation', 'retrofit', 'seasonal', 'returned', 'no-full-charge'] as const
export type Exemption = (typeof EXEMPTIONS)[number]

/** What the rate of an addition rests on beyond the plain formula, mostly our readings of a silent text. */
export const RATE_BASES = [
  /** no earlier addition on record: days count from commissioning */
  'counted-from-commissioning',
  /** no earlier addition on record and no commissioning date: 365 days */
  'no-earlier-addition-365',
  /** an addition on the day of the last one belongs to the same leak; on the day of an installation or retrofit, to that */
  'same-day',
  /** earlier additions for the same leak are in the sum */
  'same-leak-summed',
  /** only what goes beyond the seasonal removal is counted */
  'seasonal-excess',
  /** only what goes beyond the gas recovered for the repair is counted */
  'recovered-returned',
  /** the rolling sum begins after a follow-up test that showed all leaks repaired (the law's own words) */
  'since-follow-up',
] as const
export type RateBasis = (typeof RATE_BASES)[number]

/** An addition with the leak rate that the law asks for on its day. */
export interface RatedAddition {
  postingId: string
  occurredOn: PlainDate
  occurredAt: string
  /** [kg] what went in */
  massKg: Mass
  leakId: string | null
  purpose: Addition['purpose']
  /** [kg] of it, what counts as added: without seasonal and returned gas; zero where nothing counts */
  countedKg: Mass
  /** [kg] the sum that the rate uses: for the leak (annualizing) or in the window (rolling) */
  addedKg: Mass
  /** The postings in that sum, oldest first, this one last. */
  summedIds: string[]
  /** [d] from the last addition before the leak, or the length of the window; null where exempt */
  days: number | null
  /** [kg] in force on the day */
  fullChargeKg: Mass | null
  /** [% of full charge per 12 months] null where exempt */
  rate: Percent | null
  exempt: Exemption | null
  basis: RateBasis[]
}

/**
 * The leak rate at every addition, in the order in which they happened. Each rate rests on what had happened
 * until then and on nothing later, so it stays what it was on its day.
 *
 * Our readings, where 40 CFR 82.152 and 82.157(b) are silent:
 * - an addition on the day of the last one belongs to the same leak, whatever leak is named;
 * - with no earlier addition, days count from commissioning, else 365;
 * - additions for installation, retrofit and season have no rate, yet refrigerant was added on those days, and
 *   the days to the next leak count from them; gas that only came back is no addition, and they do not;
 * - an addition on the day of an installation or retrofit, or on the day of commissioning, belongs to it;
 * - with an installation or retrofit every leak begins anew;
 * - the rolling window includes the day of the addition and excludes the day 365 days before it.
 *
 * @see 40 CFR 82.152 "leak rate"; 40 CFR 82.157(b)
 */
export function rateAdditions(history: CircuitHistory): RatedAddition[] {
  const ledger = new RateLedger(history)
  return inOrder(history.events).map((event) => ledger.take(event)).filter((rated) => rated !== null)
}

/** What a leak rate would rest on if something were added: the sum so far, and the days. */
export interface RateGround {
  /** Counted additions before this one that belong to the same sum. */
  summed: CountedAddition[]
  /** [d] */
  days: number
  basis: RateBasis[]
}

interface CountedAddition {
  postingId: string
  occurredOn: PlainDate
  countedKg: Mass
}

/** What decides to which leak an addition belongs. */
export type LeakKey = Pick<Addition, 'occurredOn' | 'leakId'>

/** The additions of one leak. */
interface Leak {
  members: CountedAddition[]
  leakIds: Set<string>
}

/** The state of a circuit's history as the days pass; `rateAdditions` and the look-ahead walk it. */
export class RateLedger {
  readonly credits = new Credits()
  private leaks: Leak[] = []
  private counted: CountedAddition[] = []
  private lastFilling: { kind: 'installation' | 'retrofit'; on: PlainDate } | null = null
  private lastFollowUp: FollowUpPassed | null = null
  private countedBeforeFollowUp = 0
  /** Days on which refrigerant was added, ascending. */
  private readonly addedOn: PlainDate[] = []

  constructor(private readonly history: CircuitHistory) {}

  /** Takes the next event in order. @returns the rated addition, if it was one */
  take(event: LeakRateEvent): RatedAddition | null {
    switch (event.kind) {
      case 'removal':
        this.credits.remove(event)
        return null
      case 'follow-up-passed':
        this.restart(event)
        return null
      case 'addition':
        return this.add(event)
      default:
        return event satisfies never
    }
  }

  private restart(followUp: FollowUpPassed): void {
    this.lastFollowUp = followUp
    this.countedBeforeFollowUp = this.counted.length
  }

  add(addition: Addition): RatedAddition {
    const exempt = this.fillingOf(addition)
    const rated = exempt ? this.asFilling(addition, exempt) : this.asLeak(addition)
    if (rated.exempt !== 'returned') this.addedOn.push(addition.occurredOn)
    return rated
  }

  /** Whether an addition belongs to an installation or a retrofit, and so has no rate. */
  fillingOf({ purpose, occurredOn }: Addition): 'installation' | 'retrofit' | null {
    if (purpose === 'installation' || purpose === 'retrofit') return purpose
    if (this.lastFilling?.on === occurredOn) return this.lastFilling.kind
    return this.history.commissionedOn === occurredOn && this.addedOn.length === 0 ? 'installation' : null
  }

  /** What the rate of an addition rests on before the addition itself is counted. */
  groundOf(addition: LeakKey): RateGround {
    return this.history.method === 'rolling' ? this.windowOf(addition) : this.leakGroundOf(addition)
  }

  private asFilling(addition: Addition, exempt: 'installation' | 'retrofit'): RatedAddition {
    this.lastFilling = { kind: exempt, on: addition.occurredOn }
    this.leaks = []
    this.credits.clear()
    const basis: RateBasis[] = addition.purpose === exempt ? [] : ['same-day']
    return { ...this.unrated(addition, ZERO_MASS, exempt), basis }
  }

  private asLeak(addition: Addition): RatedAddition {
    const creditedKg = this.credits.use(addition)
    const countedKg = minus(addition.massKg, creditedKg)
    const kind = creditKindOf(addition)
    if (!isPositive(countedKg)) return this.unrated(addition, countedKg, kind)
    const { summed: earlier, days, basis } = this.groundOf(addition)
    const member = { postingId: addition.postingId, occurredOn: addition.occurredOn, countedKg }
    this.count(addition, member)
    const summed = [...earlier, member]
    const addedKg = sumMass(summed.map((each) => each.countedKg))
    const fullChargeKg = fullChargeOn(this.history.fullCharges, addition.occurredOn)
    return {
      ...factsOf(addition), countedKg, addedKg, summedIds: summed.map((each) => each.postingId), days, fullChargeKg,
      rate: fullChargeKg && this.rateOf({ addedKg, fullChargeKg, days }), exempt: fullChargeKg ? null : 'no-full-charge',
      basis: [...basis, ...creditBasis(creditedKg, kind)],
    }
  }

  private rateOf(added: LeakAddition): Percent {
    return this.history.method === 'rolling' ? rollingLeakRate(added) : annualizedLeakRate(added)
  }

  private unrated(addition: Addition, countedKg: Mass, exempt: Exemption): RatedAddition {
    const fullChargeKg = fullChargeOn(this.history.fullCharges, addition.occurredOn)
    return { ...factsOf(addition), countedKg, addedKg: countedKg, summedIds: [], days: null, fullChargeKg, rate: null, exempt, basis: [] }
  }

  /** Puts an addition to its leak; leaks that prove to be one by it become one. */
  private count(addition: Addition, member: CountedAddition): void {
    const same = this.leaks.filter((leak) => isSameLeak(leak, addition))
    const leakIds = new Set([...same.flatMap((leak) => [...leak.leakIds]), ...(addition.leakId ? [addition.leakId] : [])])
    this.leaks = [...this.leaks.filter((leak) => !same.includes(leak)), { members: [...membersOf(same), member], leakIds }]
    this.counted.push(member)
  }

  private leakGroundOf(addition: LeakKey): RateGround {
    const { occurredOn } = addition
    const summed = membersOf(this.leaks.filter((leak) => isSameLeak(leak, addition)))
    const basis: RateBasis[] = []
    if (summed.some((member) => member.occurredOn === occurredOn)) basis.push('same-day')
    if (summed.some((member) => member.occurredOn !== occurredOn)) basis.push('same-leak-summed')
    const begunOn = summed[0]?.occurredOn ?? occurredOn
    const lastOn = this.addedOn.findLast((on) => isBefore(on, begunOn))
    if (lastOn) return { summed, days: this.yearAtMost(lastOn, occurredOn), basis }
    const { commissionedOn } = this.history
    return commissionedOn && isBefore(commissionedOn, begunOn)
      ? { summed, days: this.yearAtMost(commissionedOn, occurredOn), basis: [...basis, 'counted-from-commissioning'] }
      : { summed, days: YEAR_DAYS, basis: [...basis, 'no-earlier-addition-365'] }
  }

  private windowOf({ occurredOn }: LeakKey): RateGround {
    const opensAfter = addDays(occurredOn, -YEAR_DAYS)
    const isShorter = this.lastFollowUp !== null && isAfter(this.lastFollowUp.occurredOn, opensAfter)
    const summed = this.counted
      .slice(isShorter ? this.countedBeforeFollowUp : 0)
      .filter((member) => isAfter(member.occurredOn, opensAfter))
    return isShorter && this.lastFollowUp
      ? { summed, days: daysBetween(this.lastFollowUp.occurredOn, occurredOn), basis: ['since-follow-up'] }
      : { summed, days: YEAR_DAYS, basis: [] }
  }

  private yearAtMost(from: PlainDate, to: PlainDate): number {
    return Math.min(daysBetween(from, to), YEAR_DAYS)
  }
}

/** One leak: named so, or added to on the same day. */
const isSameLeak = (leak: Leak, { leakId, occurredOn }: LeakKey): boolean =>
  (leakId !== null && leak.leakIds.has(leakId)) || leak.members.some((member) => member.occurredOn === occurredOn)

const membersOf = (leaks: readonly Leak[]): CountedAddition[] =>
  leaks.flatMap((leak) => leak.members).sort((a, b) => (a.occurredOn < b.occurredOn ? -1 : a.occurredOn > b.occurredOn ? 1 : 0))

const factsOf = ({ postingId, occurredOn, occurredAt, massKg, leakId, purpose }: Addition) =>
  ({ postingId, occurredOn, occurredAt, massKg, leakId, purpose })

const creditBasis = (creditedKg: Mass, kind: 'seasonal' | 'returned'): RateBasis[] =>
  isPositive(creditedKg) ? [kind === 'seasonal' ? 'seasonal-excess' : 'recovered-returned'] : []
