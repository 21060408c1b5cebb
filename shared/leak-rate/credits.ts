import { addMonths, isBefore, type PlainDate } from '../dates/plain-date'
import { isPositive, minus, plus, smaller, sumMass, ZERO_MASS, type Mass } from '../mass/mass'
import type { Addition, Removal } from './history'

/** Why a part of what goes in is no leak: it was taken out for the season, or recovered for a repair. */
export type CreditKind = 'seasonal' | 'returned'

interface Lot {
  removedOn: PlainDate
  leftKg: Mass
}

/** [months] a removal may be answered; the law says so of the season, for a repair it is our reading */
const CREDIT_MONTHS = 12

/**
 * Gas that was taken out of the circuit and may come back without being counted. The oldest goes first.
 *
 * - Seasonal variance (40 CFR 82.157(b)): a removal for the season answers additions for the season, within
 *   12 months and up to what was removed.
 * - Returned gas (our reading): what was recovered for a repair, or for a reason nobody noted, answers additions
 *   of any other purpose, within 12 months.
 * - A removal for a retrofit or a retirement is answered by nothing: the next filling is a new one.
 */
export class Credits {
  private readonly lots: Record<CreditKind, Lot[]> = { seasonal: [], returned: [] }

  remove({ purpose, occurredOn, massKg }: Removal): void {
    if (purpose === 'retrofit' || purpose === 'retirement' || purpose === 'installation') return
    this.lots[creditKindOf({ purpose })].push({ removedOn: occurredOn, leftKg: massKg })
  }

  /** What of an addition may come back uncounted. @returns [kg] the whole credit, also where it is more than the addition */
  available(addition: Pick<Addition, 'purpose' | 'occurredOn'>): Mass {
    return sumMass(this.open(addition).map((lot) => lot.leftKg))
  }

  /** Uses up the credit for an addition. @returns [kg] the part of it that is not counted */
  use(addition: Addition): Mass {
    let usedKg = ZERO_MASS
    for (const lot of this.open(addition)) {
      const takenKg = smaller(lot.leftKg, minus(addition.massKg, usedKg))
      lot.leftKg = minus(lot.leftKg, takenKg)
      usedKg = plus(usedKg, takenKg)
    }
    return usedKg
  }

  /** The circuit was filled anew: what was taken out before is not awaited any more. */
  clear(): void {
    this.lots.seasonal = []
    this.lots.returned = []
  }

  private open({ purpose, occurredOn }: Pick<Addition, 'purpose' | 'occurredOn'>): Lot[] {
    const isOpen = (lot: Lot) => isPositive(lot.leftKg) && !isBefore(addMonths(lot.removedOn, CREDIT_MONTHS), occurredOn)
    return this.lots[creditKindOf({ purpose })].filter(isOpen)
  }
}

/** Which credit an event of this purpose gives or takes. */
export const creditKindOf = ({ purpose }: Pick<Addition, 'purpose'>): CreditKind =>
  purpose === 'seasonal' ? 'seasonal' : 'returned'
