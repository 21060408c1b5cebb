import type { Mass } from '../mass/mass'
import { containsHfc, isOzoneDepleting, refrigerantOf } from '../refrigerants/catalogue'
import { gwpOf } from '../refrigerants/gwp'
import type { Category } from './categories'
import type { CircuitFacts } from './engine'

/**
 * What the rules need to know of a circuit, from its own data.
 *
 * @param refrigerant  designation of the catalogue
 * @throws RangeError if the refrigerant is not in the catalogue
 */
export function factsOf(circuit: {
  packIds: readonly string[]
  refrigerant: string
  category: Category
  fullChargeKg: Mass | null
  subsectorDecision: CircuitFacts['subsectorDecision']
}): CircuitFacts {
  const refrigerant = refrigerantOf(circuit.refrigerant)
  return {
    ...circuit,
    refrigerant: { isOzoneDepleting: isOzoneDepleting(refrigerant), containsHfc: containsHfc(refrigerant), gwp: gwpOf(refrigerant.id)?.toFixed() ?? null },
  }
}
