import type PDFDocument from 'pdfkit'

/**
 * The few parts of pdfkit and its font reader that the papers use beyond the declared types: lines are broken
 * and set here, so that a word is shaped once per process, and page numbers are filled in at the end.
 */
export interface Typeface {
  unitsPerEm: number
  layout: (text: string, features: Record<string, boolean>) => {
    glyphs: { id: number; codePoints: number[]; advanceWidth: number }[]
    /** [units of the font] */
    positions: { xAdvance: number }[]
  }
}

export interface FontInternals {
  id: string
  font: Typeface
  /** The glyphs that this document uses, by their number in it. */
  subset: { includeGlyph: (glyphId: number) => number }
  /** [1/1000 of the size] by number in this document */
  widths: number[]
  unicode: number[][]
  ref: () => unknown
}

export interface PendingObject {
  end: (content: string) => void
}

export interface DocumentInternals {
  _font: FontInternals
  page: { fonts: Record<string, unknown>; xobjects: Record<string, unknown>; height: number; width: number }
  addContent: (content: string) => void
  ref: (data: object) => PendingObject
}

export const internalsOf = (document: InstanceType<typeof PDFDocument>): DocumentInternals => document as unknown as DocumentInternals
