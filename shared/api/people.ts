import type { Role } from '../access/roles'
import type { MassUnit } from './ledger'

export const THEMES = ['system', 'light', 'dark'] as const
export type Theme = (typeof THEMES)[number]
export const PRESSURE_UNITS = ['psig', 'kPa', 'bar'] as const
export const TEMPERATURE_UNITS = ['F', 'C'] as const

/** How a person likes to read and write. */
export interface Preferences {
  massUnit: MassUnit
  pressureUnit: (typeof PRESSURE_UNITS)[number]
  temperatureUnit: (typeof TEMPERATURE_UNITS)[number]
  theme: Theme
  locale: string
}

/** The person signed in. GET /api/me */
export interface Me {
  id: string
  companyId: string
  companyName: string
  isDemo: boolean
  name: string
  email: string
  role: Role
  certificateNumber: string | null
  certificateType: string | null
  preferences: Preferences
  /** Customers that an owner's account is tied to; empty for the company's own people. */
  customerIds: string[]
}

/** POST /api/session */
export interface SignIn {
  email: string
  password: string
}

export interface WireDevice {
  id: string
  userAgent: string
  startedAt: string
  lastUsedAt: string
  isCurrent: boolean
}

export const CERTIFICATE_TYPES = ['I', 'II', 'III', 'Universal'] as const

export interface PersonDraft {
  name: string
  email: string
  role: Role
  certificateNumber: string | null
  certificateType: (typeof CERTIFICATE_TYPES)[number] | null
  customerIds: string[]
}

export interface WirePerson extends PersonDraft {
  id: string
  state: 'invited' | 'active' | 'disabled'
  version: number
  may: string[]
}
