import type { PlainDate } from '../dates/plain-date'

/** What a posting records. The entries of each kind stand in shared/mass/postings.ts. */
export const POSTING_KINDS = [
  'purchase', 'receipt', 'charge', 'recovery', 'loss', 'transfer', 'return', 'reclaim', 'destruction',
  'variance', 'opening-stock', 'opening-charge', 'reversal',
] as const
export type PostingKind = (typeof POSTING_KINDS)[number]

/** Why gas went in or came out; decides whether the law counts it into the leak rate. */
export const POSTING_PURPOSES = ['leak', 'seasonal', 'installation', 'retrofit', 'repair', 'retirement'] as const
export type PostingPurpose = (typeof POSTING_PURPOSES)[number]

/** Units in which a person reads a scale. */
export const MASS_UNITS = ['lb', 'lb-oz', 'oz', 'kg', 'g'] as const
export type MassUnit = (typeof MASS_UNITS)[number]

/** The scale readings as the person entered them, kept word for word beside the exact kilograms. */
export interface EnteredWeighing {
  unit: MassUnit
  /** Gross on the scale before; in lb-oz as "12-4.5". */
  before: string | null
  after: string | null
  /** The net amount, where it was given directly. */
  amount: string | null
}

/** A posting as the device makes it: everything in it is covered by the content hash. */
export interface PostingDraft {
  /** UUID v7, made when the form opens. */
  id: string
  kind: PostingKind
  /** The site's local date of the event. */
  occurredOn: PlainDate
  /** The instant of the event, ISO 8601 in UTC. */
  occurredAt: string
  refrigerant: string
  /** [kg] exact decimal text, > 0; a variance may be negative (the scale shows less than the book). */
  massKg: string
  entered: EnteredWeighing | null
  cylinderId: string | null
  /** The receiving cylinder of a transfer. */
  toCylinderId: string | null
  circuitId: string | null
  /** Supplier, reclaimer or destroyer. */
  partnerId: string | null
  visitId: string | null
  leakId: string | null
  purpose: PostingPurpose | null
  /** A charge that leaves the circuit at its full charge; a recovery that leaves it empty. */
  isComplete: boolean
  /** Part of the appliance worked on and the work done there, 40 CFR 82.157(l). */
  part: string | null
  workDone: string | null
  note: string | null
  /** Only for a reversal: the posting taken back, and why. */
  reversesId: string | null
  reason: string | null
}

export type AccountKind = 'cylinder' | 'circuit' | 'supplier' | 'reclaimer' | 'destroyer' | 'air' | 'variance'

/** One line of a posting; positive into the account. */
export interface WireEntry {
  accountKind: AccountKind
  accountId: string
  accountName: string
  refrigerant: string
  massKg: string
}

/** A posting as it stands in the ledger. */
export interface WirePosting extends PostingDraft {
  recordedAt: string
  personName: string
  circuitName: string | null
  siteName: string | null
  cylinderNumber: string | null
  toCylinderNumber: string | null
  partnerName: string | null
  /** The reversal that took this posting back, if one did. */
  reversedById: string | null
  contentHash: string
  entries: WireEntry[]
  may: string[]
}
