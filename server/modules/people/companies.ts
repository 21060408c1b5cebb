import { v7 as uuid } from 'uuid'
import type { Database } from '../../database'

/** A new company with the two accounts that every ledger has: what went to air, and variance. Idempotent. */
export async function createCompany(database: Database, company: { id: string; name: string; isDemo: boolean }): Promise<void> {
  await database.query('select create_company($1, $2, $3)', [company.id, company.name, company.isDemo])
  await database.inCompany({ companyId: company.id, customerIds: null }, async (tx) => {
    for (const kind of ['air', 'variance'])
      await tx.query('insert into account (company_id, id, kind) values ($1, $2, $3) on conflict do nothing', [company.id, uuid(), kind])
  })
}
