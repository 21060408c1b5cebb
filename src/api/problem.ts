import type { FieldProblem, ProblemBody } from '../../shared/api/problem'

/** What a failure of the way to the server can be; views handle these four. */
export type Problem =
  | { kind: 'offline' }
  | { kind: 'refused'; body: ProblemBody }
  | { kind: 'signed-out' }
  | { kind: 'ours'; id: string | null }

/** Thrown by everything in src/api; anything else that is thrown is a mistake of ours. */
export class RequestFailure extends Error {
  override readonly name = 'RequestFailure'

  constructor(readonly problem: Problem) {
    super(problem.kind === 'refused' ? problem.body.detail : problem.kind)
  }
}

/** The problem behind whatever was thrown. */
export const toProblem = (thrown: unknown): Problem =>
  thrown instanceof RequestFailure ? thrown.problem : { kind: 'ours', id: null }

/** Whether a request was called off by ourselves and nothing needs to be shown. */
export const isCalledOff = (thrown: unknown): boolean => thrown instanceof DOMException && thrown.name === 'AbortError'

/** The wrong fields of a problem, empty where it has none. */
export const fieldProblemsOf = (problem: Problem | null): FieldProblem[] =>
  problem?.kind === 'refused' ? problem.body.errors ?? [] : []

/** Whether the server refused with this code. */
export const isRefusedWith = (problem: Problem | null, code: string): boolean =>
  problem?.kind === 'refused' && problem.body.code === code

/** What an answer that is not a success means. */
export async function problemOfResponse(response: Response): Promise<Problem> {
  const body = await readProblemBody(response)
  if (response.status === 401 && body?.code !== 'wrong-credentials') return { kind: 'signed-out' }
  if (response.status >= 500) return { kind: 'ours', id: body?.instance ?? null }
  return body ? { kind: 'refused', body } : { kind: 'ours', id: null }
}

async function readProblemBody(response: Response): Promise<ProblemBody | null> {
  if (!response.headers.get('content-type')?.includes('json')) return null
  try {
    const body: unknown = await response.json()
    return isProblemBody(body) ? body : null
  } catch {
    return null
  }
}

function isProblemBody(body: unknown): body is ProblemBody {
  return typeof body === 'object' && body !== null && 'code' in body && typeof body.code === 'string' && 'detail' in body && typeof body.detail === 'string'
}
