import type { PlainDate } from '../dates/plain-date'

export const CYLINDER_KINDS = ['disposable', 'refillable', 'recovery'] as const
export const CYLINDER_CONTENTS = ['virgin', 'reclaimed', 'recovered', 'mixed'] as const
export const CYLINDER_STATUSES = ['in-use', 'returned', 'scrapped'] as const

export interface CylinderDraft {
  number: string
  kind: (typeof CYLINDER_KINDS)[number]
  refrigerant: string
  contents: (typeof CYLINDER_CONTENTS)[number]
  tareKg: string
  waterCapacityKg: string | null
  testDueOn: PlainDate | null
  status: (typeof CYLINDER_STATUSES)[number]
  holderId: string | null
  /** A place where nobody holds it, such as "Store, shelf 2". */
  place: string | null
  /** Whose gas it is, for recovered contents. */
  ownerCustomerId: string | null
}
export interface WireCylinder extends CylinderDraft {
  id: string
  contentKg: string
  /** [kg] greatest net mass at 80 % of the volume, null without a water capacity. */
  fillLimitKg: string | null
  holderName: string | null
  ownerCustomerName: string | null
  isPastTest: boolean
  version: number
  may: string[]
}

export const PARTNER_KINDS = ['supplier', 'reclaimer', 'destroyer'] as const
export interface PartnerDraft { name: string; kind: (typeof PARTNER_KINDS)[number]; address: string | null; certificate: string | null }
export interface WirePartner extends PartnerDraft { id: string; version: number; may: string[] }

/**
 * One row of the yearly cylinder ledger [kg]. Exactly:
 * opening + bought + recovered + received + transferred in + taken up + variance
 * = charged + returned + reclaimed + destroyed + transferred out + closing.
 * A reversal counts, with the opposite sign, in the column of what it takes back and in the year of its own date.
 */
export interface YearlyCylinderRow {
  refrigerant: string
  cylinderNumber: string
  openingKg: string
  boughtKg: string
  recoveredKg: string
  receivedKg: string
  /** From other cylinders of the company. */
  transferredInKg: string
  /** Opening stock that was entered within the year, when the book of a cylinder was begun. */
  takenUpKg: string
  chargedKg: string
  returnedKg: string
  reclaimedKg: string
  destroyedKg: string
  transferredOutKg: string
  /** Scale minus book: positive where more was found than the book said, negative where it was lost. */
  varianceKg: string
  closingKg: string
}
