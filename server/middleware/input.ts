import { plainToInstance } from 'class-transformer'
import { validateSync, type ValidationError } from 'class-validator'
import { Problem, type FieldFault } from '../problem'

export type DtoClass<T extends object = object> = new () => T

/**
 * Input as an instance of its DTO: known fields only, each of its own type, nothing converted silently.
 *
 * @throws Problem bad-input with every wrong field at once; not-found where a wrong path parameter can name no row
 */
export function readInto<T extends object>(dto: DtoClass<T>, input: unknown, from: 'params' | 'query' | 'body'): T {
  if (typeof input !== 'object' || input === null || Array.isArray(input)) throw new Problem('bad-input', {}, [{ field: '', key: 'object' }])
  const instance = plainToInstance(dto, input, { exposeUnsetFields: true })
  const errors = validateSync(instance, { whitelist: true, forbidNonWhitelisted: true, forbidUnknownValues: false })
  if (errors.length === 0) return instance
  if (from === 'params') throw new Problem('not-found', { subject: 'page' })
  throw new Problem('bad-input', {}, faultsOf(errors, ''))
}

function faultsOf(errors: ValidationError[], path: string): FieldFault[] {
  return errors.flatMap((error) => {
    const field = path ? `${path}.${error.property}` : error.property
    const own = Object.entries(error.constraints ?? {}).slice(0, 1).map(([constraint, message]) => faultOf(field, constraint, message))
    return [...own, ...faultsOf(error.children ?? [], field)]
  })
}

/** The field decorators of server/fields.ts leave a key and its numbers as JSON; a constraint of another origin goes by its own name. */
function faultOf(field: string, constraint: string, message: string): FieldFault {
  if (message.startsWith('{')) return { field, ...(JSON.parse(message) as Omit<FieldFault, 'field'>) }
  return { field, key: constraint === 'whitelistValidation' ? 'unknownField' : 'wrong' }
}
