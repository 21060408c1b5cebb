import { v7 as uuid } from 'uuid'
import type { PostingDraft } from '../../shared/api/ledger'
import { daysBetween, type PlainDate } from '../../shared/dates/plain-date'
import { instantOfLocal } from '../../shared/dates/local-instant'
import { isPositive, larger, lb, minus, plus, scaled, smaller, toKgText, ZERO_MASS, type Mass } from '../../shared/mass/mass'
import type { Category } from '../../shared/rules/categories'
import type { Actor } from '../actor'
import type { Tx } from '../database'
import { changeCircuit, getCircuit, reviseFullCharge } from '../modules/circuits/circuits.service'
import { addComponent, addLeak, addMark, addVerification, repairLeak } from '../modules/circuits/parts.service'
import * as ledger from '../modules/ledger/ledger.service'
import { createVisit } from '../modules/visits/visits.service'
import type { Calendar } from './calendar'
import { fullChargeDraft } from './full-charges'
import { readingsOfGiving, readingsOfTaking, weighed, weighedAtMost, type ScaleUnit } from './scale'
import { grossOf, portionsOf, type Portion, type Stock, type StockCylinder } from './stock'
import type { Step } from './stories'

const THRESHOLD: Record<Category, number> = { 'industrial-process': 0.3, commercial: 0.2, 'comfort-cooling': 0.1, other: 0.1 } // only to choose amounts; the ledger computes its own
const YEAR = 365 // [d]
const LEAST = lb('0.15') // nobody weighs in less
const RESIDUE = lb('1.5') // what a recovery leaves in a circuit as vapour
const RECOVERED = '0.95' // of the fill limit: how far a recovery cylinder is filled
const OFFICE_ZONE = 'America/Chicago'
const [DELIVERY, FIRST_JOB, LATE_MORNING] = [7, 9, 10] // hours of the site's clock
const COMPONENT_KIND: Record<string, 'service-port' | 'joint' | 'evaporator-coil'> = { 'Service port': 'service-port', 'Liquid line joint': 'joint', 'Evaporator coil': 'evaporator-coil' }

export interface Technician { actor: Actor; scale: ScaleUnit }

/** A demo circuit while its story is told. */
export interface DemoCircuit {
  id: string
  siteId: string
  timeZone: string
  refrigerant: string
  category: Category
  full: Mass
  book: Mass
  isRolling: boolean
  technician: Technician
  lastAddedOn: PlainDate
  lastAddedBefore: PlainDate
  /** The latest charge: a posting per cylinder that it took, with what came out of it. */
  lastPostings: (Portion & { id: string })[]
  /** Cylinders with gas recovered from this circuit that waits to go back. */
  ownGas: StockCylinder[]
  leaks: Map<string, string>
  components: Map<string, string>
}

type Charge = Extract<Step, { do: 'charge' }>
type Given = Partial<PostingDraft> & Pick<PostingDraft, 'kind' | 'refrigerant'> & { mass: Mass; circuit?: DemoCircuit; hour: number; remark?: string }

/** Tells the stories of the circuits to the ledger, step by step, through the same services as people do. */
export class Teller {
  private readonly visits = new Map<string, string>()
  count = 0

  constructor(
    private readonly tx: Tx, private readonly officer: Actor, private readonly stock: Stock, private readonly supplierId: string,
    private readonly calendar: Calendar, private readonly now: Date,
  ) {}

  async tell(circuit: DemoCircuit, step: Step): Promise<void> {
    const on = this.calendar.workday(step.daysAgo)
    const { actor } = circuit.technician
    switch (step.do) {
      case 'opening': return this.fill(circuit, on, null)
      case 'installation': return this.fill(circuit, on, 'installation')
      case 'charge': return this.charge(circuit, on, step)
      case 'recover': return this.recover(circuit, on, step)
      case 'lose-all':
        await this.post(actor, on, { kind: 'loss', circuitId: circuit.id, refrigerant: circuit.refrigerant, mass: circuit.book, note: 'Gauges at 0: found flat', circuit, hour: FIRST_JOB, remark: 'Alarm: low pressure, unit down' })
        circuit.book = ZERO_MASS
        return
      case 'reverse-last':
        for (const { id, cylinder, mass } of circuit.lastPostings) {
          await this.post(this.officer, on, { kind: 'reversal', refrigerant: circuit.refrigerant, mass, reversesId: id, reason: step.reason, hour: FIRST_JOB }, circuit.timeZone)
          cylinder.content = plus(cylinder.content, mass)
        }
        circuit.lastAddedOn = circuit.lastAddedBefore
        return
      case 'revise':
        await reviseFullCharge(this.tx, this.officer, circuit.id, fullChargeDraft(step, on, step.note), this.now)
        circuit.full = lb(String(step.fullChargeLb))
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
    const { actor } = circuit.technician
    const leakId = 'leak' in step ? circuit.leaks.get(step.leak) : undefined
    if (step.do === 'leak') {
      const id = uuid()
      await this.visit(circuit, on, 'Leak call')
      circuit.leaks.set(step.leak, id)
      const { cause, method, position } = step
      await addLeak(this.tx, actor, circuit.id, { id, componentId: await this.component(circuit, step.component), foundOn: on, cause, method, position, note: null }, this.now)
    } else if (step.do === 'mark') {
      await addMark(this.tx, actor, circuit.id, { componentId: await this.component(circuit, step.component), text: step.text, markedOn: on }, this.now)
    } else if (!leakId) {
      throw new Error(`The story of ${circuit.id} names a leak that was not found.`)
    } else if (step.do === 'repair') {
      await repairLeak(this.tx, actor, leakId, { repairedOn: on, repair: step.repair }, this.now)
    } else {
      await this.visit(circuit, on, step.kind === 'follow-up' ? 'Follow-up test' : 'Leak call')
      await addVerification(this.tx, actor, circuit.id,
        { id: uuid(), kind: step.kind, leakId, testedOn: on, type: step.type, passed: true, showsAllRepaired: step.showsAll ?? false, note: null }, this.now)
    }
  }

  private async component(circuit: DemoCircuit, name: string): Promise<string> {
    const known = circuit.components.get(name)
    if (known) return known
    const sheet = await addComponent(this.tx, circuit.technician.actor, circuit.id, { kind: COMPONENT_KIND[name] ?? 'condenser-coil', name, position: null }, this.now)
    const id = sheet.components.find((component) => component.name === name)?.id ?? ''
    circuit.components.set(name, id)
    return id
  }

  private async fill(circuit: DemoCircuit, on: PlainDate, purpose: 'installation' | null): Promise<void> {
    await this.post(this.officer, on, { kind: 'opening-charge', circuitId: circuit.id, refrigerant: circuit.refrigerant, mass: circuit.full, purpose, hour: FIRST_JOB }, circuit.timeZone)
    circuit.book = circuit.full
    if (purpose) circuit.lastAddedOn = on
  }

  private async charge(circuit: DemoCircuit, on: PlainDate, step: Charge): Promise<void> {
    const { actor, scale } = circuit.technician
    const mass = weighed(scale, step.pounds === undefined ? allowedOn(circuit, on, step.share ?? 0) : lb(String(step.pounds)))
    const cylinders = step.isOwnGas ? circuit.ownGas
      : await this.stock.gather({ refrigerant: circuit.refrigerant, mass, holderId: actor.personId, on }, (cylinder, filled) => this.buy(cylinder, filled, on, circuit.timeZone))
    const portions = portionsOf(cylinders, mass, (content) => weighedAtMost(scale, content))
    const hour = step.hour ?? LATE_MORNING + this.count % 5
    circuit.lastPostings = []
    for (const [index, portion] of portions.entries()) {
      const { cylinder, mass: taken } = portion
      const isLast = index === portions.length - 1
      const id = await this.post(actor, on, {
        kind: 'charge', circuitId: circuit.id, cylinderId: cylinder.id, refrigerant: circuit.refrigerant, mass: taken, purpose: step.purpose ?? 'leak',
        leakId: step.leak ? (circuit.leaks.get(step.leak) ?? null) : null, isComplete: isLast && step.isComplete !== false,
        entered: readingsOfGiving(scale, grossOf(cylinder), taken), ...wordsOf(step), circuit, hour: hour + index,
      })
      cylinder.content = minus(cylinder.content, taken)
      cylinder.usedOn = on
      circuit.lastPostings.push({ ...portion, id })
    }
    circuit.book = circuit.full
    circuit.lastAddedBefore = circuit.lastAddedOn
    circuit.lastAddedOn = on
  }

  private async recover(circuit: DemoCircuit, on: PlainDate, step: Extract<Step, { do: 'recover' }>): Promise<void> {
    const { actor, scale } = circuit.technician
    let left = weighed(scale, step.pounds === undefined ? minus(circuit.book, RESIDUE) : lb(String(step.pounds)))
    for (let hour = FIRST_JOB; isPositive(left); hour += 1) {
      const cylinder = await this.stock.emptyFor(circuit.refrigerant, left, actor.personId)
      const taken = smaller(left, weighedAtMost(scale, scaled(cylinder.limit, RECOVERED)))
      left = minus(left, taken)
      await this.post(actor, on, {
        kind: 'recovery', circuitId: circuit.id, cylinderId: cylinder.id, refrigerant: circuit.refrigerant, mass: taken, purpose: step.purpose, hour,
        isComplete: !isPositive(left) && step.isComplete === true, entered: readingsOfTaking(scale, grossOf(cylinder), taken), part: 'Circuit', workDone: 'Refrigerant recovered', circuit,
        remark: RECOVERY_REMARK[step.purpose],
      })
      cylinder.content = plus(cylinder.content, taken)
      cylinder.isKept = step.isKept === true
      if (cylinder.isKept) circuit.ownGas.push(cylinder)
      circuit.book = minus(circuit.book, taken)
    }
    if (step.isComplete) circuit.book = ZERO_MASS
  }

  /** The supplier fills a cylinder in the morning. */
  async buy(cylinder: StockCylinder, mass: Mass, on: PlainDate, timeZone = OFFICE_ZONE): Promise<void> {
    await this.post(this.officer, on, {
      kind: 'purchase', cylinderId: cylinder.id, partnerId: this.supplierId, refrigerant: cylinder.refrigerant, mass, entered: readingsOfTaking('lb', grossOf(cylinder), mass), hour: DELIVERY,
    }, timeZone)
    cylinder.content = plus(cylinder.content, mass)
  }

  /** Posts for a person; what concerns a circuit belongs to a visit of that day. @returns the id of the posting */
  async post(who: Actor, on: PlainDate, given: Given, timeZone = given.circuit?.timeZone ?? OFFICE_ZONE): Promise<string> {
    const { mass, circuit, hour, remark, ...rest } = given
    const id = uuid()
    const time = `${String(hour).padStart(2, '0')}:${String((this.count * 7) % 60).padStart(2, '0')}`
    const planned = instantOfLocal({ date: on, time, timeZone })
    const occurredAt = Date.parse(planned) < this.now.getTime() ? planned : this.now.toISOString() // loaded before the hour struck
    await ledger.post(this.tx, who, {
      id, occurredOn: on, occurredAt, massKg: toKgText(mass), entered: null,
      cylinderId: null, toCylinderId: null, circuitId: null, partnerId: null, visitId: circuit ? await this.visit(circuit, on, remark ?? null) : null, leakId: null, purpose: null, isComplete: true,
      part: null, workDone: null, note: null, reversesId: null, reason: null, ...rest,
    }, this.now)
    this.count += 1
    return id
  }

  async visit(circuit: Pick<DemoCircuit, 'siteId' | 'technician'>, on: PlainDate, remark: string | null): Promise<string> {
    const { actor } = circuit.technician
    const key = `${circuit.siteId} ${actor.personId} ${on}`
    const known = this.visits.get(key)
    if (known) return known
    const id = uuid()
    await createVisit(this.tx, actor, { id, siteId: circuit.siteId, visitedOn: on, remark })
    this.visits.set(key, id)
    return id
  }
}

/** What would be exactly at the threshold on a day, times the share that the story tells; not less than anyone would weigh in. */
function allowedOn(circuit: DemoCircuit, on: PlainDate, share: number): Mass {
  const days = circuit.isRolling ? YEAR : Math.min(YEAR, Math.max(1, daysBetween(circuit.lastAddedOn, on)))
  return larger(LEAST, scaled(circuit.full, (THRESHOLD[circuit.category] * share * days / YEAR).toFixed(6)))
}

const PART_OF_LEAK: Record<string, string> = { coil: 'Condenser coil', evaporator: 'Evaporator coil', flare: 'Liquid line', core: 'Service port' }
const RECOVERY_REMARK = { repair: 'Circuit opened for a repair', seasonal: 'Change of season', retirement: 'Unit taken out of service', retrofit: 'Change of refrigerant' }

function wordsOf(step: Charge): { part: string; workDone: string; remark: string } {
  const part = PART_OF_LEAK[step.leak ?? ''] ?? 'Circuit'
  if (step.purpose === 'seasonal') return { part, workDone: 'Charge for the season', remark: 'Change of season' }
  if (step.purpose === 'retrofit') return { part, workDone: 'Filled with the new refrigerant', remark: 'Change of refrigerant' }
  return step.leak
    ? { part, workDone: 'Leak repaired, charge weighed in', remark: 'Leak call' }
    : { part, workDone: 'Charge weighed in', remark: 'Regular maintenance' }
}

