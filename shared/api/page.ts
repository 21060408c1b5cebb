/** A page of a list by key. `next` goes back as `?after=`; null on the last page. */
export interface Page<Row> {
  rows: Row[]
  next: string | null
}

/** What every list takes from its address. */
export interface ListQuery {
  /** Words sought, without regard to case. */
  search?: string
  /** A sort key of that list, with a leading "-" for descending. */
  sort?: string
  after?: string
  /** 1 to 200, 50 where not given. */
  limit?: number
}
