import type { EnteredWeighing, PostingDraft } from '../api/ledger'
import { kg, toKgText } from './mass'

/**
 * The text that the content hash of a posting covers: everything the person sent, as JSON in a fixed key
 * order. Equal content gives equal text on the phone, at the server and when it is read back from storage,
 * so masses, instants and ids are written in one way: "1.50" is "1.5", "…00Z" is "…00.000Z", ids are in
 * lower case. The instant of recording is not in it: a repeat arrives later.
 *
 * @throws RangeError if the mass or the instant cannot be read
 */
export function contentText(draft: PostingDraft): string {
  const content = {
    id: lowerCase(draft.id),
    kind: draft.kind,
    occurredOn: draft.occurredOn,
    occurredAt: new Date(draft.occurredAt).toISOString(),
    refrigerant: draft.refrigerant,
    massKg: toKgText(kg(draft.massKg)),
    entered: draft.entered && enteredContent(draft.entered),
    cylinderId: lowerCase(draft.cylinderId),
    toCylinderId: lowerCase(draft.toCylinderId),
    circuitId: lowerCase(draft.circuitId),
    partnerId: lowerCase(draft.partnerId),
    visitId: lowerCase(draft.visitId),
    leakId: lowerCase(draft.leakId),
    purpose: draft.purpose,
    isComplete: draft.isComplete,
    part: draft.part,
    workDone: draft.workDone,
    note: draft.note,
    reversesId: lowerCase(draft.reversesId),
    reason: draft.reason,
  } satisfies Record<keyof PostingDraft, unknown>
  return JSON.stringify(content, (_key, value: unknown) => value ?? null)
}

function enteredContent({ unit, before, after, amount }: EnteredWeighing): EnteredWeighing {
  return { unit, before: before ?? null, after: after ?? null, amount: amount ?? null }
}

const lowerCase = (id: string | null): string | null => id?.toLowerCase() ?? null
