/** A column of a LedgerTable. What stands in it: the slot `cell-<key>`, or `text`. */
export interface LedgerColumn<Row> {
  key: string
  label: string
  text?: (row: Row) => string
  /** The list's sort key; without it the column does not sort. */
  sort?: string
  /** Numbers stand at the end, in columns. */
  isNumber?: boolean
  /** CSS width on the desk. */
  width?: string
  /** Left out on the phone, where the row says enough without it. */
  isDeskOnly?: boolean
}
