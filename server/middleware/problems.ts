import { randomUUID } from 'node:crypto'
import type { ErrorRequestHandler } from 'express'
import { QueryFailedError } from 'typeorm'
import type { ProblemBody } from '../../shared/api/problem'
import { PROBLEMS, type ProblemCode } from '../../shared/api/problems'
import type { House } from '../house'
import { say } from '../language'
import { Problem } from '../problem'

/** Constraints whose violation a person can mend, by name. */
const CONSTRAINT_PROBLEMS: Record<string, { code: ProblemCode; field?: string }> = {
  person_email: { code: 'email-taken', field: 'email' },
  customer_name: { code: 'name-taken', field: 'name' },
  system_tag: { code: 'name-taken', field: 'tag' },
  circuit_name: { code: 'name-taken', field: 'name' },
  partner_name: { code: 'name-taken', field: 'name' },
  cylinder_number: { code: 'name-taken', field: 'number' },
  posting_reversed_once: { code: 'already-reversed' },
}
const UNIQUE_VIOLATION = '23505'
/** The server is going down, has no room or does not answer: later it may work. */
const UNAVAILABLE = /^(08|53|57P0|58|ECONN|EPIPE|ETIMEDOUT)/
const RETRY_AFTER_SECONDS = 5

/** Any error as an expected no; null for a mistake of ours. */
export function problemFrom(error: unknown): Problem | null {
  if (error instanceof Problem) return error
  if (error instanceof QueryFailedError || hasCode(error)) {
    const cause = (error instanceof QueryFailedError ? error.driverError : error) as { code?: string; constraint?: string; message?: string }
    const mendable = cause.code === UNIQUE_VIOLATION && cause.constraint ? CONSTRAINT_PROBLEMS[cause.constraint] : undefined
    if (mendable) return new Problem(mendable.code, {}, mendable.field ? [{ field: mendable.field, key: 'taken' }] : [])
    if (cause.code && UNAVAILABLE.test(cause.code)) return new Problem('unavailable', {}, [], RETRY_AFTER_SECONDS)
  }
  // pg closes the socket without a code when the server is killed
  if (error instanceof Error && /^Connection terminated|timeout exceeded when trying to connect/.test(error.message)) return new Problem('unavailable', {}, [], RETRY_AFTER_SECONDS)
  return bodyProblem(error)
}

const hasCode = (error: unknown): error is { code: string } => typeof error === 'object' && error !== null && 'code' in error && typeof error.code === 'string'

/** What Express's own body reader throws carries a `type`. */
function bodyProblem(error: unknown): Problem | null {
  const kind = typeof error === 'object' && error !== null && 'type' in error ? error.type : null
  switch (kind) {
    case 'entity.too.large': return new Problem('body-too-large')
    case 'charset.unsupported': case 'encoding.unsupported': return new Problem('unsupported-media-type')
    case 'entity.parse.failed': case 'entity.verify.failed': case 'request.aborted': case 'request.size.invalid': return new Problem('unreadable-body')
    default: return error instanceof URIError ? new Problem('not-found', { subject: 'page' }) : null
  }
}

/** The one place that turns errors into application/problem+json (RFC 9457). */
export const writeProblems = (house: House): ErrorRequestHandler => (error, request, response, next) => {
  const id = randomUUID().slice(0, 8)
  const expected = problemFrom(error)
  if (!expected) house.log.error({ err: error, id, path: request.path }, 'mistake of ours')
  else if (expected.status >= 500) house.log.warn({ err: error, id, path: request.path }, expected.code)
  if (response.headersSent) {
    next(error)
    return
  }
  const problem = expected ?? new Problem('internal')
  if (problem.retryAfterSeconds !== null) response.set('Retry-After', String(problem.retryAfterSeconds))
  response.status(problem.status).type('application/problem+json').send(JSON.stringify(bodyOf(problem, `/requests/${id}`, String(response.locals.locale ?? 'en'))))
}

function bodyOf(problem: Problem, instance: string, locale: string): ProblemBody {
  const errors = problem.faults.map(({ field, key, params }) => ({ field, message: say(locale, `validation.${key}`, params) }))
  return {
    type: `/problems/${problem.code}`,
    title: say(locale, `problems.${problem.code}.title`, problem.params),
    status: PROBLEMS[problem.code],
    detail: say(locale, `problems.${problem.code}.detail`, { id: instance.split('/').pop(), ...problem.params }),
    instance,
    code: problem.code,
    ...(errors.length > 0 ? { errors } : {}),
  }
}
