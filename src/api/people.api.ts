import type { ListQuery, Page } from '../../shared/api/page'
import type { PersonDraft, WirePerson } from '../../shared/api/people'
import { get, patch, post } from './client'

export type PersonFilter = 'role'
/** The answer to an invitation says whether the mail server took the letter. */
export type InvitedPerson = WirePerson & { mailSent: boolean }
const pathOf = (id: string): string => `/api/people/${encodeURIComponent(id)}`

export const listPeople = (query: ListQuery & Partial<Record<PersonFilter, string>>, signal?: AbortSignal): Promise<Page<WirePerson>> =>
  get('/api/people', { query: { ...query }, signal })
export const getPerson = (id: string): Promise<WirePerson> => get(pathOf(id))
export const invitePerson = (body: PersonDraft): Promise<InvitedPerson> => post('/api/people', { body })
export const inviteAgain = (id: string): Promise<InvitedPerson> => post(`${pathOf(id)}/invite`)
export const changePerson = (id: string, version: number, body: PersonDraft): Promise<WirePerson> => patch(pathOf(id), { body, version })
export const disablePerson = (id: string): Promise<WirePerson> => post(`${pathOf(id)}/disable`)
export const enablePerson = (id: string): Promise<WirePerson> => post(`${pathOf(id)}/enable`)
