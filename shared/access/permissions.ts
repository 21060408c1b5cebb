import type { Role } from './roles'

/**
 * Everything a person may be allowed to do, by name, and which role holds it. The server decides
 * by this table and the client hides by the same one.
 */
export const PERMISSIONS = {
  'account.own': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'company.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'company.update': ['administrator'],
  'person.read': ['officer', 'auditor', 'administrator'],
  'person.manage': ['administrator'],
  'customer.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'customer.update': ['officer', 'administrator'],
  'site.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'site.update': ['officer', 'administrator'],
  'system.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'system.update': ['officer', 'administrator'],
  'circuit.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'circuit.update': ['officer', 'administrator'],
  'component.update': ['technician', 'officer', 'administrator'],
  'leak.update': ['technician', 'officer', 'administrator'],
  'cylinder.read': ['technician', 'officer', 'auditor', 'administrator'],
  'cylinder.update': ['officer', 'administrator'],
  'partner.read': ['technician', 'officer', 'auditor', 'administrator'],
  'partner.update': ['officer', 'administrator'],
  'posting.create': ['technician', 'officer'],
  'posting.reverse': ['officer'],
  'posting.stock': ['officer'],
  'posting.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'visit.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'visit.update': ['technician', 'officer'],
  'paper.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
  'stock.read': ['officer', 'auditor', 'administrator'],
  'export.read': ['officer', 'auditor', 'administrator'],
  'ledger.check': ['officer', 'auditor', 'administrator'],
  'trail.read': ['officer', 'auditor', 'administrator'],
  'pack.read': ['technician', 'officer', 'owner', 'auditor', 'administrator'],
} as const satisfies Record<string, readonly Role[]>

export type Permission = keyof typeof PERMISSIONS

/** Whether a role holds a permission. */
export const mayRole = (role: Role, permission: Permission): boolean =>
  (PERMISSIONS[permission] as readonly Role[]).includes(role)
