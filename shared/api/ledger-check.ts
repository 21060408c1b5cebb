/** What a ledger check found wrong, with the place named. */
export interface LedgerFault {
  code: 'content-changed' | 'posting-missing' | 'posting-unknown' | 'seal-broken' | 'unbalanced' | 'balance-differs' | 'entry-differs' | 'seal-missing'
  postingId: string | null
  sealNumber: number | null
  accountId: string | null
  detail: string
}
export interface LedgerCheck {
  postings: number
  sealed: number
  waiting: number
  seals: number
  lastSealHash: string | null
  faults: LedgerFault[]
  checkedAt: string
}

export interface WireTrailRow {
  id: string
  at: string
  personName: string
  action: string
  subject: string
  subjectId: string
  subjectName: string
  before: Record<string, unknown> | null
  after: Record<string, unknown> | null
}
