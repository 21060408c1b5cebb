import type { Actor } from '../../actor'
import type { Tx } from '../../database'
import type { Making } from '../../papers/leak-rate-summary'
import { companyName } from './places.repository'

/** Who has a paper made, for which company, and when: stands at its foot. */
export const makingOf = async (tx: Tx, who: Actor, madeAt: Date): Promise<Making> =>
  ({ locale: who.locale, personName: who.name, companyName: await companyName(tx, who.companyId), madeAt })
