import { v7 as uuid } from 'uuid'
import type { PersonDraft, Preferences, WirePerson } from '../../../shared/api/people'
import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import type { House } from '../../house'
import { invitationLetter } from '../../mail/letters'
import { badField, notFound } from '../../problem'
import { insertRow, toColumns, updateVersioned } from '../../versioned'
import { endLinks, endSessions, newLink } from '../session/session.service'
import * as trail from '../trail/trail.service'
import * as repository from './people.repository'

export { listPeople } from './people.repository'

const INVITATION_MS = 7 * 86_400_000
export const FIRST_PREFERENCES: Preferences = { massUnit: 'lb-oz', pressureUnit: 'psig', temperatureUnit: 'F', theme: 'system', locale: 'en' }

/** @throws Problem not-found */
export async function getPerson(tx: Tx, who: Actor, id: string): Promise<WirePerson> {
  const person = await repository.personById(tx, who, id)
  if (!person) throw notFound('person')
  return person
}

/** A person without a password yet; the invitation lets them choose one. @throws Problem bad-input, email-taken */
export async function createPerson(tx: Tx, who: Actor, draft: PersonDraft, id: string = uuid()): Promise<WirePerson> {
  await checkCustomers(tx, who, draft)
  const { customerIds, ...own } = draft
  await insertRow(tx, 'person', { company_id: who.companyId, id, ...toColumns(own), preferences: JSON.stringify(FIRST_PREFERENCES) })
  await repository.setCustomers(tx, who.companyId, id, customerIds)
  await trail.record(tx, who, { action: 'invite', subject: 'person', subjectId: id, subjectName: draft.name, after: draft })
  return getPerson(tx, who, id)
}

/**
 * Changes a person. Who loses or gains rights is signed out everywhere and signs in again with the new ones.
 *
 * @throws Problem not-found, changed-meanwhile, bad-input (the last administrator keeps the role), email-taken
 */
export async function changePerson(tx: Tx, who: Actor, id: string, version: number, draft: PersonDraft, now: Date): Promise<WirePerson> {
  const before = await getPerson(tx, who, id)
  await checkCustomers(tx, who, draft)
  if (before.role === 'administrator' && draft.role !== 'administrator') await keepOneAdministrator(tx, who, id, 'role')
  const { customerIds, ...own } = draft
  await updateVersioned(tx, 'person', { companyId: who.companyId, id, version }, toColumns(own))
  await repository.setCustomers(tx, who.companyId, id, customerIds)
  await trail.recordChange(tx, who, { action: 'change', subject: 'person', subjectId: id, subjectName: draft.name }, before, draft)
  const hasNewRights = draft.role !== before.role || draft.email !== before.email || [...customerIds].sort().join() !== [...before.customerIds].sort().join()
  // a link on its way lies in the old mailbox
  if (draft.email !== before.email) await endLinks(tx, who.companyId, id, now)
  if (hasNewRights) await endSessions(tx, who.companyId, id, id === who.personId && draft.role === before.role ? who.sessionId : null, now)
  return getPerson(tx, who, id)
}

/** Shuts an account: the next request of that person is refused. @throws Problem not-found, bad-input for the last administrator */
export async function setDisabled(tx: Tx, who: Actor, id: string, isDisabled: boolean, now: Date): Promise<WirePerson> {
  const person = await getPerson(tx, who, id)
  if (isDisabled && person.role === 'administrator') await keepOneAdministrator(tx, who, id, 'id')
  await tx.query('update person set disabled_at = $3, version = version + 1 where company_id = $1 and id = $2', [who.companyId, id, isDisabled ? now : null])
  if (isDisabled) {
    await endSessions(tx, who.companyId, id, null, now)
    await endLinks(tx, who.companyId, id, now)
  }
  await trail.record(tx, who, { action: isDisabled ? 'disable' : 'enable', subject: 'person', subjectId: id, subjectName: person.name })
  return getPerson(tx, who, id)
}

/**
 * Makes a new invitation and mails it. The person stands whether or not the mail server takes the letter.
 *
 * @returns whether the letter was taken
 */
export async function invite(house: House, who: Actor, person: WirePerson): Promise<boolean> {
  const { link, company } = await house.database.inCompany(who, async (tx) => ({
    link: await newLink(tx, { companyId: who.companyId, id: person.id }, 'invitation', INVITATION_MS, house.now()),
    company: (await tx.query('select name from company where id = $1', [who.companyId]) as { name: string }[])[0]?.name ?? '',
  }))
  const letter = invitationLetter('en', person.email, `${house.config.baseUrl}/invitation/${link}`, { name: person.name, company, inviter: who.name })
  return house.mailer.send(letter).then(() => true, (error: unknown) => {
    house.log.error({ err: error }, 'invitation not sent')
    return false
  })
}

async function keepOneAdministrator(tx: Tx, who: Actor, personId: string, field: string): Promise<void> {
  if ((await repository.otherAdministrators(tx, who.companyId, personId)) === 0) throw badField(field, 'lastAdministrator')
}

async function checkCustomers(tx: Tx, who: Actor, draft: PersonDraft): Promise<void> {
  if (draft.role === 'owner' && draft.customerIds.length === 0) throw badField('customerIds', 'ownerNeedsCustomer')
  if (draft.role !== 'owner' && draft.customerIds.length > 0) throw badField('customerIds', 'notHere')
  if ((await repository.customersThere(tx, who.companyId, draft.customerIds)) !== draft.customerIds.length) throw badField('customerIds', 'unknownCustomer')
}
