import { v7 as uuid } from 'uuid'
import type { CylinderDraft, PartnerDraft, WireCylinder, WirePartner } from '../../shared/api/cylinders'
import type { CircuitDraft, CustomerDraft, SiteDraft, SystemDraft, WireCircuit, WireCustomer, WireSite, WireSystem } from '../../shared/api/places'
import { plainDate } from '../../shared/dates/plain-date'
import { lb, toKgText } from '../../shared/mass/mass'
import type { Client } from './server'

/** Things of a company, made through the API as an officer would; what a test does not care about has a plain value. */
const made = async <Row>(client: Client, path: string, body: object): Promise<Row> => {
  const answer = await client.post(path, body)
  if (answer.status !== 201) throw new Error(`${path}: ${answer.status} ${JSON.stringify(answer.body)}`)
  return answer.body as Row
}
const unique = (what: string): string => `${what} ${uuid().slice(-8)}`

export const customerDraft = (given: Partial<CustomerDraft> = {}): CustomerDraft =>
  ({ name: unique('Customer'), contactName: null, email: null, phone: null, address: null, note: null, ...given })
export const aCustomer = (client: Client, given: Partial<CustomerDraft> = {}): Promise<WireCustomer> => made(client, '/api/customers', customerDraft(given))

export const siteDraft = (customerId: string, given: Partial<SiteDraft> = {}): SiteDraft => ({
  customerId, name: unique('Site'), street: '1 Test Street', city: 'Testville', region: 'IL', postalCode: '00000', country: 'US', timeZone: 'America/Chicago',
  elevationM: 200, jurisdiction: 'US', leakRateMethod: 'annualizing', rulePacks: ['us-ods', 'us-hfc'], ...given,
})
export const aSite = async (client: Client, given: Partial<SiteDraft> = {}): Promise<WireSite> =>
  made(client, '/api/sites', siteDraft(given.customerId ?? (await aCustomer(client)).id, given))

export const systemDraft = (siteId: string, given: Partial<SystemDraft> = {}): SystemDraft => ({
  siteId, tag: unique('RTU'), name: 'Roof-top unit', location: 'Roof', maker: null, model: null, serial: null, category: 'comfort-cooling', installedOn: null,
  subsectorDecision: null, subsectorDecidedBy: null, subsectorReason: null, ...given,
})
export const aSystem = async (client: Client, given: Partial<SystemDraft> = {}): Promise<WireSystem> =>
  made(client, '/api/systems', systemDraft(given.siteId ?? (await aSite(client)).id, given))

export const circuitDraft = (systemId: string, given: Partial<CircuitDraft> & { pounds?: string } = {}): CircuitDraft => {
  const { pounds = '60', ...rest } = given
  return {
    systemId, name: unique('Circuit'), refrigerant: 'R-22', category: 'comfort-cooling', status: 'in-service', commissionedOn: plainDate('2020-05-01'),
    fullCharge: { method: 'manufacturer', massKg: toKgText(lb(pounds)), rangeLowKg: null, rangeHighKg: null, effectiveOn: plainDate('2020-05-01'), note: null }, ...rest,
  }
}
export const aCircuit = async (client: Client, given: Partial<CircuitDraft> & { pounds?: string } = {}): Promise<WireCircuit> =>
  made(client, '/api/circuits', circuitDraft(given.systemId ?? (await aSystem(client)).id, given))

export const cylinderDraft = (given: Partial<CylinderDraft> = {}): CylinderDraft => ({
  number: unique('C'), kind: 'refillable', refrigerant: 'R-22', contents: 'virgin', tareKg: toKgText(lb('28')), waterCapacityKg: toKgText(lb('47.6')),
  testDueOn: plainDate('2031-01-01'), status: 'in-use', holderId: null, place: 'Store', ownerCustomerId: null, ...given,
})
export const aCylinder = (client: Client, given: Partial<CylinderDraft> = {}): Promise<WireCylinder> => made(client, '/api/cylinders', cylinderDraft(given))

export const aPartner = (client: Client, given: Partial<PartnerDraft> = {}): Promise<WirePartner> =>
  made(client, '/api/partners', { name: unique('Partner'), kind: 'supplier', address: null, certificate: null, ...given })
