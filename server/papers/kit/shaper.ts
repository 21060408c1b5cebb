import PDFDocument from 'pdfkit'
import { fontFile } from './fonts'
import { internalsOf, type Typeface } from './internals'
import type { Weight } from './look'

/** A sign of the font, its place and what it stands for; lengths in thousandths of the size. */
export interface Glyph {
  id: number
  codePoints: number[]
  advanceWidth: number
  /** With kerning. */
  xAdvance: number
}

const MOST_RUNS = 20_000 // words kept per process; beyond it the store is emptied
const PLAIN = { calt: false } // contextual forms would turn "1x2" into "1×2": a record shows what was typed
const FIGURES = { calt: false, tnum: true }

const typefaces = new Map<Weight, Typeface>()

/**
 * The typeface that shapes, read once. It is never that of a document which is written: embedding a font
 * leaves glyphs in it that no longer know what they stand for.
 */
function typefaceOf(weight: Weight): Typeface {
  const known = typefaces.get(weight)
  if (known) return known
  const reader = new PDFDocument({ autoFirstPage: false })
  reader.registerFont(weight, fontFile(weight)).font(weight)
  const typeface = internalsOf(reader)._font.font
  typefaces.set(weight, typeface)
  return typeface
}

let runs = new Map<string, Glyph[]>()

/**
 * The glyphs of a word, the same for every document. Shaping is what costs most in a paper, and papers
 * repeat their words.
 */
export function shapeWord(word: string, weight: Weight, isNumber: boolean): Glyph[] {
  const key = `${weight}${isNumber ? '#' : ' '}${word}`
  const known = runs.get(key)
  if (known) return known
  const typeface = typefaceOf(weight)
  const { glyphs, positions } = typeface.layout(word, isNumber ? FIGURES : PLAIN)
  const scale = 1000 / typeface.unitsPerEm
  const signs = Array.from(word, (sign) => sign.codePointAt(0) ?? 0)
  // a glyph of one sign stands for what was typed; one of several signs knows them itself
  const meant = (index: number): number[] | null => (glyphs.length === signs.length ? [signs[index] ?? 0] : null)
  const run = glyphs.map(({ id, codePoints, advanceWidth }, index) => ({
    id, codePoints: meant(index) ?? codePoints, advanceWidth: advanceWidth * scale, xAdvance: (positions[index]?.xAdvance ?? advanceWidth) * scale,
  }))
  if (runs.size >= MOST_RUNS) runs = new Map()
  runs.set(key, run)
  return run
}
