import { execFileSync } from 'node:child_process'
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import type supertest from 'supertest'

/** What another program (poppler's pdftotext) reads in a PDF, in the order in which the content was written; runs of white space are one space. */
export const pdfText = (pdf: Buffer): string => poppler('pdftotext', pdf, ['-raw', '-enc', 'UTF-8'], ['-']).replace(/\s+/g, ' ').trim()
/** Title, tags, page count, size, language and script of a PDF, one a line, by poppler's pdfinfo. */
export const pdfInfo = (pdf: Buffer): string => poppler('pdfinfo', pdf, [], [])

function poppler(program: string, pdf: Buffer, before: string[], after: string[]): string {
  const folder = mkdtempSync(join(tmpdir(), 'paper-'))
  try {
    const file = join(folder, 'paper.pdf')
    writeFileSync(file, pdf)
    return execFileSync(program, [...before, file, ...after], { encoding: 'utf8', stdio: ['ignore', 'pipe', 'inherit'] })
  } finally {
    rmSync(folder, { recursive: true })
  }
}

/** The answer of a test client as bytes. */
export const asBuffer = async (asked: supertest.Test): Promise<supertest.Response & { body: Buffer }> =>
  asked.buffer(true).parse((response, done) => {
    const parts: Buffer[] = []
    response.on('data', (part: Buffer) => parts.push(part))
    response.on('end', () => done(null, Buffer.concat(parts)))
  })
