import type { AccountKind } from '../../../shared/api/ledger'
import type { Tx } from '../../database'

/** Holds postings to these accounts off until the transaction ends; before anything that must not change beside a posting. */
export { lockAccounts } from './ledger.repository'

/** Opens the account of a cylinder, circuit or partner; its id is that of the thing itself. */
export async function openAccount(tx: Tx, companyId: string, account: { id: string; kind: AccountKind; customerId: string | null }): Promise<void> {
  await tx.query('insert into account (company_id, id, kind, customer_id) values ($1, $2, $3, $4)', [companyId, account.id, account.kind, account.customerId])
}
