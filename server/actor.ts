import type { Role } from '../shared/access/roles'
import { mayRole, type Permission } from '../shared/access/permissions'
import type { Scope } from './database'
import { Problem } from './problem'

/** The person behind a request, as the database knows them at this moment. */
export interface Actor extends Scope {
  personId: string
  sessionId: string
  name: string
  email: string
  role: Role
  locale: string
}

export const may = (who: Actor, permission: Permission): boolean => mayRole(who.role, permission)

/** @throws Problem not-allowed */
export function demand(who: Actor, permission: Permission): void {
  if (!may(who, permission)) throw new Problem('not-allowed')
}

/** Which of these permissions the person holds; goes out as `may` with a row. */
export const held = (who: Actor, permissions: Permission[]): Permission[] => permissions.filter((permission) => may(who, permission))
