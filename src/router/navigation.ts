import type { Permission } from '../../shared/access/permissions'
import type { Role } from '../../shared/access/roles'
import type { IconName } from '../components/house-icons'

export interface NavigationEntry {
  /** The route's name, and its words under shell.nav. */
  name: string
  icon: IconName
  group: 'work' | 'stock' | 'company'
  /** One entry for a whole area: it is marked on all paths that begin so. */
  path: string
  permission: Permission
  /** Only these roles need it in sight, where the permission is wider. */
  roles?: readonly Role[]
}

/** What the rail and the tabs offer, in this order, to those whose role holds the permission. */
export const NAVIGATION: readonly NavigationEntry[] = [
  { name: 'today', icon: 'today', group: 'work', path: '/today', permission: 'visit.update', roles: ['technician', 'officer'] },
  { name: 'overview', icon: 'overview', group: 'work', path: '/overview', permission: 'circuit.read' },
  { name: 'circuits', icon: 'circuits', group: 'work', path: '/circuits', permission: 'circuit.read' },
  { name: 'sites', icon: 'sites', group: 'work', path: '/sites', permission: 'site.read' },
  { name: 'papers', icon: 'papers', group: 'work', path: '/papers', permission: 'paper.read' },
  { name: 'bench', icon: 'bench', group: 'work', path: '/bench', permission: 'pack.read', roles: ['technician', 'officer'] },
  { name: 'cylinders', icon: 'cylinders', group: 'stock', path: '/cylinders', permission: 'cylinder.read' },
  { name: 'postings', icon: 'postings', group: 'stock', path: '/postings', permission: 'posting.read' },
  { name: 'partners', icon: 'partners', group: 'stock', path: '/partners', permission: 'partner.read', roles: ['officer', 'auditor', 'administrator'] },
  { name: 'check', icon: 'check', group: 'stock', path: '/check', permission: 'ledger.check' },
  { name: 'packs', icon: 'papers', group: 'company', path: '/packs', permission: 'pack.read', roles: ['officer', 'auditor', 'administrator'] },
  { name: 'customers', icon: 'customers', group: 'company', path: '/customers', permission: 'customer.read', roles: ['officer', 'auditor', 'administrator'] },
  { name: 'people', icon: 'people', group: 'company', path: '/people', permission: 'person.read' },
]

const TABS_BY_ROLE: Record<Role, readonly string[]> = {
  technician: ['today', 'circuits', 'cylinders', 'sites'],
  officer: ['overview', 'circuits', 'sites', 'cylinders'],
  owner: ['overview', 'circuits', 'sites', 'papers'],
  auditor: ['overview', 'postings', 'check', 'papers'],
  administrator: ['overview', 'people', 'customers', 'sites'],
}

export const navigationOf = (role: Role, may: (permission: Permission) => boolean, exists: (name: string) => boolean): NavigationEntry[] =>
  NAVIGATION.filter((entry) => may(entry.permission) && (!entry.roles || entry.roles.includes(role)) && exists(entry.name))

/** The four at the foot of the phone; the rest stand under "More". */
export const tabsOf = (role: Role, entries: readonly NavigationEntry[]): NavigationEntry[] =>
  TABS_BY_ROLE[role].flatMap((name) => entries.find((entry) => entry.name === name) ?? [])

/** Where a role begins its day. */
export const startOf = (role: Role): string => (role === 'technician' ? '/today' : '/overview')
