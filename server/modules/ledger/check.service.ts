import { createHash } from 'node:crypto'
import type { LedgerCheck, LedgerFault } from '../../../shared/api/ledger-check'
import { contentText } from '../../../shared/mass/content'
import type { Tx } from '../../database'
import { draftOf } from './ledger.repository'
import { GENESIS, SEALED_COLUMNS, SealHash } from './seals'

const PAGE = 2000 // postings read at a time, so that memory stays flat
const MOST_FAULTS = 200

/**
 * Recomputes a company's whole ledger from what is stored: the content hash of each posting, each seal
 * over its postings and over the seal before it, the sums to zero, and every kept balance. The caller gives
 * a transaction that sees one moment.
 */
export async function checkLedger(tx: Tx, companyId: string, now: Date): Promise<LedgerCheck> {
  const faults: LedgerFault[] = []
  const fault = (code: LedgerFault['code'], place: Partial<LedgerFault>, detail: string): void => {
    if (faults.length < MOST_FAULTS) faults.push({ code, postingId: null, sealNumber: null, accountId: null, ...place, detail })
  }
  const postings = await checkContents(tx, companyId, fault)
  const chain = await checkSeals(tx, companyId, fault)
  await checkSums(tx, companyId, fault)
  await checkBalances(tx, companyId, fault)
  return { postings, sealed: chain.sealed, waiting: Math.max(0, postings - chain.found), seals: chain.seals, lastSealHash: chain.last, faults, checkedAt: now.toISOString() }
}

type Fault = (code: LedgerFault['code'], place: Partial<LedgerFault>, detail: string) => void

async function checkContents(tx: Tx, companyId: string, fault: Fault): Promise<number> {
  let after = '00000000-0000-0000-0000-000000000000'
  let count = 0
  for (;;) {
    const rows = await tx.query('select * from posting where company_id = $1 and id > $2 order by id limit $3', [companyId, after, PAGE]) as Record<string, unknown>[]
    for (const row of rows) {
      const hash = createHash('sha256').update(contentText(draftOf(row))).digest()
      if (!hash.equals(row.content_hash as Buffer)) fault('content-changed', { postingId: row.id as string }, 'The content no longer fits the hash of what was sent.')
    }
    count += rows.length
    if (rows.length < PAGE) return count
    after = rows.at(-1)?.id as string
  }
}

async function checkSeals(tx: Tx, companyId: string, fault: Fault): Promise<{ sealed: number; found: number; seals: number; last: string | null }> {
  const seals = await tx.query('select number, previous_hash, hash, posting_count from seal where company_id = $1 order by number', [companyId]) as
    { number: number; previous_hash: Buffer; hash: Buffer; posting_count: number }[]
  let previous: Buffer = GENESIS
  let sealed = 0
  let found = 0
  for (const [index, seal] of seals.entries()) {
    if (seal.number !== index + 1) {
      fault('seal-missing', { sealNumber: index + 1 }, 'A seal of the chain is missing.')
      return { sealed, found, seals: seals.length, last: null }
    }
    const rows = await tx.query(
      `select s.posting_id, s.position, p.id is not null as is_there, ${SEALED_COLUMNS} as content
         from sealed_posting s left join posting p on p.company_id = s.company_id and p.id = s.posting_id
        where s.company_id = $1 and s.seal_number = $2 order by s.position`, [companyId, seal.number]) as
      { posting_id: string; position: number; is_there: boolean; content: string }[]
    const hash = new SealHash(previous, seal.number)
    for (const row of rows) {
      if (!row.is_there) fault('posting-missing', { postingId: row.posting_id, sealNumber: seal.number }, 'A sealed posting is no longer there.')
      hash.add(row.content)
    }
    if (rows.length !== seal.posting_count) fault('posting-missing', { sealNumber: seal.number }, `The seal covers ${seal.posting_count} postings and ${rows.length} are listed.`)
    if (!seal.previous_hash.equals(previous)) fault('seal-broken', { sealNumber: seal.number }, 'The seal does not follow from the one before it.')
    if (!hash.digest().equals(seal.hash)) fault('seal-broken', { sealNumber: seal.number }, 'A posting of this block, its entries or their order was changed after sealing.')
    sealed += rows.length
    found += rows.filter((row) => row.is_there).length
    previous = seal.hash
  }
  return { sealed, found, seals: seals.length, last: seals.at(-1)?.hash.toString('hex') ?? null }
}

async function checkSums(tx: Tx, companyId: string, fault: Fault): Promise<void> {
  const unbalanced = await tx.query(
    `select posting_id, refrigerant, sum(mass_kg)::text as sum from entry where company_id = $1
      group by posting_id, refrigerant having sum(mass_kg) <> 0 limit ${MOST_FAULTS}`, [companyId]) as { posting_id: string; refrigerant: string; sum: string }[]
  for (const row of unbalanced) fault('unbalanced', { postingId: row.posting_id }, `The entries of ${row.refrigerant} sum to ${row.sum} kg instead of zero.`)
  const orphans = await tx.query(
    `select p.id from posting p where p.company_id = $1 and not exists (select from entry e where e.company_id = p.company_id and e.posting_id = p.id)
      limit ${MOST_FAULTS}`, [companyId]) as { id: string }[]
  for (const row of orphans) fault('entry-differs', { postingId: row.id }, 'The posting has no entries.')
}

async function checkBalances(tx: Tx, companyId: string, fault: Fault): Promise<void> {
  const rows = await tx.query(
    `select coalesce(b.account_id, s.account_id) as account_id, coalesce(b.refrigerant, s.refrigerant) as refrigerant,
            coalesce(b.mass_kg, 0)::text as kept, coalesce(s.mass_kg, 0)::text as summed
       from (select * from balance where company_id = $1) b
       full join (select e.account_id, e.refrigerant, sum(e.mass_kg) as mass_kg
                    from entry e join account a on a.company_id = e.company_id and a.id = e.account_id
                   where e.company_id = $1 and a.kind in ('cylinder', 'circuit') group by 1, 2) s
         on s.account_id = b.account_id and s.refrigerant = b.refrigerant
      where coalesce(b.mass_kg, 0) <> coalesce(s.mass_kg, 0) limit ${MOST_FAULTS}`, [companyId]) as
    { account_id: string; refrigerant: string; kept: string; summed: string }[]
  for (const row of rows) fault('balance-differs', { accountId: row.account_id }, `The kept balance of ${row.refrigerant} is ${row.kept} kg, its entries sum to ${row.summed} kg.`)
}
