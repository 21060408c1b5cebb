import { addDays, type PlainDate } from '../../shared/dates/plain-date'
import type { Actor } from '../actor'
import { toQuarters, type Stock } from './stock'
import type { Teller } from './teller'

const MORNING = 15 // [h UTC]

/** What happens to cylinders apart from circuits: a stocktake, a transfer, gas sent away, and cylinders in every odd state. */
export async function tellOfStock({ teller, stock, officer, technicians, partners, customers, today }: {
  teller: Teller
  stock: Stock
  officer: Actor
  technicians: Actor[]
  partners: Map<string, string>
  customers: Map<string, string>
  today: PlainDate
}): Promise<void> {
  const on = (daysAgo: number): PlainDate => addDays(today, -daysAgo)
  const supplierId = partners.get('supplier') ?? null
  const holder = technicians[0]?.personId ?? null

  // what was recovered from the retired circuit goes to the reclaimer, but for one cylinder that still waits
  const full = stock.recovery.filter((each) => each.refrigerant === 'R-22' && each.contentLb > 0)
  for (const cylinder of full.slice(1)) {
    await teller.post(officer, on(2), MORNING, { kind: 'reclaim', cylinderId: cylinder.id, partnerId: partners.get('reclaimer') ?? null, refrigerant: 'R-22', pounds: cylinder.contentLb, note: 'Lot for reclamation' })
    cylinder.contentLb = 0
  }

  // the stocktake finds a quarter pound less than the book in one cylinder, and half a pound more in another
  const [first, second] = stock.service.filter((each) => each.contentLb > 2)
  if (first) await teller.post(technicians[0] ?? officer, on(2), MORNING, { kind: 'variance', cylinderId: first.id, refrigerant: first.refrigerant, pounds: -0.25, note: 'Stocktake: hose losses' })
  if (second) await teller.post(technicians[0] ?? officer, on(2), MORNING, { kind: 'variance', cylinderId: second.id, refrigerant: second.refrigerant, pounds: 0.25, note: 'Stocktake: scale now calibrated' })

  const nearlyFull = await stock.make('R-410A', 'service', holder)
  await teller.post(officer, on(20), MORNING, { kind: 'purchase', cylinderId: nearlyFull.id, partnerId: supplierId, refrigerant: 'R-410A', pounds: toQuarters(nearlyFull.limitLb - 0.5) })
  const small = await stock.make('R-410A', 'service', holder, { isSmall: true })
  await teller.post(technicians[0] ?? officer, on(15), MORNING, { kind: 'transfer', cylinderId: nearlyFull.id, toCylinderId: small.id, refrigerant: 'R-410A', pounds: 8, note: 'For the ladder' })
  const refill = await stock.make('R-448A', 'service', null, { contents: 'reclaimed' })
  await teller.post(officer, on(40), MORNING, { kind: 'receipt', cylinderId: refill.id, partnerId: supplierId, refrigerant: 'R-448A', pounds: 30, note: 'Reclaimed to AHRI 700, certificate in the file' })
  const disposable = await stock.make('R-134a', 'service', null, { kind: 'disposable', waterCapacityKg: null, testDueOn: null, isSmall: true })
  await teller.post(officer, on(90), MORNING, { kind: 'opening-stock', cylinderId: disposable.id, refrigerant: 'R-134a', pounds: 30 })
  await teller.post(officer, on(30), MORNING, { kind: 'return', cylinderId: disposable.id, partnerId: supplierId, refrigerant: 'R-134a', pounds: 10, note: 'Wrong delivery, part returned' })

  const pastTest = await stock.make('R-22', 'service', null, { testDueOn: on(30) })
  await teller.post(officer, on(60), MORNING, { kind: 'opening-stock', cylinderId: pastTest.id, refrigerant: 'R-22', pounds: 21.5, note: 'Found in the old store' })
  const mixed = await stock.make('R-404A', 'recovery', null, { contents: 'mixed' })
  await teller.post(officer, on(200), MORNING, { kind: 'opening-stock', cylinderId: mixed.id, refrigerant: 'R-404A', pounds: 18.75, note: 'Mixed, for destruction' })
  await teller.post(officer, on(45), MORNING, { kind: 'destruction', cylinderId: mixed.id, partnerId: partners.get('destroyer') ?? null, refrigerant: 'R-404A', pounds: 12, note: 'First lot' })
  await stock.make('R-22', 'recovery', holder, { ownerCustomerId: customers.get('Meridian Row Offices') ?? null })
  for (const refrigerant of ['R-410A', 'R-454B', 'R-407C', 'R-134a']) await stock.make(refrigerant, 'recovery', null)
}
