import type { Me, Preferences, SignIn, WireDevice } from '../../shared/api/people'
import { del, get, patch, post } from './client'

/** One account of the demo company that the sign-in page offers; only where the server says so. */
export interface DemoAccount {
  email: string
  password: string
  name: string
  role: Me['role']
}

export interface Invitation {
  email: string
  name: string
  companyName: string
}

/** A letter that was sent; shown in development and in the demo. */
export interface SentMail {
  id: string
  to: string
  subject: string
  text: string
  sentAt: string
}

export interface MePatch {
  name?: string
  preferences?: Partial<Preferences>
  certificateNumber?: string | null
  certificateType?: string | null
}

export const getMe = (): Promise<Me> => get<Me>('/api/me')
export const patchMe = (body: MePatch): Promise<Me> => patch<Me>('/api/me', { body })
export const signIn = (body: SignIn): Promise<Me> => post<Me>('/api/session', { body })
export const signOut = (): Promise<void> => del('/api/session')
export const listDemoAccounts = (): Promise<DemoAccount[]> => get<DemoAccount[]>('/api/demo-accounts')

export const changePassword = (body: { current: string; next: string }): Promise<void> => post<void>('/api/me/password', { body })
export const forgotPassword = (email: string): Promise<void> => post<void>('/api/password/forgot', { body: { email } })
export const resetPassword = (body: { token: string; password: string }): Promise<void> => post<void>('/api/password/reset', { body })

export const getInvitation = (token: string): Promise<Invitation> => get<Invitation>(`/api/invitations/${encodeURIComponent(token)}`)
export const acceptInvitation = (token: string, body: { name: string; password: string }): Promise<Me> =>
  post<Me>(`/api/invitations/${encodeURIComponent(token)}`, { body })

export const listDevices = (): Promise<WireDevice[]> => get<WireDevice[]>('/api/me/devices')
export const endDevice = (id: string): Promise<void> => del(`/api/me/devices/${encodeURIComponent(id)}`)

export const listSentMail = (): Promise<SentMail[]> => get<SentMail[]>('/api/dev/mail')
