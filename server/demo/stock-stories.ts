import { addDays, type PlainDate } from '../../shared/dates/plain-date'
import { isPositive, lb, lessThan, minus, plus, ZERO_MASS } from '../../shared/mass/mass'
import type { Actor } from '../actor'
import type { Tx } from '../database'
import { changeCylinder, getCylinder } from '../modules/cylinders/cylinders.service'
import type { Calendar } from './calendar'
import { amountOnScale, readingsOfGiving, readingsOfTaking, weighedAtMost } from './scale'
import type { Seeded } from './seeded'
import { grossOf, roomIn, type Stock, type StockCylinder } from './stock'
import { OPENED } from './stories'
import type { DemoCircuit, Teller, Technician } from './teller'

/** Something that happens on a day of the demo; told oldest first. */
export interface Happening { daysAgo: number; happen: () => Promise<void> }

export interface StockSetting {
  tx: Tx
  teller: Teller
  stock: Stock
  calendar: Calendar
  seeded: Seeded
  officer: Actor
  technicians: Technician[]
  partners: Map<string, string>
  customers: Map<string, string>
  circuits: readonly DemoCircuit[]
}

const SHOP_HOUR = 8
const AFTERNOON = 16
const LADDER_GASES = ['R-410A', 'R-407C', 'R-134a', 'R-404A']

/** What happens to cylinders apart from circuits: stocktakes, transfers, gas sent away, and cylinders in every odd state. */
export function stockHappenings(setting: StockSetting): Happening[] {
  return [
    { daysAgo: OPENED, happen: () => takeStockUp(setting) },
    ...[655, 563, 472, 381, 289, 198, 107, 16].map((daysAgo) => ({ daysAgo, happen: () => stocktake(setting, daysAgo) })),
    ...[610, 545, 420, 371, 265, 180, 94, 45].map((daysAgo, index) => ({ daysAgo, happen: () => fillForTheLadder(setting, daysAgo, LADDER_GASES[index % LADDER_GASES.length] ?? '') })),
    ...[320, 190, 40].map((daysAgo) => ({ daysAgo, happen: () => sendToReclaim(setting, daysAgo) })),
    ...oddOnes(setting),
    { daysAgo: 0, happen: () => fillUpForTheDay(setting) },
  ]
}

/** The book of the store is begun: a cylinder of every refrigerant, weighed as it was found. */
async function takeStockUp({ teller, stock, calendar, seeded, officer, technicians, circuits }: StockSetting): Promise<void> {
  for (const refrigerant of new Set(circuits.map((circuit) => circuit.refrigerant))) {
    const holder = circuits.find((circuit) => circuit.refrigerant === refrigerant)?.technician ?? technicians[0]
    const cylinder = await stock.make(refrigerant, 'service', holder?.actor.personId ?? null)
    const found = weighedAtMost('lb', lb(seeded.between(8, 34).toFixed(2)))
    await teller.post(officer, calendar.workday(OPENED), {
      kind: 'opening-stock', cylinderId: cylinder.id, refrigerant, mass: found, entered: readingsOfTaking('lb', grossOf(cylinder), found), hour: SHOP_HOUR, note: 'Weighed when the ledger was begun',
    })
    cylinder.content = found
  }
}

/** Two cylinders are weighed against the book, and what differs is explained and posted. */
async function stocktake({ teller, stock, calendar, seeded, technicians }: StockSetting, daysAgo: number): Promise<void> {
  const filled = stock.service.filter(({ content, isKept }) => !isKept && lessThan(lb('3'), content))
  for (const index of [0, 1]) {
    const cylinder = filled[seeded.whole(0, filled.length - 1)]
    const technician = technicians[seeded.whole(0, technicians.length - 1)]
    if (!cylinder || !technician) continue
    const found = weighedAtMost('lb', lb(seeded.between(0.05, 0.4).toFixed(2)))
    const isMissing = index === 0 || !lessThan(found, roomIn(cylinder))
    const mass = isMissing ? minus(ZERO_MASS, found) : found
    await teller.post(technician.actor, calendar.workday(daysAgo), {
      kind: 'variance', cylinderId: cylinder.id, refrigerant: cylinder.refrigerant, mass, hour: AFTERNOON, note: isMissing ? 'Stocktake: hose losses' : 'Stocktake: earlier weighings were read low',
    })
    cylinder.content = plus(cylinder.content, mass)
  }
}

/** A small cylinder that can be carried up a ladder is filled from a big one. */
async function fillForTheLadder({ teller, stock, calendar, technicians }: StockSetting, daysAgo: number, refrigerant: string): Promise<void> {
  const on = calendar.workday(daysAgo)
  const technician = technicians[LADDER_GASES.indexOf(refrigerant)]
  const ofIt = stock.service.filter((each) => each.refrigerant === refrigerant && !each.isKept)
  const from = ofIt.find(({ size }) => size !== 'small')
  if (!technician || !from) return
  const small = ofIt.find(({ size }) => size === 'small') ?? await stock.make(refrigerant, 'service', technician.actor.personId, { size: 'small' })
  const mass = weighedAtMost('lb', lb('8'))
  if (lessThan(roomIn(small), mass)) return
  if (lessThan(from.content, mass) && from.usedOn !== on) await stock.fillUp(from, (cylinder, filled) => teller.buy(cylinder, filled, on))
  if (lessThan(from.content, mass)) return
  await teller.post(technician.actor, on, {
    kind: 'transfer', cylinderId: from.id, toCylinderId: small.id, refrigerant, mass, entered: readingsOfGiving('lb', grossOf(from), mass), hour: AFTERNOON, note: 'For the ladder',
  })
  from.content = minus(from.content, mass)
  small.content = plus(small.content, mass)
}

/** What was recovered and goes back to nobody is sent away, but for one cylinder that still waits. */
async function sendToReclaim({ teller, stock, calendar, officer, partners }: StockSetting, daysAgo: number): Promise<void> {
  const full = stock.recovery.filter(({ content, isKept }) => !isKept && isPositive(content))
  for (const cylinder of daysAgo < 100 ? full.slice(1) : full) {
    await teller.post(officer, calendar.workday(daysAgo), {
      kind: 'reclaim', cylinderId: cylinder.id, partnerId: partners.get('reclaimer') ?? null, refrigerant: cylinder.refrigerant, mass: cylinder.content, hour: SHOP_HOUR, note: 'Lot for reclamation',
    })
    cylinder.content = ZERO_MASS
  }
}

/** Cylinders in the states that a store has besides full and empty. */
function oddOnes({ tx, teller, stock, calendar, officer, technicians, partners, customers }: StockSetting): Happening[] {
  const on = (daysAgo: number): PlainDate => calendar.workday(daysAgo)
  const supplierId = partners.get('supplier') ?? null
  const destroyerId = partners.get('destroyer') ?? null
  const holderId = technicians[0]?.actor.personId ?? null
  const made = new Map<string, StockCylinder>()
  const the = (name: string): StockCylinder => {
    const cylinder = made.get(name)
    if (!cylinder) throw new Error(`The cylinder "${name}" was not made yet.`)
    return cylinder
  }
  const move = async (cylinder: StockCylinder, daysAgo: number, kind: 'opening-stock' | 'receipt' | 'return' | 'destruction', pounds: string, note: string): Promise<void> => {
    const mass = lb(pounds)
    const isIn = kind === 'opening-stock' || kind === 'receipt'
    const partnerId = kind === 'destruction' ? destroyerId : kind === 'opening-stock' ? null : supplierId
    await teller.post(officer, on(daysAgo), { kind, cylinderId: cylinder.id, partnerId, refrigerant: cylinder.refrigerant, mass, entered: amountOnScale('lb', mass), hour: SHOP_HOUR, note })
    cylinder.content = isIn ? plus(cylinder.content, mass) : minus(cylinder.content, mass)
  }
  const status = async (cylinder: StockCylinder, to: 'returned' | 'scrapped'): Promise<void> => {
    const { version, id: _id, contentKg: _content, fillLimitKg: _limit, holderName: _holder, ownerCustomerName: _owner, isPastTest: _past, may: _may, ...draft } = await getCylinder(tx, officer, cylinder.id, calendar.today)
    await changeCylinder(tx, officer, cylinder.id, version, { ...draft, status: to }, calendar.today)
  }
  return [
    { daysAgo: OPENED, happen: async () => {
      made.set('disposable', await stock.make('R-134a', 'service', null, { kind: 'disposable', waterCapacityKg: null, testDueOn: null, size: 'small', isKept: true }))
      await move(the('disposable'), OPENED, 'opening-stock', '30', 'Two thirds of a pallet went out before the ledger was begun')
      made.set('mixed', await stock.make('R-404A', 'recovery', null, { contents: 'mixed', isKept: true }))
      await move(the('mixed'), OPENED, 'opening-stock', '28.75', 'Mixed with R-507A, for destruction')
    } },
    { daysAgo: 505, happen: async () => {
      await move(the('disposable'), 505, 'return', '30', 'Wrong delivery, taken back')
      await status(the('disposable'), 'returned')
    } },
    { daysAgo: 460, happen: () => move(the('mixed'), 460, 'destruction', '12', 'First lot') },
    { daysAgo: 402, happen: async () => {
      made.set('scrap', await stock.make('R-404A', 'service', null, { kind: 'disposable', waterCapacityKg: null, testDueOn: null, size: 'small', isKept: true }))
      await move(the('scrap'), 402, 'receipt', '24', 'One cylinder, loose')
    } },
    { daysAgo: 340, happen: async () => {
      const refill = await stock.make('R-448A', 'service', null, { contents: 'reclaimed', isKept: true })
      await move(refill, 340, 'receipt', '30', 'Reclaimed to AHRI 700, certificate in the file')
      made.set('refill', refill)
    } },
    { daysAgo: 310, happen: async () => {
      await move(the('scrap'), 310, 'return', '24', 'Not used, taken back full')
      await status(the('scrap'), 'scrapped')
    } },
    { daysAgo: 155, happen: async () => {
      const mixed = await stock.make('R-407C', 'recovery', technicians[3]?.actor.personId ?? null, { contents: 'mixed', isKept: true })
      await move(mixed, 155, 'opening-stock', '9.5', 'Found in the yard, contents doubtful')
      await move(the('mixed'), 150, 'destruction', '10.5', 'Second lot')
    } },
    { daysAgo: 60, happen: async () => {
      const pastTest = await stock.make('R-22', 'service', null, { testDueOn: addDays(calendar.today, -30), isKept: true })
      await move(pastTest, 60, 'opening-stock', '21.5', 'Found in the old store')
      await move(the('refill'), 58, 'return', '5', 'Share of the lot, taken back')
    } },
    { daysAgo: 20, happen: async () => {
      const nearlyFull = await stock.make('R-410A', 'service', holderId, { isKept: true })
      const mass = weighedAtMost('lb', minus(nearlyFull.limit, lb('0.5')))
      await teller.buy(nearlyFull, mass, on(20))
      for (const refrigerant of ['R-410A', 'R-454B', 'R-407C']) await stock.make(refrigerant, 'recovery', null)
      await stock.make('R-22', 'recovery', holderId, { ownerCustomerId: customers.get('Meridian Row Offices') ?? null })
    } },
  ]
}

/** On the last day the supplier fills what the technician of the demo's account will need. */
async function fillUpForTheDay({ teller, stock, calendar, technicians }: StockSetting): Promise<void> {
  const on = calendar.workday(0)
  const mine = stock.service.filter(({ holderId, isKept, usedOn }) => holderId === technicians[0]?.actor.personId && !isKept && usedOn !== on)
  for (const cylinder of mine.filter(({ content, limit }) => lessThan(plus(content, content), limit))) await stock.fillUp(cylinder, (each, mass) => teller.buy(each, mass, on))
}

