import { describe, expect, it } from 'vitest'
import { CAUTION_CODES, cautionsFor, WORK_STEPS } from '../../../shared/field/cautions'
import { en } from '../../../shared/language/en'

describe('what to be warned of, step by step; common practice, no published source', () => {
  it.each([
    ['arrive', 'A1', ['height']],
    ['search', 'A1', ['vapour']],
    ['recover', 'A1', ['liquid', 'vapour', 'fill']],
    ['repair', 'A1', ['nitrogen', 'brazing', 'lock-out', 'vapour']],
    ['pressure-test', 'A1', ['nitrogen']],
    ['evacuate', 'A1', []],
    ['charge', 'A1', ['liquid', 'vapour']],
    ['run', 'A1', ['liquid']],
  ] as const)('%s with an %s gas: %j', (step, safetyClass, expected) => {
    expect(cautionsFor(step, safetyClass)).toEqual(expected)
  })
  it.each([
    ['A2L', ['flammable']], ['A2', ['flammable']], ['A3', ['flammable']], ['B1', ['toxic']], ['B2L', ['flammable', 'toxic']], ['A1', []],
  ] as const)('a gas of class %s adds %j to every step, in front', (safetyClass, added) => {
    for (const step of WORK_STEPS) expect(cautionsFor(step, safetyClass)).toEqual([...added, ...cautionsFor(step, null)])
  })
  it('each has its text, each text a caution, and each is shown at some step', () => {
    expect(Object.keys(en.cautions).sort()).toEqual([...CAUTION_CODES].sort())
    const shown = new Set(WORK_STEPS.flatMap((step) => cautionsFor(step, 'B2L')))
    expect([...shown].sort()).toEqual([...CAUTION_CODES].sort())
  })
})
