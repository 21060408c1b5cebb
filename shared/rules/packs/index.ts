import type { RulePack } from '../pack'
import { usHfc } from './us-hfc'
import { usOds } from './us-ods'

/** Every pack that a site can switch on. */
export const PACKS: readonly RulePack[] = [usOds, usHfc]
export const PACK_IDS: readonly string[] = PACKS.map((pack) => pack.id)
