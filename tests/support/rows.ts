import { v7 as uuid } from 'uuid'
import type { CYLINDER_CONTENTS, CYLINDER_KINDS } from '../../shared/api/cylinders'
import { lb, toKgText } from '../../shared/mass/mass'
import type { Category } from '../../shared/rules/categories'
import { reviewCircuits } from '../../server/modules/standing/standing.service'
import type { TestServer } from './server'

/** Rows put straight into a company's tables, for tests whose subject lies elsewhere. */
export interface World {
  companyId: string
  customerId: string
  siteId: string
  systemId: string
}

const inside = <T>(server: TestServer, companyId: string, work: Parameters<typeof server.house.database.inCompany<T>>[1]): Promise<T> =>
  server.house.database.inCompany({ companyId, customerIds: null }, work)

/** A customer with one site in Chicago's zone and one system. */
export async function aWorld(server: TestServer, companyId: string, site: { method?: 'annualizing' | 'rolling'; packs?: string[] } = {}): Promise<World> {
  const [customerId, siteId, systemId] = [uuid(), uuid(), uuid()]
  await inside(server, companyId, async (tx) => {
    await tx.query('insert into customer (company_id, id, name) values ($1, $2, $3)', [companyId, customerId, `Customer ${customerId.slice(-6)}`])
    await tx.query(
      `insert into site (company_id, id, customer_id, name, street, city, country, time_zone, elevation_m, jurisdiction, leak_rate_method, rule_packs)
       values ($1, $2, $3, 'Test site', '1 Test Street', 'Testville', 'US', 'America/Chicago', 200, 'US', $4, $5)`,
      [companyId, siteId, customerId, site.method ?? 'annualizing', site.packs ?? ['us-ods', 'us-hfc']])
    await tx.query(`insert into system (company_id, id, customer_id, site_id, tag, name, category) values ($1, $2, $3, $4, 'RTU-1', 'Roof-top unit', 'comfort-cooling')`,
      [companyId, systemId, customerId, siteId])
  })
  return { companyId, customerId, siteId, systemId }
}

/** A circuit in service with its full charge, commissioned in 2020, and a book charge of as much. */
export async function aCircuitRow(server: TestServer, world: World, circuit: { refrigerant?: string; pounds?: string; bookPounds?: string; category?: Category } = {}): Promise<string> {
  const id = uuid()
  const pounds = circuit.pounds ?? '60'
  const refrigerant = circuit.refrigerant ?? 'R-22'
  await inside(server, world.companyId, async (tx) => {
    await tx.query(
      `insert into circuit (company_id, id, customer_id, site_id, system_id, name, refrigerant, category, status, commissioned_on)
       values ($1, $2, $3, $4, $5, $6, $7, $8, 'in-service', '2020-05-01')`,
      [world.companyId, id, world.customerId, world.siteId, world.systemId, `Circuit ${id.slice(-6)}`, refrigerant, circuit.category ?? 'comfort-cooling'])
    await tx.query(`insert into account (company_id, id, kind, customer_id) values ($1, $2, 'circuit', $3)`, [world.companyId, id, world.customerId])
    const [person] = await tx.query('select id from person where company_id = $1 limit 1', [world.companyId]) as { id: string }[]
    await tx.query(
      `insert into full_charge (company_id, id, customer_id, circuit_id, method, mass_kg, effective_on, person_id) values ($1, $2, $3, $4, 'manufacturer', $5, '2020-05-01', $6)`,
      [world.companyId, uuid(), world.customerId, id, toKgText(lb(pounds)), person?.id])
    await tx.query(`insert into balance (company_id, account_id, refrigerant, kind, mass_kg, customer_id) values ($1, $2, $3, 'circuit', $4, $5)`,
      [world.companyId, id, refrigerant, toKgText(lb(circuit.bookPounds ?? '0')), world.customerId])
    await reviewCircuits(tx, world.companyId, [id])
  })
  return id
}

/** A cylinder in use; empty unless stock is posted into it. */
export async function aCylinderRow(server: TestServer, companyId: string, cylinder: {
  refrigerant?: string; kind?: (typeof CYLINDER_KINDS)[number]; contents?: (typeof CYLINDER_CONTENTS)[number]; waterCapacityPounds?: string | null; testDueOn?: string | null
} = {}): Promise<string> {
  const id = uuid()
  const capacity = cylinder.waterCapacityPounds === undefined ? '47.6' : cylinder.waterCapacityPounds
  await inside(server, companyId, async (tx) => {
    await tx.query(
      `insert into cylinder (company_id, id, number, kind, refrigerant, contents, tare_kg, water_capacity_kg, test_due_on, status)
       values ($1, $2, $3, $4, $5, $6, $7, $8, $9, 'in-use')`,
      [companyId, id, `C-${id.slice(-8)}`, cylinder.kind ?? 'refillable', cylinder.refrigerant ?? 'R-22', cylinder.contents ?? 'virgin',
        toKgText(lb('28')), capacity === null ? null : toKgText(lb(capacity)), cylinder.testDueOn === undefined ? '2030-01-01' : cylinder.testDueOn])
    await tx.query(`insert into account (company_id, id, kind) values ($1, $2, 'cylinder')`, [companyId, id])
  })
  return id
}

export async function aPartnerRow(server: TestServer, companyId: string, kind: 'supplier' | 'reclaimer' | 'destroyer' = 'supplier'): Promise<string> {
  const id = uuid()
  await inside(server, companyId, async (tx) => {
    await tx.query('insert into partner (company_id, id, name, kind) values ($1, $2, $3, $4)', [companyId, id, `Partner ${id.slice(-6)}`, kind])
    await tx.query('insert into account (company_id, id, kind) values ($1, $2, $3)', [companyId, id, kind])
  })
  return id
}
