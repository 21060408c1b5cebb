import { PROBLEMS, type ProblemCode } from '../shared/api/problems'

/** A wrong field and the key of its sentence under `validation` in the language file. */
export interface FieldFault {
  field: string
  key: string
  params?: Record<string, unknown>
}

/** An expected no of the API. Thrown by services and middleware; one middleware writes the answer. */
export class Problem extends Error {
  readonly status: number
  constructor(
    readonly code: ProblemCode,
    readonly params: Record<string, unknown> = {},
    readonly faults: FieldFault[] = [],
    readonly retryAfterSeconds: number | null = null,
  ) {
    super(code)
    this.status = PROBLEMS[code]
  }
}

/** A row that is not there, or is another company's: the two look alike. */
export const notFound = (subject: string): Problem => new Problem('not-found', { subject })
/** One wrong field. */
export const badField = (field: string, key: string, params?: Record<string, unknown>): Problem =>
  new Problem('bad-input', {}, [{ field, key, params }])
