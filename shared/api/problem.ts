/** One wrong field: `field` is its path in the body, such as "address.postalCode". */
export interface FieldProblem {
  field: string
  message: string
}

/** An error on the wire: application/problem+json, RFC 9457, with our `code` and `errors`. */
export interface ProblemBody {
  type: string
  title: string
  status: number
  detail: string
  instance: string
  code: string
  errors?: FieldProblem[]
}
