import type { PostingDraft, PostingKind } from '../../../shared/api/ledger'
import { kg } from '../../../shared/mass/mass'
import type { AccountRef, Entry, OriginalPosting } from '../../../shared/mass/states'
import { toKgText } from '../../../shared/mass/mass'
import { prepared, type Tx } from '../../database'
import lockSql from './lock.sql?raw'
import readStatesSql from './read-states.sql?raw'
import writePostingSql from './write-posting.sql?raw'

/** A row of read-states.sql; every column is null where the draft does not name it or the row is not ours. */
export type StatesRow = Record<string, string | null> & { known_hash: Buffer | null }

export async function lockAccounts(tx: Tx, companyId: string, ids: string[]): Promise<void> {
  await prepared(tx, 'lock-accounts', lockSql, [companyId, ids])
}

export async function readStates(tx: Tx, companyId: string, draft: PostingDraft): Promise<StatesRow> {
  const [row] = await prepared<StatesRow>(tx, 'read-states', readStatesSql, [
    companyId, draft.id, draft.cylinderId, draft.toCylinderId, draft.circuitId, draft.partnerId, draft.visitId, draft.leakId, draft.occurredOn,
  ])
  if (!row) throw new Error('read-states.sql gave no row.')
  return row
}

export interface PostingToWrite {
  draft: PostingDraft
  entries: readonly Entry[]
  siteId: string | null
  customerId: string | null
  personId: string
  contentHash: Buffer
}

/** @returns whether it was written; false where a posting of this id stands already @throws Error if an account is missing: a mistake of ours */
export async function writePosting(tx: Tx, companyId: string, posting: PostingToWrite): Promise<boolean> {
  const lines = posting.entries.map(({ account, refrigerant, massKg }, index) => ({
    line: index + 1, accountKind: account.kind, accountId: idOf(account), refrigerant, massKg: toKgText(massKg),
  }))
  const [row] = await prepared<{ written: number; lines: number }>(tx, 'write-posting', writePostingSql, [
    companyId, JSON.stringify({ ...posting.draft, siteId: posting.siteId, customerId: posting.customerId }), JSON.stringify(lines),
    posting.personId, posting.contentHash,
  ])
  if (row?.written === 1 && row.lines !== lines.length) throw new Error(`Posting ${posting.draft.id} names an account that does not exist.`)
  return row?.written === 1
}

const idOf = (account: AccountRef): string | null => ('id' in account ? account.id : null)

export interface OriginalRow extends OriginalPosting {
  draft: PostingDraft
  siteId: string | null
  customerId: string | null
  accountIds: string[]
}

/** The posting that a reversal takes back, with its entries in order; null if it is not there. */
export async function readOriginal(tx: Tx, companyId: string, id: string): Promise<OriginalRow | null> {
  const rows = await tx.query(
    `select p.*, e.account_id, e.refrigerant as entry_refrigerant, e.mass_kg as entry_mass_kg, a.kind as account_kind,
            (select r.id from posting r where r.company_id = p.company_id and r.reverses_id = p.id) as reversed_by_id
       from posting p
       join entry e on e.company_id = p.company_id and e.posting_id = p.id
       join account a on a.company_id = e.company_id and a.id = e.account_id
      where p.company_id = $1 and p.id = $2 order by e.line`, [companyId, id]) as Record<string, string>[]
  const [first] = rows
  if (!first) return null
  return {
    id, kind: first.kind as PostingKind, reversedById: first.reversed_by_id ?? null,
    draft: draftOf(first), siteId: first.site_id ?? null, customerId: first.customer_id ?? null,
    accountIds: rows.map((row) => row.account_id ?? ''),
    entries: rows.map((row) => ({
      account: refOf(row.account_kind ?? '', row.account_id ?? ''), refrigerant: row.entry_refrigerant ?? '', massKg: kg(row.entry_mass_kg ?? ''),
    })),
  }
}

function refOf(kind: string, id: string): AccountRef {
  if (kind === 'air' || kind === 'variance') return { kind }
  return { kind: kind === 'cylinder' || kind === 'circuit' ? kind : 'partner', id }
}

/**
 * The draft that a stored posting was made of, field for field, so that its content hash can be computed
 * again. The accounts of a reversal are those of the original and were not sent.
 */
export function draftOf(row: Record<string, unknown>): PostingDraft {
  const text = (name: string): string | null => (row[name] as string | null) ?? null
  const account = (name: string): string | null => (row.kind === 'reversal' ? null : text(name))
  return {
    id: text('id') ?? '', kind: text('kind') as PostingKind, occurredOn: text('occurred_on') as PostingDraft['occurredOn'],
    occurredAt: (row.occurred_at as Date).toISOString(), refrigerant: text('refrigerant') ?? '', massKg: text('mass_kg') ?? '',
    entered: row.entered as PostingDraft['entered'], cylinderId: account('cylinder_id'), toCylinderId: account('to_cylinder_id'),
    circuitId: account('circuit_id'), partnerId: account('partner_id'), visitId: text('visit_id'), leakId: text('leak_id'),
    purpose: text('purpose') as PostingDraft['purpose'], isComplete: row.is_complete as boolean, part: text('part'), workDone: text('work_done'),
    note: text('note'), reversesId: text('reverses_id'), reason: text('reason'),
  }
}

export async function contentHashOf(tx: Tx, companyId: string, id: string): Promise<Buffer | null> {
  const [row] = await tx.query('select content_hash from posting where company_id = $1 and id = $2', [companyId, id]) as { content_hash: Buffer }[]
  return row?.content_hash ?? null
}

/** The contents class of a cylinder follows what is put into it. */
export async function setContents(tx: Tx, companyId: string, cylinderId: string, contents: string, ownerCustomerId: string | null): Promise<void> {
  await tx.query('update cylinder set contents = $3, owner_customer_id = $4, version = version + 1 where company_id = $1 and id = $2',
    [companyId, cylinderId, contents, ownerCustomerId])
}
