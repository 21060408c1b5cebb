import { createHash } from 'node:crypto'
import type { PostingDraft, PostingKind, WirePosting } from '../../../shared/api/ledger'
import { localDateOf, type PlainDate } from '../../../shared/dates/plain-date'
import { contentText } from '../../../shared/mass/content'
import { contentsAfter, receivingCylinder } from '../../../shared/mass/contents'
import { draftFaults } from '../../../shared/mass/draft-faults'
import { buildPosting } from '../../../shared/mass/postings'
import { refusePosting } from '../../../shared/mass/refusals'
import { may, type Actor } from '../../actor'
import type { Tx } from '../../database'
import { notFound, Problem, type FieldFault } from '../../problem'
import * as standing from '../standing/standing.service'
import { listPostings, postingById } from './postings.repository'
import { problemOfRefusal } from './refusal-problems'
import * as repository from './ledger.repository'
import { statesOf } from './states'

/** What each kind needs beyond `posting.create`. */
const STOCK_KINDS: readonly PostingKind[] = ['purchase', 'receipt', 'return', 'reclaim', 'destruction', 'opening-stock', 'opening-charge']
const PARTNER_OF_KIND: Partial<Record<PostingKind, string>> = {
  purchase: 'supplier', receipt: 'supplier', return: 'supplier', reclaim: 'reclaimer', destruction: 'destroyer',
}
/** The furthest zone is this far ahead of UTC: no site's today lies later. */
const FURTHEST_ZONE = 'Pacific/Kiritimati'

export interface Posted { id: string; isNew: boolean }

/**
 * Posts a draft once: a repeat with the same content gets the first answer, the same id with other
 * content is refused. Runs whole or not at all in the caller's transaction.
 *
 * @throws Problem a refusal of the trade with its sentence, bad-input, not-allowed, posting-id-reused
 */
export async function post(tx: Tx, who: Actor, sent: PostingDraft, now: Date): Promise<Posted> {
  demandKind(who, sent.kind)
  const original = sent.reversesId && sent.kind === 'reversal' ? await repository.readOriginal(tx, who.companyId, sent.reversesId) : null
  if (sent.kind === 'reversal' && sent.reversesId && !original) throw new Problem('bad-input', {}, [{ field: 'reversesId', key: 'posting.unknown-posting' }])
  const faults = draftFaults(sent)
  if (faults.length > 0) throw new Problem('bad-input', {}, faults.map(({ field, code }) => ({ field, key: `posting.${code}` })))

  // A reversal touches what the original touched; what the person sent names the original alone.
  const draft = original ? withoutAccounts(sent) : sent
  const touched = original ? { ...draft, ...accountsOf(original.draft) } : draft
  await repository.lockAccounts(tx, who.companyId, original?.accountIds ?? accountIdsOf(draft))
  const row = await repository.readStates(tx, who.companyId, touched)
  const contentHash = createHash('sha256').update(contentText(draft)).digest()
  if (row.known_hash) return sameAnswer(draft.id, row.known_hash, contentHash)

  const fresh = original ? await repository.readOriginal(tx, who.companyId, original.id) : null
  checkReferences(draft, touched, row)
  const states = statesOf(row, fresh)
  const refusal = refusePosting(draft, states, todayAt(row.circuit_time_zone ?? null, now))
  if (refusal) throw problemOfRefusal(refusal, row, who.locale)

  const isWritten = await repository.writePosting(tx, who.companyId, {
    draft: touched, entries: buildPosting(draft, states).entries, personId: who.personId, contentHash,
    siteId: original?.siteId ?? row.circuit_site_id ?? row.visit_site_id ?? null, customerId: original?.customerId ?? row.circuit_customer_id ?? null,
  })
  if (!isWritten) return sameAnswer(draft.id, await repository.contentHashOf(tx, who.companyId, draft.id), contentHash)
  const contents = original ? null : contentsAfter(draft, states)
  const into = receivingCylinder(draft, states)
  if (contents && into) await repository.setContents(tx, who.companyId, into.id, contents.contents, contents.ownerCustomerId)
  if (row.circuit_id) await standing.reviewLockedCircuits(tx, who.companyId, [row.circuit_id])
  return { id: draft.id, isNew: true }
}

/** @throws Problem not-found */
export async function getPosting(tx: Tx, who: Actor, id: string): Promise<WirePosting> {
  const posting = await postingById(tx, who, id)
  if (!posting) throw notFound('posting')
  return posting
}
export { listPostings }

function demandKind(who: Actor, kind: PostingKind): void {
  const isHeld = kind === 'reversal' ? may(who, 'posting.reverse') : STOCK_KINDS.includes(kind) ? may(who, 'posting.stock') : may(who, 'posting.create')
  if (!isHeld) throw new Problem('not-allowed')
}

function sameAnswer(id: string, known: Buffer | null, contentHash: Buffer): Posted {
  if (!known?.equals(contentHash)) throw new Problem('posting-id-reused')
  return { id, isNew: false }
}

type Accounts = Pick<PostingDraft, 'cylinderId' | 'toCylinderId' | 'circuitId' | 'partnerId'>
const accountsOf = ({ cylinderId, toCylinderId, circuitId, partnerId }: Accounts): Accounts => ({ cylinderId, toCylinderId, circuitId, partnerId })
export const withoutAccounts = (draft: PostingDraft): PostingDraft => ({ ...draft, cylinderId: null, toCylinderId: null, circuitId: null, partnerId: null })
const accountIdsOf = (draft: Accounts): string[] =>
  [draft.cylinderId, draft.toCylinderId, draft.circuitId].filter((id) => id !== null)

/** The date at the circuit's site; for what touches no site the latest date anywhere, so that no one's today is refused. */
const todayAt = (timeZone: string | null, now: Date): PlainDate => localDateOf(now.toISOString(), timeZone ?? FURTHEST_ZONE)

/** Every id of the draft must lead to a row of this company that fits the others. */
function checkReferences(draft: PostingDraft, touched: PostingDraft, row: repository.StatesRow): void {
  const faults: FieldFault[] = []
  const fault = (field: keyof PostingDraft, key: string): void => { faults.push({ field, key }) }
  if (touched.cylinderId && !row.cylinder_id) fault('cylinderId', 'posting.unknown-cylinder')
  if (touched.toCylinderId && !row.to_cylinder_id) fault('toCylinderId', 'posting.unknown-cylinder')
  if (touched.circuitId && !row.circuit_id) fault('circuitId', 'posting.unknown-circuit')
  if (touched.partnerId && !row.partner_id) fault('partnerId', 'posting.unknown-partner')
  else if (draft.partnerId && PARTNER_OF_KIND[draft.kind] !== row.partner_kind) fault('partnerId', 'posting.wrong-partner')
  if (draft.visitId && (!row.visit_id || (row.circuit_site_id && row.visit_site_id !== row.circuit_site_id))) fault('visitId', 'posting.unknown-visit')
  if (draft.leakId && (!row.leak_id || row.leak_circuit_id !== draft.circuitId)) fault('leakId', 'posting.unknown-leak')
  if (faults.length > 0) throw new Problem('bad-input', {}, faults)
}
