import type { PlainDate } from '../dates/plain-date'

/**
 * How well a value is founded. `read`: in the text of the law; `memory`: to be checked against the current
 * text, and shown so; `ours`: our reading of a silent text.
 */
export type Basis = 'read' | 'memory' | 'ours'

export interface Source {
  cite: string
  basis: Basis
}

export interface DatedValue<T> {
  /** The day from which it is in force. */
  from: PlainDate
  /** The last day on which it was in force, where nothing follows it at once. */
  until?: PlainDate
  value: T
  source: Source
  checkedOn: PlainDate
}

/** One value of the law over time. `name` is its key under `rules.values` in the language file. */
export interface Dated<T> {
  name: string
  values: readonly DatedValue<T>[]
}

/** @throws RangeError if there is no value, or the dates do not ascend or overlap */
export function dated<T>(parameter: Dated<T>): Dated<T> {
  if (parameter.values.length === 0) throw new RangeError(`${parameter.name} has no value.`)
  parameter.values.forEach((value, index) => {
    const before = parameter.values[index - 1]
    if (before && (before.until ?? before.from) >= value.from) throw new RangeError(`The dates of ${parameter.name} do not ascend at ${value.from}.`)
    if (value.until && value.until < value.from) throw new RangeError(`${parameter.name} ends before it begins on ${value.from}.`)
  })
  return parameter
}

/** The value in force on a day, or null before the first and in a gap. */
export function valueOnOrNone<T>(parameter: Dated<T>, on: PlainDate): DatedValue<T> | null {
  const value = parameter.values.findLast(({ from }) => from <= on)
  return value && (!value.until || on <= value.until) ? value : null
}

/** The value in force on a day. @throws RangeError naming the parameter before its first day and in a gap */
export function valueOn<T>(parameter: Dated<T>, on: PlainDate): DatedValue<T> {
  const value = valueOnOrNone(parameter, on)
  if (!value) throw new RangeError(`${parameter.name} is not in force on ${on}.`)
  return value
}
