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
  /** On the phone: in the corner beside the first column; on a line of its own without a label; not at all. */
  onPhone?: 'corner' | 'whole' | 'hidden'
}
