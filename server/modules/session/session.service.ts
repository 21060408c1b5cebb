import { v7 as uuid } from 'uuid'
import type { Me, Preferences, WireDevice } from '../../../shared/api/people'
import type { Actor } from '../../actor'
import type { House } from '../../house'
import type { Tx } from '../../database'
import { badField, notFound, Problem } from '../../problem'
import { resetLetter } from '../../mail/letters'
import * as trail from '../trail/trail.service'
import { checkPassword, hashPassword, passwordFits } from './passwords'
import { hashOf, newSecret, readRowToken, sameHash, signAccess, writeRowToken, type RowToken } from './tokens'
import { REFRESH_DAYS } from './cookies'
import * as repository from './session.repository'
import type { MeDto } from './session.dto'

const DAY_MS = 86_400_000
const RESET_MS = 3_600_000 // an hour, OWASP ASVS 5
const ROTATION_GRACE_MS = 20_000 // two tabs may refresh at once with the same cookie; later reuse ends the session
const IDLE_MS = 14 * DAY_MS

export interface Tokens { access: string; refresh: string }
export interface SignedIn { me: Me; tokens: Tokens }
const asStaff = (companyId: string) => ({ companyId, customerIds: null })

/** @throws Problem wrong-credentials, the same whether the address, the password or the account is wrong */
export async function signIn(house: House, input: { email: string; password: string; userAgent: string }): Promise<SignedIn> {
  const account = await repository.findAccount(house.database, input.email)
  if (!account) {
    await passwordFits(input.password, null)
    throw new Problem('wrong-credentials')
  }
  return house.database.inCompany(asStaff(account.company_id), async (tx) => {
    const person = await repository.personById(tx, account.company_id, account.person_id)
    const fits = await passwordFits(input.password, person?.disabledAt ? null : (person?.passwordHash ?? null))
    if (!person || !fits) throw new Problem('wrong-credentials')
    return startSession(house, tx, person, input.userAgent)
  })
}

export async function startSession(house: House, tx: Tx, person: { companyId: string; id: string }, userAgent: string): Promise<SignedIn> {
  const now = house.now()
  const session = { companyId: person.companyId, rowId: uuid(), secret: newSecret() }
  await repository.insertSession(tx, {
    companyId: session.companyId, id: session.rowId, personId: person.id, refreshHash: hashOf(session.secret),
    userAgent: userAgent.slice(0, 300), startedAt: now, lastUsedAt: now, expiresAt: new Date(now.getTime() + REFRESH_DAYS * DAY_MS),
  })
  return { me: await meOf(tx, person.companyId, person.id), tokens: tokensOf(house, session) }
}

const tokensOf = (house: House, session: RowToken): Tokens => ({
  access: signAccess({ companyId: session.companyId, sessionId: session.rowId }, house.config.secret),
  refresh: writeRowToken(session),
})

/**
 * New tokens for a refresh cookie. The cookie rotates: using one that was replaced some time ago
 * means a copy is about, and ends the session.
 *
 * @throws Problem not-signed-in
 */
export async function refresh(house: House, cookie: string | null): Promise<SignedIn> {
  const token = cookie ? readRowToken(cookie) : null
  if (!token) throw new Problem('not-signed-in')
  const answer = await house.database.inCompany(asStaff(token.companyId), async (tx) => {
    const session = await repository.sessionForUpdate(tx, token.companyId, token.rowId)
    const now = house.now()
    if (!session || session.endedAt || session.expiresAt <= now || now.getTime() - session.lastUsedAt.getTime() > IDLE_MS) return null
    const person = await repository.personById(tx, token.companyId, session.personId)
    if (!person || person.disabledAt) return null
    const hash = hashOf(token.secret)
    if (!sameHash(hash, session.refreshHash)) {
      const isLateTwin = session.previousHash !== null && sameHash(hash, session.previousHash)
        && now.getTime() - session.lastUsedAt.getTime() <= ROTATION_GRACE_MS
      if (isLateTwin) return { me: await meOf(tx, person.companyId, person.id), tokens: null }
      await repository.updateSession(tx, token.companyId, token.rowId, { endedAt: now })
      return null
    }
    const secret = newSecret()
    await repository.updateSession(tx, token.companyId, token.rowId, { refreshHash: hashOf(secret), previousHash: session.refreshHash, lastUsedAt: now })
    return { me: await meOf(tx, person.companyId, person.id), tokens: tokensOf(house, { ...token, secret }) }
  })
  if (!answer) throw new Problem('not-signed-in')
  // The twin of a rotation in flight keeps its cookie: the first answer has set the new one.
  return { me: answer.me, tokens: answer.tokens ?? { access: signAccess({ companyId: token.companyId, sessionId: token.rowId }, house.config.secret), refresh: '' } }
}

export async function signOut(house: House, cookie: string | null): Promise<void> {
  const token = cookie ? readRowToken(cookie) : null
  if (!token) return
  await house.database.inCompany(asStaff(token.companyId), async (tx) => {
    const session = await repository.sessionForUpdate(tx, token.companyId, token.rowId)
    const hash = hashOf(token.secret)
    const isTheirs = session && (sameHash(hash, session.refreshHash) || (session.previousHash && sameHash(hash, session.previousHash)))
    if (isTheirs && !session.endedAt) await repository.updateSession(tx, token.companyId, token.rowId, { endedAt: house.now() })
  })
}

export async function meOf(tx: Tx, companyId: string, personId: string): Promise<Me> {
  const person = await repository.personById(tx, companyId, personId)
  if (!person) throw notFound('person')
  const company = await repository.companyOf(tx, companyId)
  return {
    id: person.id, companyId, companyName: company.name, isDemo: company.isDemo, name: person.name, email: person.email, role: person.role,
    certificateNumber: person.certificateNumber, certificateType: person.certificateType,
    preferences: person.preferences as Preferences, customerIds: await repository.customerIdsOf(tx, companyId, personId),
  }
}

export async function changeMe(tx: Tx, who: Actor, change: MeDto): Promise<Me> {
  const { preferences, ...own } = givenOf(change)
  const before = await meOf(tx, who.companyId, who.personId)
  if (preferences) await repository.updatePerson(tx, who.companyId, who.personId, { preferences: { ...before.preferences, ...givenOf(preferences) } })
  if (trail.difference(before, own)) {
    await repository.updateOpenPerson(tx, who.companyId, who.personId, own)
    await trail.recordChange(tx, who, { action: 'change', subject: 'person', subjectId: who.personId, subjectName: own.name ?? before.name }, before, own)
  }
  return meOf(tx, who.companyId, who.personId)
}

const givenOf = <Fields extends object>(fields: Fields): Partial<Fields> =>
  Object.fromEntries(Object.entries(fields).filter(([, value]) => value !== undefined)) as Partial<Fields>

/** @throws Problem bad-input if the current password is wrong or the next one unusable */
export async function changePassword(tx: Tx, who: Actor, input: { current: string; next: string }, now: Date): Promise<void> {
  const person = await repository.personById(tx, who.companyId, who.personId)
  if (!(await passwordFits(input.current, person?.passwordHash ?? null))) throw badField('current', 'passwordWrong')
  await setPassword(tx, who.companyId, who.personId, input.next, 'next', who.sessionId, now)
  await trail.record(tx, who, { action: 'change-password', subject: 'person', subjectId: who.personId, subjectName: who.name })
}

async function setPassword(tx: Tx, companyId: string, personId: string, password: string, field: string, keepSessionId: string | null, now: Date): Promise<void> {
  checkPassword(password, field)
  await repository.updatePerson(tx, companyId, personId, { passwordHash: await hashPassword(password) })
  await repository.endSessionsOf(tx, companyId, personId, keepSessionId, now)
  await repository.useUpLinks(tx, companyId, personId, now)
}

export async function devices(tx: Tx, who: Actor): Promise<WireDevice[]> {
  const sessions = await repository.openSessionsOf(tx, who.companyId, who.personId)
  return sessions.map((session) => ({
    id: session.id, userAgent: session.userAgent, startedAt: session.startedAt.toISOString(),
    lastUsedAt: session.lastUsedAt.toISOString(), isCurrent: session.id === who.sessionId,
  }))
}

export async function endDevice(tx: Tx, who: Actor, id: string, now: Date): Promise<void> {
  const session = await repository.sessionForUpdate(tx, who.companyId, id)
  if (!session || session.personId !== who.personId) throw notFound('device')
  if (!session.endedAt) await repository.updateSession(tx, who.companyId, id, { endedAt: now })
}

/** A link that works once until it expires; earlier links of the person stop working. */
export async function newLink(tx: Tx, person: { companyId: string; id: string }, purpose: 'invitation' | 'reset', lifeMs: number, now: Date): Promise<string> {
  await repository.useUpLinks(tx, person.companyId, person.id, now)
  const token = { companyId: person.companyId, rowId: uuid(), secret: newSecret() }
  await repository.insertLink(tx, {
    companyId: person.companyId, id: token.rowId, personId: person.id, purpose, tokenHash: hashOf(token.secret), expiresAt: new Date(now.getTime() + lifeMs),
  })
  return writeRowToken(token)
}

/** Mails a reset link if the address has an account; the caller answers the same either way and does not wait. */
export async function forgot(house: House, email: string): Promise<void> {
  const account = await repository.findAccount(house.database, email)
  if (!account) return
  const letter = await house.database.inCompany(asStaff(account.company_id), async (tx) => {
    const person = await repository.personById(tx, account.company_id, account.person_id)
    if (!person || person.disabledAt || !person.passwordHash) return null
    const link = await newLink(tx, person, 'reset', RESET_MS, house.now())
    return resetLetter('en', person.email, `${house.config.baseUrl}/reset/${link}`, { name: person.name })
  })
  if (letter) await house.mailer.send(letter)
}

/** Runs work with the person a link belongs to. @throws Problem link-expired for a used, expired or invented link */
async function withLink<T>(house: House, text: string, purpose: 'invitation' | 'reset', work: (tx: Tx, link: { id: string; personId: string; companyId: string }) => Promise<T>): Promise<T> {
  const token = readRowToken(text)
  if (!token) throw new Problem('link-expired')
  return house.database.inCompany(asStaff(token.companyId), async (tx) => {
    const link = await repository.linkForUpdate(tx, token.companyId, token.rowId)
    const isGood = link && link.purpose === purpose && !link.usedAt && link.expiresAt > house.now() && sameHash(hashOf(token.secret), link.tokenHash)
    if (!isGood) throw new Problem('link-expired')
    return work(tx, link)
  })
}

export const resetPassword = (house: House, input: { token: string; password: string }): Promise<void> =>
  withLink(house, input.token, 'reset', async (tx, link) => {
    await setPassword(tx, link.companyId, link.personId, input.password, 'password', null, house.now())
    const { name } = await meOf(tx, link.companyId, link.personId)
    await trail.record(tx, link, { action: 'change-password', subject: 'person', subjectId: link.personId, subjectName: name })
  })

export const readInvitation = (house: House, token: string): Promise<{ email: string; name: string; companyName: string }> =>
  withLink(house, token, 'invitation', async (tx, link) => {
    const me = await meOf(tx, link.companyId, link.personId)
    return { email: me.email, name: me.name, companyName: me.companyName }
  })

export const acceptInvitation = (house: House, token: string, input: { name: string; password: string; userAgent: string }): Promise<SignedIn> =>
  withLink(house, token, 'invitation', async (tx, link) => {
    const before = await meOf(tx, link.companyId, link.personId)
    await setPassword(tx, link.companyId, link.personId, input.password, 'password', null, house.now())
    await repository.updateOpenPerson(tx, link.companyId, link.personId, { name: input.name })
    await trail.record(tx, link, { action: 'accept', subject: 'person', subjectId: link.personId, subjectName: input.name, before: { name: before.name }, after: { name: input.name } })
    return startSession(house, tx, { companyId: link.companyId, id: link.personId }, input.userAgent)
  })

/** Makes every invitation and reset link that is on its way to a person useless. */
export const endLinks = (tx: Tx, companyId: string, personId: string, now: Date): Promise<void> => repository.useUpLinks(tx, companyId, personId, now)

/** Signs a person out everywhere, or everywhere but here. */
export const endSessions = (tx: Tx, companyId: string, personId: string, exceptId: string | null, now: Date): Promise<void> =>
  repository.endSessionsOf(tx, companyId, personId, exceptId, now)
