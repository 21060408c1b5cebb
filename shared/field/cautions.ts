import { isFlammableClass, isToxicClass, type SafetyClass } from '../refrigerants/catalogue'

/** The steps of a leak call, in working order. */
export const WORK_STEPS = ['arrive', 'search', 'recover', 'repair', 'pressure-test', 'evacuate', 'charge', 'run'] as const
export type WorkStep = (typeof WORK_STEPS)[number]

/** Something that may hurt a person; its text stands under `cautions` in the language file by `code`. */
interface Caution {
  code: CautionCode
  steps: readonly WorkStep[]
  gases: 'all' | 'flammable' | 'toxic'
}
export const CAUTION_CODES = ['flammable', 'toxic', 'nitrogen', 'brazing', 'lock-out', 'height', 'liquid', 'vapour', 'fill'] as const
export type CautionCode = (typeof CAUTION_CODES)[number]

/** The most dangerous first. Common practice, no published source; the safety sheet and local rules go first. */
const CAUTIONS: readonly Caution[] = [
  { code: 'flammable', steps: WORK_STEPS, gases: 'flammable' },
  { code: 'toxic', steps: WORK_STEPS, gases: 'toxic' },
  { code: 'nitrogen', steps: ['repair', 'pressure-test'], gases: 'all' },
  { code: 'brazing', steps: ['repair'], gases: 'all' },
  { code: 'lock-out', steps: ['repair'], gases: 'all' },
  { code: 'height', steps: ['arrive'], gases: 'all' },
  { code: 'liquid', steps: ['recover', 'charge', 'run'], gases: 'all' },
  { code: 'vapour', steps: ['search', 'recover', 'repair', 'charge'], gases: 'all' },
  { code: 'fill', steps: ['recover'], gases: 'all' },
]

/**
 * What to be warned of at a step of the work with a gas.
 *
 * @param safetyClass  of the gas; null while it is not known, and then what depends on it is left out
 * @returns codes, the most dangerous first
 */
export const cautionsFor = (step: WorkStep, safetyClass: SafetyClass | null): CautionCode[] =>
  CAUTIONS.filter(({ steps, gases }) => steps.includes(step) && isAbout(gases, safetyClass)).map(({ code }) => code)

function isAbout(gases: Caution['gases'], safetyClass: SafetyClass | null): boolean {
  switch (gases) {
    case 'all': return true
    case 'flammable': return safetyClass !== null && isFlammableClass(safetyClass)
    case 'toxic': return safetyClass !== null && isToxicClass(safetyClass)
    default: return gases satisfies never
  }
}
