import type { Tx } from './database'
import { notFound, Problem } from './problem'

/**
 * Changes one row of a table if nobody changed it since `version`, and counts the version up.
 *
 * @param table  a table of ours, never from input; @param columns column names of ours with their new values
 * @throws Problem not-found, or changed-meanwhile where the version is another
 */
export async function updateVersioned(tx: Tx, table: string, key: { companyId: string; id: string; version: number }, columns: Record<string, unknown>): Promise<void> {
  const names = Object.keys(columns)
  const sets = names.map((name, index) => `${name} = $${index + 4}`)
  const [rows] = await tx.query(
    `update ${table} set ${[...sets, 'version = version + 1'].join(', ')} where company_id = $1 and id = $2 and version = $3 returning id`,
    [key.companyId, key.id, key.version, ...Object.values(columns)]) as [{ id: string }[], number]
  if (rows.length === 1) return
  const [row] = await tx.query(`select id from ${table} where company_id = $1 and id = $2`, [key.companyId, key.id]) as { id: string }[]
  throw row ? new Problem('changed-meanwhile') : notFound(table)
}

/** Inserts one row. */
export async function insertRow(tx: Tx, table: string, columns: Record<string, unknown>): Promise<void> {
  await tx.query(insertOf(table, columns), Object.values(columns))
}

/**
 * Inserts a row whose id the device made; the same id again, also at the same moment, inserts nothing.
 *
 * @returns whether it was inserted
 */
export async function insertOnce(tx: Tx, table: string, columns: Record<string, unknown>): Promise<boolean> {
  const rows = await tx.query(`${insertOf(table, columns)} on conflict (company_id, id) do nothing returning id`, Object.values(columns)) as unknown[]
  return rows.length > 0
}

function insertOf(table: string, columns: Record<string, unknown>): string {
  const names = Object.keys(columns)
  return `insert into ${table} (${names.join(', ')}) values (${names.map((_name, index) => `$${index + 1}`).join(', ')})`
}

/** Whether a row of this company has that id, and belongs to the customers of an owner's account. */
export async function hasRow(tx: Tx, table: string, companyId: string, id: string): Promise<boolean> {
  const rows = await tx.query(`select from ${table} where company_id = $1 and id = $2`, [companyId, id]) as unknown[]
  return rows.length > 0
}

/** `fullChargeKg` as `full_charge_kg`. */
export const toColumns = (fields: object): Record<string, unknown> =>
  Object.fromEntries(Object.entries(fields).map(([name, value]) => [name.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`), value as unknown]))
