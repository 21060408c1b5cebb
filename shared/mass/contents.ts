import type { PostingDraft } from '../api/ledger'
import { isPositive } from './mass'
import { circuitOf, cylinderOf, toCylinderOf, type CylinderContents, type CylinderState, type PostingStates } from './states'

/** What class of gas a cylinder holds, and whose it is where it was recovered. */
export interface ContentsClass {
  contents: CylinderContents
  ownerCustomerId: string | null
}

/** From the cleanest to the least; what is put together counts as the lesser of the two. */
const CLEANEST_FIRST: readonly CylinderContents[] = ['virgin', 'reclaimed', 'recovered', 'mixed']

/** The cylinder that a recovery or a transfer fills; null for every other kind. */
export function receivingCylinder(draft: PostingDraft, states: PostingStates): CylinderState | null {
  if (draft.kind === 'recovery') return cylinderOf(draft, states)
  return draft.kind === 'transfer' ? toCylinderOf(draft, states) : null
}

/**
 * What the filled cylinder holds after a recovery or a transfer; null where the class does not change by it.
 * An empty cylinder takes the class of what comes in. Otherwise the lesser class counts for all of it, so
 * recovered gas cannot become virgin gas by way of a cylinder that is labelled so. Whether the two may be
 * put together at all, `refusePosting` decides.
 */
export function contentsAfter(draft: PostingDraft, states: PostingStates): ContentsClass | null {
  const into = receivingCylinder(draft, states)
  if (!into) return null
  const incoming = incomingClass(draft, states)
  const after = isPositive(into.contentKg) ? lesser(into, incoming) : incoming
  return after.contents === into.contents && after.ownerCustomerId === into.ownerCustomerId ? null : after
}

function incomingClass(draft: PostingDraft, states: PostingStates): ContentsClass {
  if (draft.kind === 'recovery') {
    // A cylinder marked mixed stays so even when it is empty: it may not have been evacuated since.
    const isMixed = cylinderOf(draft, states).contents === 'mixed'
    return isMixed
      ? { contents: 'mixed', ownerCustomerId: null }
      : { contents: 'recovered', ownerCustomerId: circuitOf(draft, states).ownerCustomerId }
  }
  const { contents, ownerCustomerId } = cylinderOf(draft, states)
  return { contents, ownerCustomerId }
}

function lesser(a: ContentsClass, b: ContentsClass): ContentsClass {
  const { contents, ownerCustomerId } = CLEANEST_FIRST.indexOf(a.contents) >= CLEANEST_FIRST.indexOf(b.contents) ? a : b
  return { contents, ownerCustomerId }
}
