import { v7 as uuid } from 'uuid'
import accounts from '../../fixtures/demo/accounts.json'
import company from '../../fixtures/demo/company.json'
import type { Role } from '../../shared/access/roles'
import type { MassUnit } from '../../shared/api/ledger'
import type { FullChargeDraft, SiteDraft, SystemDraft } from '../../shared/api/places'
import type { PersonDraft } from '../../shared/api/people'
import { addDays, addYears, localDateOf, type PlainDate } from '../../shared/dates/plain-date'
import { lb, toKgText } from '../../shared/mass/mass'
import type { Category } from '../../shared/rules/categories'
import type { Actor } from '../actor'
import type { Database, Tx } from '../database'
import { createCircuit } from '../modules/circuits/circuits.service'
import { createCustomer } from '../modules/customers/customers.service'
import { sealCompany } from '../modules/ledger/seal.service'
import { createPartner } from '../modules/partners/partners.service'
import { createCompany } from '../modules/people/companies'
import { createPerson } from '../modules/people/people.service'
import { hashPassword } from '../modules/session/passwords'
import { createSite } from '../modules/sites/sites.service'
import { createSystem } from '../modules/systems/systems.service'
import { tellOfStock } from './stock-stories'
import { Stock } from './stock'
import { STORIES } from './stories'
import { Teller, type DemoCircuit } from './teller'

/** The demo company has a fixed id, so that it is loaded once. */
export const DEMO_COMPANY_ID = '00000000-0000-7000-8000-00000000d3f0'
const UNITS: readonly MassUnit[] = ['lb-oz', 'lb', 'lb']

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
  const today = localDateOf(now.toISOString(), 'America/Los_Angeles') // the westernmost site: nothing lies in anyone's future
  const founder: Actor = { ...actorBase, personId: uuid(), name: 'Demo', email: '', role: 'administrator' }
  await tx.query(`insert into person (company_id, id, email, name, role, preferences) values ($1, $2, 'demo@weighback.example', 'Demo set-up', 'administrator', '{"massUnit":"lb","pressureUnit":"psig","temperatureUnit":"F","theme":"system","locale":"en"}')`,
    [DEMO_COMPANY_ID, founder.personId])
  const customers = new Map<string, string>()
  for (const customer of company.customers) customers.set(customer.name, (await createCustomer(tx, founder, { note: null, ...customer })).id)
  const people = await makePeople(tx, founder, customers)
  await tx.query('update person set disabled_at = now() where company_id = $1 and id = $2', [DEMO_COMPANY_ID, founder.personId])
  const officer = people.find(({ role }) => role === 'officer') ?? founder
  const technicians = people.filter(({ role }) => role === 'technician')
  const partners = new Map<string, string>()
  for (const partner of company.partners) partners.set(partner.kind, (await createPartner(tx, officer, { ...partner, kind: partner.kind as 'supplier' })).id)

  const circuits = await makePlaces(tx, officer, { customers, technicians, today, now })
  const stock = new Stock(tx, officer, today)
  const teller = new Teller(tx, officer, stock, partners.get('supplier') ?? '', today, now)
  const steps = circuits.flatMap(({ circuit, story }) => (STORIES[story] ?? []).map((step, order) => ({ circuit, step, order })))
  steps.sort((a, b) => b.step.daysAgo - a.step.daysAgo || a.order - b.order)
  for (const { circuit, step } of steps) await teller.tell(circuit, step)
  await tellOfStock({ teller, stock, officer, technicians, partners, customers, today })
  return teller.count
}

const actorBase = { companyId: DEMO_COMPANY_ID, customerIds: null, sessionId: '', locale: 'en' }

async function makePeople(tx: Tx, founder: Actor, customers: Map<string, string>): Promise<Actor[]> {
  const people: Actor[] = []
  const add = async (person: { name: string; email: string; role: Role; certificateNumber?: string; certificateType?: string; password?: string }): Promise<void> => {
    const customerIds = person.role === 'owner' ? [customers.get('Larkmoor Provisions') ?? ''] : []
    const isTechnician = person.role === 'technician'
    const { id } = await createPerson(tx, founder, {
      name: person.name, email: person.email, role: person.role, customerIds,
      certificateNumber: person.certificateNumber ?? (isTechnician ? 'TC-30215' : null),
      certificateType: (person.certificateType ?? (isTechnician ? 'Universal' : null)) as PersonDraft['certificateType'],
    })
    const hash = await hashPassword(person.password ?? uuid())
    await tx.query('update person set password_hash = $3 where company_id = $1 and id = $2', [DEMO_COMPANY_ID, id, hash])
    people.push({ ...actorBase, personId: id, name: person.name, email: person.email, role: person.role })
  }
  for (const account of accounts) await add({ ...account, role: account.role as Role })
  for (const technician of company.technicians) await add({ ...technician, role: 'technician' })
  return people
}

interface Setting { customers: Map<string, string>; technicians: Actor[]; today: PlainDate; now: Date }

async function makePlaces(tx: Tx, officer: Actor, { customers, technicians, today, now }: Setting): Promise<{ circuit: DemoCircuit; story: string }[]> {
  const circuits: { circuit: DemoCircuit; story: string }[] = []
  for (const [index, { customer, systems, key: _key, ...site }] of company.sites.entries()) {
    const customerId = customers.get(customer) ?? ''
    const { id: siteId } = await createSite(tx, officer, { ...site, customerId, country: 'US' } as SiteDraft)
    const technician = technicians[index % technicians.length] ?? officer
    for (const { circuits: parts, installedYearsAgo, ...system } of systems) {
      const installedOn = addDays(addYears(today, -installedYearsAgo), -17 * systems.length)
      const draft = { subsectorDecision: null, subsectorDecidedBy: null, subsectorReason: null, ...system, siteId, installedOn } as SystemDraft
      const { id: systemId } = await createSystem(tx, officer, draft, now)
      for (const part of parts) {
        const commissionedOn = part.story === 'installed' ? addDays(today, -392) : installedOn
        const category = system.category as Category
        const { id } = await createCircuit(tx, officer, {
          systemId, name: part.name, refrigerant: part.refrigerant, category, status: 'in-service', commissionedOn, fullCharge: fullChargeOf(part, commissionedOn),
        }, now)
        circuits.push({ story: part.story, circuit: {
          id, siteId, customerId, refrigerant: part.refrigerant, category, fullChargeLb: part.fullChargeLb, isRolling: site.leakRateMethod === 'rolling', commissionedOn, technician,
          unit: UNITS[index % UNITS.length] ?? 'lb', bookLb: 0, lastAddedOn: commissionedOn, lastAddedBefore: commissionedOn, lastPostings: [], leaks: new Map(), components: new Map(),
        } })
      }
    }
  }
  return circuits
}

function fullChargeOf(part: { fullChargeLb: number; fullChargeMethod: string }, effectiveOn: PlainDate): FullChargeDraft {
  const pounds = (value: number): string => toKgText(lb(String(value)))
  const plain = { effectiveOn, note: null, rangeLowKg: null, rangeHighKg: null }
  switch (part.fullChargeMethod) {
    case 'range': return { ...plain, method: 'range', massKg: null, rangeLowKg: pounds(part.fullChargeLb - 4), rangeHighKg: pounds(part.fullChargeLb + 4) }
    case 'measured': return { ...plain, method: 'measured', massKg: pounds(part.fullChargeLb), note: 'Weighed out and in again' }
    case 'calculated': return { ...plain, method: 'calculated', massKg: pounds(part.fullChargeLb), note: 'From line lengths and component figures' }
    default: return { ...plain, method: 'manufacturer', massKg: pounds(part.fullChargeLb), note: 'Name plate' }
  }
}
