import type PDFDocument from 'pdfkit'
import { fontFile } from './fonts'
import { internalsOf, type DocumentInternals, type FontInternals } from './internals'
import { shapeWord, type Glyph } from './shaper'
import { LEADING, type TextStyle, type Weight } from './look'

/** A word shaped once: its glyphs as an operand of TJ, and its width at size 1. */
interface Shaped {
  glyphs: string
  width: number
  isWhole: boolean
}

const MOST_SHAPED = 20_000 // words kept per font and document; beyond it the store is emptied
const NUMBER = /^[\d.,−–%]+$/ // a hyphen of tabular width would tear names such as R-410A apart
const MISSING = 0 // the glyph of a sign that the font lacks
const JOINED = /[\u00a0\u202f]/ // spaces at which no line is broken
const UNSEEN = /[\u200b-\u200f\u202a-\u202e\u2060-\u2069\ufeff]/g // turn text around or take no room: no place in a record
// eslint-disable-next-line no-control-regex -- control signs are what is looked for
const CONTROL = /[\u0000-\u0009\u000b-\u001f\u007f-\u009f]/g

/** Shapes, measures, breaks and writes text. One per document. */
export class Pen {
  private readonly internals: DocumentInternals
  private readonly fonts: Record<Weight, FontInternals>
  private readonly shaped = { regular: new Map<string, Shaped>(), semibold: new Map<string, Shaped>(), figures: { regular: new Map<string, Shaped>(), semibold: new Map<string, Shaped>() } }

  constructor(private readonly document: InstanceType<typeof PDFDocument>) {
    this.internals = internalsOf(document)
    this.fonts = { regular: this.open('regular'), semibold: this.open('semibold') }
  }

  font(weight: Weight): FontInternals {
    return this.fonts[weight]
  }

  /** [pt] of one line. */
  lineHeight(style: TextStyle): number {
    return style.size * LEADING
  }

  /** [pt] of a text without line breaks. */
  width(text: string, style: TextStyle): number {
    return this.pieces(text, style).reduce((sum, piece) => sum + piece.width, 0) * style.size
  }

  /** Breaks a text into lines of at most a width [pt]: at spaces, and within a word only where it alone is too long. */
  lines(text: string, style: TextStyle, width: number): string[] {
    return clean(text).split('\n').flatMap((paragraph) => this.breakParagraph(paragraph, style, width))
  }

  /** Writes one line with its top left corner at x, y [pt]. */
  write(line: string, x: number, y: number, style: TextStyle): void {
    const pieces = this.pieces(line, style)
    if (pieces.length === 0) return
    const font = this.fonts[style.weight]
    this.internals.page.fonts[font.id] ??= font.ref()
    const baseline = y + (this.lineHeight(style) - style.size) / 2 + style.size * 0.79 // Inter's letters stand in the middle of the line
    const isWhole = pieces.every((piece) => piece.isWhole)
    if (!isWhole) this.document.markContent('Span', { actual: line })
    this.internals.addContent(`${inkOf(style.colour)} rg BT /${font.id} ${style.size} Tf 1 0 0 -1 ${round(x)} ${round(baseline)} Tm [${pieces.map((piece) => piece.glyphs).join(' ')}] TJ ET`)
    if (!isWhole) this.document.endMarkedContent()
  }

  /** The operand of TJ for a line, for content that is not on the page itself. */
  glyphs(line: string, style: TextStyle): string {
    return this.pieces(line, style).map((piece) => piece.glyphs).join(' ')
  }

  private open(weight: Weight): FontInternals {
    this.document.registerFont(weight, fontFile(weight)).font(weight)
    return this.internals._font
  }

  private breakParagraph(paragraph: string, style: TextStyle, width: number): string[] {
    const lines: string[] = []
    let line = ''
    let used = 0
    const space = this.shape(' ', style).width * style.size
    for (const word of paragraph.split(' ').filter(Boolean).flatMap((each) => this.fitting(each, style, width))) {
      const wide = this.wordWidth(word, style)
      if (line && used + space + wide > width) {
        lines.push(line)
        line = word
        used = wide
      } else {
        used += (line ? space : 0) + wide
        line = line ? `${line} ${word}` : word
      }
    }
    return [...lines, line]
  }

  /** A word in pieces that fit a line, parted after a hyphen where it has one. */
  private fitting(word: string, style: TextStyle, width: number): string[] {
    if (this.wordWidth(word, style) <= width) return [word]
    const parts: string[] = []
    let part = ''
    for (const sign of word) {
      if (part && this.width(part + sign, style) > width) {
        const cut = part.lastIndexOf('-') + 1 || part.length
        parts.push(part.slice(0, cut))
        part = part.slice(cut)
      }
      part += sign
    }
    return [...parts, part]
  }

  private wordWidth(word: string, style: TextStyle): number {
    return JOINED.test(word) ? this.width(word, style) : this.shape(word, style).width * style.size
  }

  private pieces(text: string, style: TextStyle): Shaped[] {
    const space = this.shape(' ', style)
    const pieces: Shaped[] = []
    text.split(/[ \u00a0\u202f]/).forEach((word, index) => {
      if (index > 0) pieces.push(space)
      if (word) pieces.push(this.shape(word, style))
    })
    return pieces
  }

  private shape(word: string, style: TextStyle): Shaped {
    const isNumber = style.hasTabularFigures === true && NUMBER.test(word)
    const store = isNumber ? this.shaped.figures[style.weight] : this.shaped[style.weight]
    const known = store.get(word)
    if (known) return known
    const font = this.fonts[style.weight]
    const run = shapeWord(word, style.weight, isNumber)
    const glyphs = run.map((glyph) => {
      const code = codeIn(font, glyph)
      const kern = round(glyph.advanceWidth - glyph.xAdvance)
      return `<${code.toString(16).padStart(4, '0')}>${kern === '0' ? '' : ` ${kern}`}`
    })
    const shaped = { glyphs: glyphs.join('').replaceAll('><', ''), width: run.reduce((sum, glyph) => sum + glyph.xAdvance, 0) / 1000, isWhole: run.every((glyph) => glyph.id !== MISSING) }
    if (store.size >= MOST_SHAPED) store.clear()
    store.set(word, shaped)
    return shaped
  }
}

/** Text as it may stand on paper: no control signs but line breaks. */
const clean = (text: string): string =>
  text.toWellFormed().normalize('NFC').replace(/\r\n?|\u2028|\u2029/g, '\n').replace(CONTROL, ' ').replace(UNSEEN, '')

/** The number of a glyph in this document; a glyph new to it is entered with its width and what it stands for. */
function codeIn({ subset, widths, unicode }: FontInternals, { id, advanceWidth, codePoints }: Glyph): number {
  const code = subset.includeGlyph(id)
  widths[code] ??= advanceWidth
  unicode[code] ??= codePoints
  return code
}

const inks = new Map<string, string>()

/** A colour "#rrggbb" as the operands of rg. */
export function inkOf(colour: string): string {
  const known = inks.get(colour)
  if (known) return known
  const ink = [1, 3, 5].map((at) => round(Number.parseInt(colour.slice(at, at + 2), 16) / 255)).join(' ')
  inks.set(colour, ink)
  return ink
}

const round = (value: number): string => String(Math.round(value * 1000) / 1000)
