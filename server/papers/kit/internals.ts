import type PDFDocument from 'pdfkit'

/**
 * The few parts of pdfkit that the papers use beyond its declared types: lines are broken and set here, so
 * that a word is shaped once per document, and page numbers are filled in when the last page is known.
 */
export interface FontInternals {
  id: string
  /** [1/1000 of the size] */
  ascender: number
  descender: number
  ref: () => unknown
  encode: (text: string, features?: string[]) => [string[], { xAdvance: number; advanceWidth: number; xOffset: number; yOffset: number }[]]
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
