/** The five roles; one per person. */
export const ROLES = ['technician', 'officer', 'owner', 'auditor', 'administrator'] as const
export type Role = (typeof ROLES)[number]
