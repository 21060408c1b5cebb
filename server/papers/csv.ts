import { stringify } from 'csv-stringify'

/** Signs with which a spreadsheet takes a cell for a formula, in half and full width, and those that hide one. */
const FORMULA = /^[=+\-@\t\r\n\0\uFF1D\uFF0B\uFF0D\uFF20]/

/** A cell of text: what a spreadsheet would take for a formula gets a leading apostrophe. Numbers do not come here. */
export const textCell = (text: string | null): string => {
  if (text === null) return ''
  return FORMULA.test(text) ? `'${text}` : text
}

/** Turns rows of finished cells into CSV as RFC 4180 has it: commas, CRLF, quotes where a cell needs them. */
export const csvWriter = (): NodeJS.ReadWriteStream =>
  stringify({ record_delimiter: '\r\n', quoted_match: /[\r\n]/ })
