import type { WireCircuit } from '../api/places'
import type { Mass } from '../mass/mass'
import { factsOf } from './circuit-facts'
import type { CircuitFacts } from './engine'

/**
 * What the rules need to know of a circuit, from what came over the wire: the packs that its site has switched
 * on and the owner's decision on the subsector are read out of the reasons that the server gave.
 *
 * @param fullChargeKg  [kg] in force on the day that is asked about; null while nobody has determined it
 * @throws RangeError if the refrigerant is not in the catalogue
 */
export function factsFromWire(circuit: Pick<WireCircuit, 'packs' | 'refrigerant' | 'category'>, fullChargeKg: Mass | null): CircuitFacts {
  const { packs, refrigerant, category } = circuit
  const codes = new Set(packs.flatMap(({ reasons }) => reasons.map(({ code }) => code)))
  return factsOf({
    refrigerant, category, fullChargeKg,
    packIds: packs.filter(({ reasons }) => !reasons.some(({ code }) => code === 'switched-off')).map(({ packId }) => packId),
    subsectorDecision: codes.has('subsector-excepted') ? 'excepted' : codes.has('subsector-not-excepted') ? 'not-excepted' : null,
  })
}
