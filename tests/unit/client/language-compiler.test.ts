import { compile, createCoreContext, translate } from '@intlify/core-base'
import { describe, expect, it } from 'vitest'
import { en } from '../../../shared/language/en'
import { compileMessage } from '../../../src/language-compiler'

const sentences = (node: object, path = ''): [string, string][] =>
  Object.entries(node).flatMap(([key, value]): [string, string][] => (typeof value === 'string' ? [[`${path}${key}`, value]] : sentences(value, `${path}${key}.`)))

const namesIn = (sentence: string): Record<string, string> =>
  Object.fromEntries([...sentence.matchAll(/\{\s*(\w+)\s*\}/g)].map(([, name]) => [name ?? '', `‹${name}›`]))

const reader = (messageCompiler: typeof compileMessage) => {
  const context = createCoreContext({ locale: 'en', messages: { en }, messageCompiler, missingWarn: false, fallbackWarn: false })
  return (key: string, named: Record<string, unknown>, count?: number) =>
    count === undefined ? translate(context, key, named) : translate(context, key, { ...named, count }, count)
}

describe('messages read by the client; the general compiler of the i18n library is the outside value', () => {
  const ours = reader(compileMessage)
  const general = reader(compile)

  it('gives every sentence of the language file as the server gives it', () => {
    const different = sentences(en).filter(([key, sentence]) => ours(key, namesIn(sentence)) !== general(key, namesIn(sentence)))
    expect(different).toEqual([])
  })

  it('chooses singular and plural as the server does', () => {
    const plural = sentences(en).filter(([, sentence]) => sentence.includes(' | '))
    expect(plural.length).toBeGreaterThan(0)
    for (const [key, sentence] of plural) {
      for (const count of [0, 1, 2, 50]) expect([key, count, ours(key, namesIn(sentence), count)]).toEqual([key, count, general(key, namesIn(sentence), count)])
    }
  })

  it.each([
    ["technician{'@'}company.example", {}, 'technician@company.example'],
    ['{ mass } of {full}', { mass: '1 lb', full: '2 lb' }, '1 lb of 2 lb'],
    ['  spaced  out ', {}, '  spaced  out '],
  ])('reads "%s"', (sentence, named, expected) => {
    const context = createCoreContext({ locale: 'en', messages: { en: { sentence } }, messageCompiler: compileMessage })
    expect(translate(context, 'sentence', named)).toBe(expected)
  })
})
