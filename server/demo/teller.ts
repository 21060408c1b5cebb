import { v7 as uuid } from 'uuid'
import type { EnteredWeighing, MassUnit, PostingDraft } from '../../shared/api/ledger'
import type { Category } from '../../shared/rules/categories'
import { addDays, daysBetween, type PlainDate } from '../../shared/dates/plain-date'
import { lb, toKgText } from '../../shared/mass/mass'
import type { Actor } from '../actor'
import type { Tx } from '../database'
import { addComponent, addLeak, addMark, addVerification, repairLeak } from '../modules/circuits/parts.service'
import { changeCircuit, getCircuit } from '../modules/circuits/circuits.service'
import * as ledger from '../modules/ledger/ledger.service'
import { createVisit } from '../modules/visits/visits.service'
import { toQuarters, type Stock, type StockCylinder } from './stock'
import type { Step } from './stories'

const THRESHOLD: Record<Category, number> = { 'industrial-process': 0.3, commercial: 0.2, 'comfort-cooling': 0.1, other: 0.1 } // only to choose amounts; the ledger computes its own
const MORNING = 14 // [h UTC] working hours everywhere in the United States
const NOON = 18
const COMPONENT_KIND: Record<string, 'service-port' | 'joint' | 'condenser-coil'> = { 'Service port': 'service-port', 'Liquid line joint': 'joint' }

/** A demo circuit while its story is told. */
export interface DemoCircuit {
  id: string
  siteId: string
  customerId: string
  refrigerant: string
  category: Category
  fullChargeLb: number
  isRolling: boolean
  commissionedOn: PlainDate
  technician: Actor
  unit: MassUnit
  bookLb: number
  lastAddedOn: PlainDate
  /** The postings of the latest charge: one per cylinder that it took, with what came out of it. */
  lastPostings: { id: string; cylinder: StockCylinder; pounds: number }[]
  lastAddedBefore: PlainDate
  leaks: Map<string, string>
  components: Map<string, string>
}

/** Tells the stories of the circuits to the ledger, step by step, through the same services as people do. */
export class Teller {
  private readonly visits = new Map<string, string>()
  count = 0

  constructor(
    private readonly tx: Tx, private readonly officer: Actor, private readonly stock: Stock, private readonly supplierId: string,
    private readonly today: PlainDate, private readonly now: Date,
  ) {}

  async tell(circuit: DemoCircuit, step: Step): Promise<void> {
    const on = addDays(this.today, -step.daysAgo)
    switch (step.do) {
      case 'opening': return this.fill(circuit, on, null)
      case 'installation': return this.fill(circuit, on, 'installation')
      case 'charge': return this.charge(circuit, on, step)
      case 'recover': return this.recover(circuit, on, step)
      case 'lose-all':
        await this.post(circuit.technician, on, NOON - 2, { kind: 'loss', circuitId: circuit.id, refrigerant: circuit.refrigerant, pounds: circuit.bookLb, note: 'Gauges at 0: found flat', circuit })
        circuit.bookLb = 0
        return
      case 'reverse-last':
        for (const { id, cylinder, pounds } of circuit.lastPostings) {
          await this.post(this.officer, on, MORNING, { kind: 'reversal', refrigerant: circuit.refrigerant, pounds, reversesId: id, reason: step.reason })
          cylinder.contentLb += pounds
        }
        circuit.lastAddedOn = circuit.lastAddedBefore
        return
      case 'status': {
        const { version, systemId, name, refrigerant, category, commissionedOn } = await getCircuit(this.tx, this.officer, circuit.id, this.now)
        await changeCircuit(this.tx, this.officer, circuit.id, version, { systemId, name, refrigerant, category, commissionedOn, status: step.status }, this.now)
        return
      }
      default: return this.note(circuit, on, step)
    }
  }

  private async note(circuit: DemoCircuit, on: PlainDate, step: Extract<Step, { do: 'leak' | 'repair' | 'verify' | 'mark' }>): Promise<void> {
    const leakId = 'leak' in step ? circuit.leaks.get(step.leak) : undefined
    if (step.do === 'leak') {
      const id = uuid()
      circuit.leaks.set(step.leak, id)
      const { cause, method, position } = step
      await addLeak(this.tx, circuit.technician, circuit.id, { id, componentId: await this.component(circuit, step.component), foundOn: on, cause, method, position, note: null }, this.now)
    } else if (step.do === 'mark') {
      await addMark(this.tx, circuit.technician, circuit.id, { componentId: await this.component(circuit, step.component), text: step.text, markedOn: on }, this.now)
    } else if (!leakId) {
      throw new Error(`The story of ${circuit.id} names a leak that was not found.`)
    } else if (step.do === 'repair') {
      await repairLeak(this.tx, circuit.technician, leakId, { repairedOn: on, repair: step.repair }, this.now)
    } else {
      await addVerification(this.tx, circuit.technician, circuit.id,
        { id: uuid(), kind: step.kind, leakId, testedOn: on, type: step.type, passed: true, showsAllRepaired: step.showsAll ?? false, note: null }, this.now)
    }
  }

  private async component(circuit: DemoCircuit, name: string): Promise<string> {
    const known = circuit.components.get(name)
    if (known) return known
    const sheet = await addComponent(this.tx, circuit.technician, circuit.id, { kind: COMPONENT_KIND[name] ?? 'condenser-coil', name, position: null }, this.now)
    const id = sheet.components.find((component) => component.name === name)?.id ?? ''
    circuit.components.set(name, id)
    return id
  }

  private async fill(circuit: DemoCircuit, on: PlainDate, purpose: 'installation' | null): Promise<void> {
    await this.post(this.officer, on, MORNING, { kind: 'opening-charge', circuitId: circuit.id, refrigerant: circuit.refrigerant, pounds: circuit.fullChargeLb, purpose })
    circuit.bookLb = circuit.fullChargeLb
    if (purpose) circuit.lastAddedOn = on
  }

  private async charge(circuit: DemoCircuit, on: PlainDate, step: Extract<Step, { do: 'charge' }>): Promise<void> {
    const days = circuit.isRolling ? 365 : Math.min(365, Math.max(1, daysBetween(circuit.lastAddedOn, on)))
    const allowed = THRESHOLD[circuit.category] * circuit.fullChargeLb * days / 365
    let left = toQuarters(step.pounds ?? allowed * (step.share ?? 0))
    circuit.lastPostings = []
    while (left > 0) {
      const cylinder = await this.filledCylinder(circuit, on, step.isOfOneCylinder ? left : 0)
      const taken = Math.min(left, cylinder.contentLb)
      left -= taken
      const id = await this.post(circuit.technician, on, step.hour ?? NOON, {
        kind: 'charge', circuitId: circuit.id, cylinderId: cylinder.id, refrigerant: circuit.refrigerant, pounds: taken, purpose: step.purpose ?? 'leak',
        leakId: step.leak ? (circuit.leaks.get(step.leak) ?? null) : null, isComplete: left === 0 && step.isComplete !== false,
        entered: weighing(circuit.unit, cylinder.tareLb + cylinder.contentLb, taken), part: step.leak === 'coil' ? 'Condenser coil' : 'Circuit',
        workDone: step.purpose === 'seasonal' ? 'Charge for the season' : 'Charge weighed in', circuit,
      })
      cylinder.contentLb -= taken
      circuit.lastPostings.push({ id, cylinder, pounds: taken })
    }
    circuit.bookLb = circuit.fullChargeLb
    circuit.lastAddedBefore = circuit.lastAddedOn
    circuit.lastAddedOn = on
  }

  private async recover(circuit: DemoCircuit, on: PlainDate, step: Extract<Step, { do: 'recover' }>): Promise<void> {
    let left = toQuarters(step.pounds ?? circuit.bookLb - 1.5)
    while (left > 0) {
      const cylinder = this.stock.recovery.find((each) => each.refrigerant === circuit.refrigerant && each.contentLb === 0)
        ?? await this.stock.make(circuit.refrigerant, 'recovery', circuit.technician.personId)
      const taken = Math.min(left, cylinder.limitLb)
      left -= taken
      await this.post(circuit.technician, on, NOON - 2, {
        kind: 'recovery', circuitId: circuit.id, cylinderId: cylinder.id, refrigerant: circuit.refrigerant, pounds: taken, purpose: step.purpose,
        isComplete: left === 0 && step.isComplete === true, entered: weighing(circuit.unit, cylinder.tareLb, -taken), part: 'Circuit', workDone: 'Refrigerant recovered', circuit,
      })
      cylinder.contentLb += taken
      circuit.bookLb -= taken
    }
    if (step.isComplete) circuit.bookLb = 0
  }

  /** A cylinder with gas of the circuit's refrigerant, some pounds at least: one that is at hand, else one that the supplier fills that morning. */
  private async filledCylinder({ refrigerant, technician }: DemoCircuit, on: PlainDate, leastLb: number): Promise<StockCylinder> {
    const ofIt = this.stock.service.filter((each) => each.refrigerant === refrigerant)
    const filled = ofIt.find((each) => each.contentLb > 0 && each.contentLb >= leastLb)
    if (filled) return filled
    const cylinder = ofIt.find((each) => each.contentLb === 0) ?? await this.stock.make(refrigerant, 'service', technician.personId)
    const pounds = toQuarters(cylinder.limitLb * 0.9)
    await this.post(this.officer, on, MORNING, { kind: 'purchase', cylinderId: cylinder.id, partnerId: this.supplierId, refrigerant, pounds, entered: weighing('lb', cylinder.tareLb, -pounds) })
    cylinder.contentLb = pounds
    return cylinder
  }

  /** Posts in pounds; what concerns a circuit belongs to a visit of that day. @returns the id of the posting */
  async post(who: Actor, on: PlainDate, hour: number, given: Partial<PostingDraft> & Pick<PostingDraft, 'kind' | 'refrigerant'> & { pounds: number; circuit?: DemoCircuit }): Promise<string> {
    const { pounds, circuit, ...rest } = given
    const minute = (this.count * 7) % 60
    const id = uuid()
    await ledger.post(this.tx, who, {
      id, occurredOn: on, occurredAt: `${on}T${String(hour).padStart(2, '0')}:${String(minute).padStart(2, '0')}:00.000Z`, massKg: toKgText(lb(String(pounds))), entered: null,
      cylinderId: null, toCylinderId: null, circuitId: null, partnerId: null, visitId: circuit ? await this.visit(circuit, on) : null, leakId: null, purpose: null, isComplete: true,
      part: null, workDone: null, note: null, reversesId: null, reason: null, ...rest,
    }, this.now)
    this.count += 1
    return id
  }

  private async visit(circuit: DemoCircuit, on: PlainDate): Promise<string> {
    const key = `${circuit.siteId} ${circuit.technician.personId} ${on}`
    const known = this.visits.get(key)
    if (known) return known
    const id = uuid()
    await createVisit(this.tx, circuit.technician, { id, siteId: circuit.siteId, visitedOn: on, remark: null })
    this.visits.set(key, id)
    return id
  }
}

/** The readings of a scale under a cylinder that gives (or, below zero, takes) some pounds. */
function weighing(unit: MassUnit, grossLb: number, takenLb: number): EnteredWeighing {
  return { unit, before: reading(unit, grossLb), after: reading(unit, grossLb - takenLb), amount: null }
}

function reading(unit: MassUnit, pounds: number): string {
  if (unit !== 'lb-oz') return pounds.toFixed(2)
  const whole = Math.floor(pounds)
  return `${whole}-${(pounds - whole) * 16}`
}
