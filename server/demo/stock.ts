import { v7 as uuid } from 'uuid'
import type { CylinderDraft } from '../../shared/api/cylinders'
import { addDays, addYears, type PlainDate } from '../../shared/dates/plain-date'
import { fillLimitOf } from '../../shared/field/fill-limit'
import { isPositive, larger, lb, lessThan, minus, plus, scaled, smaller, sumMass, toKgText, ZERO_MASS, type Mass } from '../../shared/mass/mass'
import type { Actor } from '../actor'
import type { Tx } from '../database'
import { createCylinder } from '../modules/cylinders/cylinders.service'
import { weighedAtMost } from './scale'

/** Stamped figures [lb] of the sizes in the demo's store. */
const SIZES = {
  small: { tare: '17.5', capacity: '26.25' },
  middle: { tare: '28.25', capacity: '47.5' },
  large: { tare: '56.5', capacity: '119' },
}
const FILLED = '0.9' // of the fill limit: how far the demo's supplier fills
const HEEL = lb('1') // what stays in a cylinder that is not quite emptied, and less than which is not worth a delivery

/** A demo cylinder as the loader keeps it in mind while it tells the stories. */
export interface StockCylinder {
  id: string
  number: string
  refrigerant: string
  size: keyof typeof SIZES
  holderId: string | null
  tare: Mass
  content: Mass
  limit: Mass
  /** The last day on which gas was weighed out; it is filled in the mornings, so not on that day any more. */
  usedOn: PlainDate | null
  /** Has a part of its own in the stories and is not taken for anything else. */
  isKept: boolean
}
export interface Portion { cylinder: StockCylinder; mass: Mass }
type Given = Partial<CylinderDraft> & { size?: keyof typeof SIZES; isKept?: boolean }

export const grossOf = ({ tare, content }: StockCylinder): Mass => plus(tare, content)
export const roomIn = ({ limit, content }: StockCylinder): Mass => minus(limit, content)

export class Stock {
  readonly service: StockCylinder[] = []
  readonly recovery: StockCylinder[] = []
  private count = 0

  constructor(private readonly tx: Tx, private readonly officer: Actor, private readonly today: PlainDate) {}

  /** An empty cylinder; service cylinders are refilled by the supplier, recovery cylinders by us. */
  async make(refrigerant: string, as: 'service' | 'recovery', holderId: string | null, given: Given = {}): Promise<StockCylinder> {
    const { size = 'middle', isKept = false, ...draft } = given
    const stamp = SIZES[size]
    const number = `${as === 'service' ? 'S' : 'V'}-${String(1001 + this.count * 7)}`
    this.count += 1
    const id = uuid()
    await createCylinder(this.tx, this.officer, {
      number, kind: as === 'service' ? 'refillable' : 'recovery', refrigerant, contents: as === 'recovery' ? 'recovered' : refrigerant === 'R-22' ? 'reclaimed' : 'virgin',
      tareKg: toKgText(lb(stamp.tare)), waterCapacityKg: toKgText(lb(stamp.capacity)),
      testDueOn: addDays(addYears(this.today, 2 + (this.count % 3)), this.count * 5), status: 'in-use', holderId, place: holderId ? null : 'Store, rack 2', ownerCustomerId: null, ...draft,
    }, this.today, id)
    const limit = fillLimitOf(lb(stamp.capacity), refrigerant) ?? ZERO_MASS
    const cylinder = { id, number, refrigerant, size, holderId, tare: lb(stamp.tare), content: ZERO_MASS, limit, usedOn: null, isKept }
    this[as].push(cylinder)
    return cylinder
  }

  /**
   * Cylinders out of which an amount can be weighed on a day, a person's own first. `fill` is called for each
   * that the supplier has to fill that morning before it is enough.
   */
  async gather(wanted: { refrigerant: string; mass: Mass; holderId: string; on: PlainDate }, fill: (cylinder: StockCylinder, mass: Mass) => Promise<void>): Promise<StockCylinder[]> {
    const { refrigerant, mass, holderId, on } = wanted
    const own = (cylinder: StockCylinder): number => (cylinder.holderId === holderId ? 0 : 1)
    const known = this.service.filter((each) => each.refrigerant === refrigerant && !each.isKept).sort((a, b) => own(a) - own(b))
    const enough = known.find(({ content }) => !lessThan(content, mass))
    if (enough) return [enough]
    const taken: StockCylinder[] = []
    const isShort = (): boolean => lessThan(sumMass(taken.map(usableIn)), mass)
    for (const cylinder of known.filter(({ usedOn }) => usedOn !== on)) {
      if (!isShort()) break
      await this.fillUp(cylinder, fill)
      taken.push(cylinder)
    }
    while (isShort()) {
      const cylinder = await this.make(refrigerant, 'service', known.some((each) => each.holderId === holderId) ? null : holderId)
      await this.fillUp(cylinder, fill)
      taken.push(cylinder)
    }
    return taken
  }

  /** A recovery cylinder into which gas of a customer may go: an empty one, else a new one of a fitting size. */
  async emptyFor(refrigerant: string, mass: Mass, holderId: string): Promise<StockCylinder> {
    const empty = this.recovery.find((each) => each.refrigerant === refrigerant && !each.isKept && !isPositive(each.content))
    return empty ?? this.make(refrigerant, 'recovery', holderId, { size: lessThan(lb('35'), mass) ? 'large' : 'middle' })
  }

  async fillUp(cylinder: StockCylinder, fill: (cylinder: StockCylinder, mass: Mass) => Promise<void>): Promise<void> {
    const mass = weighedAtMost('lb', minus(scaled(cylinder.limit, FILLED), cylinder.content))
    if (lessThan(mass, HEEL)) return
    await fill(cylinder, mass)
  }
}

/** What can be weighed out of a cylinder beside others: all but its heel. */
const usableIn = ({ content }: StockCylinder): Mass => larger(ZERO_MASS, minus(content, HEEL))

/** An amount shared out over cylinders: one gives all of it, or each what it has. */
export function portionsOf(cylinders: readonly StockCylinder[], mass: Mass, showable: (mass: Mass) => Mass): Portion[] {
  const [only] = cylinders
  if (only && cylinders.length === 1) return [{ cylinder: only, mass }]
  let rest = mass
  const portions: Portion[] = []
  for (const cylinder of cylinders) {
    const share = smaller(rest, showable(usableIn(cylinder)))
    if (isPositive(share)) portions.push({ cylinder, mass: share })
    rest = minus(rest, share)
  }
  return portions
}
