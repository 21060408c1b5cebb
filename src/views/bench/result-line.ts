/** A line of a result, as shown and as it goes into a visit. */
export interface ResultLine {
  label: string
  value: string
}
