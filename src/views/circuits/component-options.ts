import type { WireCircuit } from '../../../shared/api/places'

/** The components of a circuit to choose from, and the words for none. */
export const componentOptions = ({ components }: Pick<WireCircuit, 'components'>, none: string): { value: string | null; label: string }[] =>
  [{ value: null, label: none }, ...components.map(({ id, name, position }) => ({ value: id, label: position ? `${name}, ${position}` : name }))]
