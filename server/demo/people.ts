import { v7 as uuid } from 'uuid'
import accounts from '../../fixtures/demo/accounts.json'
import company from '../../fixtures/demo/company.json'
import { ROLES } from '../../shared/access/roles'
import { CERTIFICATE_TYPES, type PersonDraft } from '../../shared/api/people'
import type { Actor } from '../actor'
import type { Tx } from '../database'
import { createPerson } from '../modules/people/people.service'
import { hashPassword } from '../modules/session/passwords'
import { oneOf } from './one-of'

/** The demo company has a fixed id, so that it is loaded once. */
export const DEMO_COMPANY_ID = '00000000-0000-7000-8000-00000000d3f0'
const OWNERS_CUSTOMER = 'Larkmoor Provisions'
const ACTOR = { companyId: DEMO_COMPANY_ID, customerIds: null, sessionId: '', locale: 'en' }

/** Who enters the first people, before there is anyone: an account that is closed again by `closeFounder`. */
export async function openFounder(tx: Tx): Promise<Actor> {
  const founder: Actor = { ...ACTOR, personId: uuid(), name: 'Demo set-up', email: 'demo@weighback.example', role: 'administrator' }
  await tx.query(`insert into person (company_id, id, email, name, role, preferences) values ($1, $2, $3, $4, $5, '{"massUnit":"lb","pressureUnit":"psig","temperatureUnit":"F","theme":"system","locale":"en"}')`,
    [founder.companyId, founder.personId, founder.email, founder.name, founder.role])
  return founder
}

export async function closeFounder(tx: Tx, founder: Actor): Promise<void> {
  await tx.query('update person set disabled_at = now() where company_id = $1 and id = $2', [founder.companyId, founder.personId])
}

type Entrant = Pick<PersonDraft, 'name' | 'email' | 'role'> & { password?: string; certificateNumber?: string; certificateType?: string }

/** The five accounts that can sign in, and the other technicians, in the order of the files. */
export async function makePeople(tx: Tx, founder: Actor, customers: Map<string, string>): Promise<Actor[]> {
  const nobodysHash = await hashPassword(uuid()) // one for all who never sign in: hashing is slow on purpose
  const people: Actor[] = []
  const entrants: Entrant[] = [
    ...accounts.map((account) => ({ ...account, role: oneOf(ROLES, account.role) })),
    ...company.technicians.map((technician) => ({ ...technician, role: 'technician' as const })),
  ]
  for (const person of entrants) people.push(await makePerson(tx, founder, person, customers, nobodysHash))
  return people
}

async function makePerson(tx: Tx, founder: Actor, person: Entrant, customers: Map<string, string>, nobodysHash: string): Promise<Actor> {
  const { name, email, role } = person
  const isTechnician = role === 'technician'
  const { id } = await createPerson(tx, founder, {
    name, email, role, customerIds: role === 'owner' ? [customers.get(OWNERS_CUSTOMER) ?? ''] : [],
    certificateNumber: isTechnician ? (person.certificateNumber ?? 'TC-30215') : null,
    certificateType: isTechnician ? oneOf(CERTIFICATE_TYPES, person.certificateType ?? 'Universal') : null,
  })
  const hash = person.password ? await hashPassword(person.password) : nobodysHash
  await tx.query('update person set password_hash = $3 where company_id = $1 and id = $2', [founder.companyId, id, hash])
  return { ...ACTOR, personId: id, name, email, role }
}
