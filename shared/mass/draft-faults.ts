import type { PostingDraft, PostingKind } from '../api/ledger'
import { isNegative, isZero, kg } from './mass'

/** A field of the draft that names an account, or the posting that is taken back. */
export type AccountField = 'cylinderId' | 'toCylinderId' | 'circuitId' | 'partnerId' | 'reversesId'

/** Which accounts each kind of posting names; every other one stays null or is ignored. */
export const ACCOUNTS_OF_KIND: Record<PostingKind, readonly AccountField[]> = {
  'purchase': ['partnerId', 'cylinderId'],
  'receipt': ['partnerId', 'cylinderId'],
  'charge': ['cylinderId', 'circuitId'],
  'recovery': ['circuitId', 'cylinderId'],
  'loss': ['circuitId'],
  'transfer': ['cylinderId', 'toCylinderId'],
  'return': ['cylinderId', 'partnerId'],
  'reclaim': ['cylinderId', 'partnerId'],
  'destruction': ['cylinderId', 'partnerId'],
  'variance': ['cylinderId'],
  'opening-stock': ['cylinderId'],
  'opening-charge': ['circuitId'],
  'reversal': ['reversesId'],
}

/** Something missing or senseless in a draft, before any balance is looked at. */
export type DraftFault =
  | { code: 'account-missing'; field: AccountField }
  | { code: 'same-cylinder'; field: 'toCylinderId' }
  | { code: 'mass-unreadable' | 'mass-zero' | 'mass-negative'; field: 'massKg' }
  | { code: 'reason-missing'; field: 'reason' }

/**
 * What keeps a draft from being a posting at all, all faults at once; empty if it can be built.
 * A reversal is not asked for its mass: the original's entries decide.
 */
export function draftFaults(draft: PostingDraft): DraftFault[] {
  const faults: DraftFault[] = []
  for (const field of ACCOUNTS_OF_KIND[draft.kind]) {
    if (!draft[field]) faults.push({ code: 'account-missing', field })
  }
  if (draft.kind === 'transfer' && draft.cylinderId && draft.cylinderId === draft.toCylinderId)
    faults.push({ code: 'same-cylinder', field: 'toCylinderId' })
  if (draft.kind === 'reversal') {
    if (!draft.reason?.trim()) faults.push({ code: 'reason-missing', field: 'reason' })
    return faults
  }
  const massFault = faultOfMass(draft)
  if (massFault) faults.push({ code: massFault, field: 'massKg' })
  return faults
}

function faultOfMass({ kind, massKg }: PostingDraft): 'mass-unreadable' | 'mass-zero' | 'mass-negative' | null {
  try {
    const mass = kg(massKg)
    if (isZero(mass)) return 'mass-zero'
    return isNegative(mass) && kind !== 'variance' ? 'mass-negative' : null
  } catch {
    return 'mass-unreadable'
  }
}
