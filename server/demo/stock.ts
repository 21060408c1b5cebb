import { v7 as uuid } from 'uuid'
import type { CylinderDraft } from '../../shared/api/cylinders'
import { addDays, addYears, type PlainDate } from '../../shared/dates/plain-date'
import { fillLimitOf } from '../../shared/field/fill-limit'
import { lb, toKgText } from '../../shared/mass/mass'
import { LB_KG } from '../../shared/mass/mass'
import type { Tx } from '../database'
import type { Actor } from '../actor'
import { createCylinder } from '../modules/cylinders/cylinders.service'

const STEP = 4 // quarters of a pound: fine enough, and exact in pounds and in ounces
export const toQuarters = (pounds: number): number => Math.max(1, Math.round(pounds * STEP)) / STEP
const LARGE = { tare: '28.25', capacity: '47.5' } // [lb] stamped on a 50 lb cylinder
const SMALL = { tare: '17.5', capacity: '26.25' } // [lb] stamped on a 30 lb cylinder

/** A demo cylinder as the loader keeps it in mind while it tells the stories. */
export interface StockCylinder {
  id: string
  number: string
  refrigerant: string
  tareLb: number
  contentLb: number
  limitLb: number
}

export class Stock {
  readonly service: StockCylinder[] = []
  readonly recovery: StockCylinder[] = []
  private count = 0

  constructor(private readonly tx: Tx, private readonly officer: Actor, private readonly today: PlainDate) {}

  /** An empty cylinder; service cylinders are refilled by the supplier, recovery cylinders by us. */
  async make(refrigerant: string, as: 'service' | 'recovery', holderId: string | null, given: Partial<CylinderDraft> & { isSmall?: boolean } = {}): Promise<StockCylinder> {
    const { isSmall = false, ...draft } = given
    const stamp = isSmall ? SMALL : LARGE
    const number = `${as === 'service' ? 'S' : 'V'}-${String(1001 + this.count * 7)}`
    this.count += 1
    const id = uuid()
    await createCylinder(this.tx, this.officer, {
      number, kind: as === 'service' ? 'refillable' : 'recovery', refrigerant, contents: as === 'service' ? 'virgin' : 'recovered',
      tareKg: toKgText(lb(stamp.tare)), waterCapacityKg: toKgText(lb(stamp.capacity)),
      testDueOn: addDays(addYears(this.today, 2 + (this.count % 3)), this.count * 5), status: 'in-use', holderId, place: holderId ? null : 'Store, rack 2', ownerCustomerId: null, ...draft,
    }, this.today, id)
    const limit = fillLimitOf(lb(stamp.capacity), refrigerant)
    const cylinder = { id, number, refrigerant, tareLb: Number(stamp.tare), contentLb: 0, limitLb: limit ? Math.floor(limit.dividedBy(LB_KG).toNumber() * STEP) / STEP : 0 }
    this[as].push(cylinder)
    return cylinder
  }
}
