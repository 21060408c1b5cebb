import company from '../../fixtures/demo/company.json'
import { JURISDICTIONS, LEAK_RATE_METHODS, type SystemDraft } from '../../shared/api/places'
import { addDays, addYears, type PlainDate } from '../../shared/dates/plain-date'
import { lb, ZERO_MASS } from '../../shared/mass/mass'
import { CATEGORIES } from '../../shared/rules/categories'
import type { Actor } from '../actor'
import type { Tx } from '../database'
import { createCircuit } from '../modules/circuits/circuits.service'
import { createSite } from '../modules/sites/sites.service'
import { createSystem } from '../modules/systems/systems.service'
import type { Calendar } from './calendar'
import { fullChargeDraft } from './full-charges'
import { oneOf } from './one-of'
import { Seeded } from './seeded'
import { OPENED, storyOf, type Step } from './stories'
import type { DemoCircuit, Technician } from './teller'

/** A circuit as it stands before its story, and what will happen to it. */
export interface ToldCircuit { circuit: DemoCircuit; steps: Step[] }
type Site = (typeof company.sites)[number]
type System = Site['systems'][number]
type Part = System['circuits'][number]

interface Setting {
  tx: Tx
  officer: Actor
  customers: Map<string, string>
  technicians: Map<string, Technician>
  calendar: Calendar
  now: Date
}

/** Sites with their systems and circuits, as fixtures/demo/company.json names them. */
export async function makePlaces(setting: Setting): Promise<ToldCircuit[]> {
  const told: ToldCircuit[] = []
  for (const site of company.sites) {
    const { customer, technician: _technician, systems, ...own } = site
    const { id } = await createSite(setting.tx, setting.officer, {
      ...own, customerId: setting.customers.get(customer) ?? '', country: 'US',
      leakRateMethod: oneOf(LEAK_RATE_METHODS, own.leakRateMethod), jurisdiction: oneOf(JURISDICTIONS, own.jurisdiction),
    })
    for (const system of systems) told.push(...await makeSystem(setting, { site, siteId: id, system }))
  }
  return told
}

async function makeSystem(setting: Setting, { site, siteId, system }: { site: Site; siteId: string; system: System }): Promise<ToldCircuit[]> {
  const { tx, officer, calendar, now } = setting
  const { circuits, installedYearsAgo, category: _category, ...own } = system
  const category = oneOf(CATEGORIES, system.category)
  const installedOn = addDays(addYears(calendar.today, -installedYearsAgo), -17 * site.systems.length)
  const { id: systemId } = await createSystem(tx, officer, { ...own, ...decisionOf(system), category, siteId, installedOn }, now)
  const roundsFrom = new Seeded(site.name).whole(0, 27)
  const told: ToldCircuit[] = []
  for (const part of circuits) {
    const steps = withRevisions(part, storyOf(part.story, new Seeded(`${site.name}, ${system.tag}, ${part.name}`), roundsFrom))
    const commissionedOn = commissioningOf(steps, calendar) ?? installedOn
    const { id } = await createCircuit(tx, officer, {
      systemId, name: part.name, refrigerant: part.refrigerant, category, status: 'in-service', commissionedOn,
      fullCharge: fullChargeDraft({ fullChargeLb: part.fullChargeLb, method: part.fullChargeMethod }, commissionedOn),
    }, now)
    told.push({ steps, circuit: {
      id, siteId, timeZone: site.timeZone, refrigerant: part.refrigerant, category, full: lb(String(part.fullChargeLb)), book: ZERO_MASS,
      isRolling: site.leakRateMethod === 'rolling', technician: technicianOf(setting, site), lastAddedOn: commissionedOn, lastAddedBefore: commissionedOn,
      lastPostings: [], ownGas: [], leaks: new Map(), components: new Map(),
    } })
  }
  return told
}

function technicianOf({ technicians }: Setting, site: Site): Technician {
  const technician = technicians.get(site.technician)
  if (!technician) throw new Error(`The demo has no technician "${site.technician}".`)
  return technician
}

function decisionOf(system: System): Pick<SystemDraft, 'subsectorDecision' | 'subsectorDecidedBy' | 'subsectorReason'> {
  if (!('subsectorDecision' in system)) return { subsectorDecision: null, subsectorDecidedBy: null, subsectorReason: null }
  const { subsectorDecision, subsectorDecidedBy, subsectorReason } = system
  return { subsectorDecision: oneOf(['excepted', 'not-excepted'] as const, subsectorDecision ?? ''), subsectorDecidedBy: subsectorDecidedBy ?? null, subsectorReason: subsectorReason ?? null }
}

/** The day on which a story that begins after the ledger filled a new circuit; null where it was there before. */
function commissioningOf(steps: readonly Step[], calendar: Calendar): PlainDate | null {
  const first = steps[0]
  return first && first.daysAgo < OPENED ? calendar.workday(first.daysAgo) : null
}

function withRevisions(part: Part, steps: Step[]): Step[] {
  const revisions = 'revisions' in part ? (part.revisions ?? []) : []
  return [...steps, ...revisions.map((revision): Step => ({ do: 'revise', ...revision }))].sort((a, b) => b.daysAgo - a.daysAgo)
}
