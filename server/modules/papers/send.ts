import { pipeline } from 'node:stream/promises'
import { Readable } from 'node:stream'
import type { Response } from 'express'
import { csvWriter } from '../../papers/csv'
import type { Sheet } from '../../papers/kit/sheet'
import { STREAMED } from '../../route'

const MOST_NAME = 60 // [characters] of each part

/** A file name of our own making: of what people typed only letters and digits are left. */
export const fileNameOf = (parts: readonly string[], ending: 'pdf' | 'csv'): string =>
  `${parts.map((part) => part.normalize('NFKD').replace(/\p{M}/gu, '').replace(/[^A-Za-z0-9]+/g, '-').replace(/^-|-$/g, '').toLowerCase().slice(0, MOST_NAME)).filter(Boolean).join('_')}.${ending}`

function announce(response: Response, type: string, fileName: string): void {
  response.set({ 'Content-Type': type, 'Content-Disposition': `attachment; filename="${fileName}"`, 'X-Content-Type-Options': 'nosniff' })
}

/** Sends a paper while it is being drawn. A reader who goes away ends the drawing. */
export async function sendPdf(response: Response, { sheet, draw }: { sheet: Sheet; draw: () => Promise<void> }, fileName: string): Promise<typeof STREAMED> {
  announce(response, 'application/pdf', fileName)
  const sent = unlessGone(pipeline(sheet.document, response))
  try {
    await draw()
  } catch (error) {
    if (!sheet.document.destroyed) sheet.document.destroy(error instanceof Error ? error : undefined)
    if (!response.destroyed) throw error
  }
  await sent
  return STREAMED
}

/** Sends rows of cells as CSV as they come. */
export async function sendCsv(response: Response, cells: AsyncIterable<string[]>, fileName: string): Promise<typeof STREAMED> {
  announce(response, 'text/csv; charset=utf-8; header=present', fileName)
  await unlessGone(pipeline(Readable.from(cells), csvWriter(), response))
  return STREAMED
}

/** A reader who went away is no mistake of ours. */
async function unlessGone(sending: Promise<void>): Promise<void> {
  try {
    await sending
  } catch (error) {
    if (!(error instanceof Error && 'code' in error && error.code === 'ERR_STREAM_PREMATURE_CLOSE')) throw error
  }
}
