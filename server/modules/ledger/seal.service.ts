import type { Tx } from '../../database'
import { GENESIS, SEALED_COLUMNS, SealHash } from './seals'

const MOST_PER_SEAL = 1000 // postings; keeps a block's transaction short

/**
 * Closes the next block of a company's committed postings into a seal over the one before it.
 * Blocks are made one at a time per company, so postings never queue behind a chain.
 *
 * @returns how many postings were sealed; 0 where none waits or another process is at it
 */
export async function sealCompany(tx: Tx, companyId: string): Promise<number> {
  const [lock] = await tx.query(`select pg_try_advisory_xact_lock(hashtextextended('seal ' || $1, 0)) as got`, [companyId]) as { got: boolean }[]
  if (!lock?.got) return 0
  const waiting = await tx.query(
    `select p.id, ${SEALED_COLUMNS} as content from posting p
      where p.company_id = $1 and not exists (select from sealed_posting s where s.company_id = p.company_id and s.posting_id = p.id)
      order by p.recorded_at, p.id limit ${MOST_PER_SEAL}`, [companyId]) as { id: string; content: string }[]
  if (waiting.length === 0) return 0
  const [last] = await tx.query('select number, hash from seal where company_id = $1 order by number desc limit 1', [companyId]) as { number: number; hash: Buffer }[]
  const number = (last?.number ?? 0) + 1
  const previous = last?.hash ?? GENESIS
  const hash = new SealHash(previous, number)
  for (const { content } of waiting) hash.add(content)
  await tx.query('insert into seal (company_id, number, previous_hash, hash, posting_count) values ($1, $2, $3, $4, $5)',
    [companyId, number, previous, hash.digest(), waiting.length])
  await tx.query(
    `insert into sealed_posting (company_id, posting_id, seal_number, position)
     select $1, id, $2, position from unnest($3::uuid[]) with ordinality as s (id, position)`,
    [companyId, number, waiting.map(({ id }) => id)])
  return waiting.length
}
