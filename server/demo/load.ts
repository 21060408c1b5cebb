import company from '../../fixtures/demo/company.json'
import { PARTNER_KINDS } from '../../shared/api/cylinders'
import { localDateOf } from '../../shared/dates/plain-date'
import type { Actor } from '../actor'
import type { Database, Tx } from '../database'
import { createCustomer } from '../modules/customers/customers.service'
import { sealCompany } from '../modules/ledger/seal.service'
import { createPartner } from '../modules/partners/partners.service'
import { createCompany } from '../modules/people/companies'
import { Calendar } from './calendar'
import { oneOf } from './one-of'
import { closeFounder, DEMO_COMPANY_ID, makePeople, openFounder } from './people'
import { makePlaces } from './places'
import type { ScaleUnit } from './scale'
import { Seeded } from './seeded'
import { stockHappenings, type Happening } from './stock-stories'
import { Stock } from './stock'
import { Teller, type Technician } from './teller'

export { DEMO_COMPANY_ID } from './people'

/** The westernmost zone of the demo's sites: what is today there lies in nobody's future. */
const LAST_ZONE = 'America/Los_Angeles'
const SCALE_UNITS: readonly ScaleUnit[] = ['lb-oz', 'lb', 'kg']

/**
 * Loads the invented demo company, whole or not at all: two years of work that end today.
 *
 * @returns how many postings were made; null where the company is there already
 */
export async function loadDemo(database: Database, now: Date): Promise<number | null> {
  const scope = { companyId: DEMO_COMPANY_ID, customerIds: null }
  await createCompany(database, { id: DEMO_COMPANY_ID, name: company.company, isDemo: true })
  const count = await database.inCompany(scope, async (tx) => {
    const [known] = await tx.query('select count(*)::int as people from person where company_id = $1', [DEMO_COMPANY_ID]) as { people: number }[]
    return known && known.people > 0 ? null : tellAll(tx, now)
  })
  if (count !== null) while ((await database.inCompany(scope, (tx) => sealCompany(tx, DEMO_COMPANY_ID))) > 0);
  return count
}

async function tellAll(tx: Tx, now: Date): Promise<number> {
  const calendar = new Calendar(localDateOf(now.toISOString(), LAST_ZONE))
  const founder = await openFounder(tx)
  const customers = new Map<string, string>()
  for (const customer of company.customers) customers.set(customer.name, (await createCustomer(tx, founder, { note: null, ...customer })).id)
  const people = await makePeople(tx, founder, customers)
  await closeFounder(tx, founder)
  const officer = people.find(({ role }) => role === 'officer') ?? founder
  const technicians = techniciansOf(people)
  const partners = new Map<string, string>()
  for (const partner of company.partners) partners.set(partner.kind, (await createPartner(tx, officer, { ...partner, kind: oneOf(PARTNER_KINDS, partner.kind) })).id)

  const told = await makePlaces({ tx, officer, customers, technicians, calendar, now })
  const stock = new Stock(tx, officer, calendar.today)
  const teller = new Teller(tx, officer, stock, partners.get('supplier') ?? '', calendar, now)
  const happenings: Happening[] = [
    ...stockHappenings({
      tx, teller, stock, calendar, officer, partners, customers, seeded: new Seeded('store'), technicians: [...technicians.values()], circuits: told.map(({ circuit }) => circuit),
    }),
    ...told.flatMap(({ circuit, steps }) => steps.map((step): Happening => ({ daysAgo: step.daysAgo, happen: () => teller.tell(circuit, step) }))),
  ]
  for (const { happen } of happenings.sort((a, b) => b.daysAgo - a.daysAgo)) await happen()
  return teller.count
}

/** Each with the unit of the scale at hand; who is in the accounts' file weighs in pounds and ounces. */
function techniciansOf(people: readonly Actor[]): Map<string, Technician> {
  const units = new Map(company.technicians.map(({ name, massUnit }) => [name, oneOf(SCALE_UNITS, massUnit)]))
  return new Map(people.filter(({ role }) => role === 'technician').map((actor) => [actor.name, { actor, scale: units.get(actor.name) ?? 'lb-oz' }]))
}
