import { STYLE, type TextStyle } from './look'
import type { Sheet } from './sheet'

export interface Fact {
  label: string
  value: string
  style?: TextStyle
}

const MOST_KEPT = 6 // [lines] of a value that are kept on one page
const GAP = { x: 14, y: 5 } // [pt]

/** Labels with their values in columns, as on the head of a form; each value as long as it needs to be. */
export function drawFacts(sheet: Sheet, facts: readonly Fact[], { columns = 3, x = sheet.left, width = sheet.width } = {}): void {
  const columnWidth = (width - GAP.x * (columns - 1)) / columns
  const list = sheet.open('L')
  for (let at = 0; at < facts.length; at += columns) {
    const row = facts.slice(at, at + columns).map((fact) => {
      const style = fact.style ?? STYLE.value
      return { ...fact, style, lines: sheet.pen.lines(fact.value, style, columnWidth) }
    })
    drawFactRow(sheet, row, x, columnWidth)
  }
  sheet.close(list)
}

interface LaidFact {
  label: string
  style: TextStyle
  lines: string[]
}

function drawFactRow(sheet: Sheet, row: readonly LaidFact[], x: number, width: number): void {
  const labelHeight = sheet.pen.lineHeight(STYLE.label)
  const lineHeight = sheet.pen.lineHeight(STYLE.value)
  const most = Math.max(...row.map((fact) => fact.lines.length))
  sheet.need(labelHeight + Math.min(most, MOST_KEPT) * lineHeight)
  const isWhole = sheet.y + labelHeight + most * lineHeight <= sheet.bottom
  const leftOf = (index: number): number => x + index * (width + GAP.x)
  if (isWhole) {
    row.forEach((fact, index) => drawFact(sheet, fact, leftOf(index), sheet.y, lineHeight))
    sheet.y += labelHeight + most * lineHeight
  } else drawLongRow(sheet, row, leftOf, lineHeight, most)
  sheet.space(GAP.y)
}

/** A label and its value below, in the order in which they are read. */
function drawFact(sheet: Sheet, { label, style, lines }: LaidFact, x: number, top: number, lineHeight: number): void {
  const item = sheet.open('LI')
  sheet.tagged('Lbl', () => sheet.pen.write(label, x, top, STYLE.label))
  const first = top + sheet.pen.lineHeight(STYLE.label)
  sheet.tagged('LBody', () => lines.forEach((line, at) => sheet.pen.write(line, x, first + at * lineHeight, style)))
  sheet.close(item)
}

/** Values that go over the end of the page: line by line across the row, so that each page is left once. */
function drawLongRow(sheet: Sheet, row: readonly LaidFact[], leftOf: (index: number) => number, lineHeight: number, most: number): void {
  const labelTop = sheet.y
  const items = row.map((fact, index) => {
    const item = sheet.open('LI')
    sheet.tagged('Lbl', () => sheet.pen.write(fact.label, leftOf(index), labelTop, STYLE.label))
    const body = sheet.open('LBody')
    sheet.suspend(body)
    sheet.suspend(item)
    return { fact, item, body, left: leftOf(index) }
  })
  sheet.y += sheet.pen.lineHeight(STYLE.label)
  for (let at = 0; at < most; at += 1) {
    sheet.need(lineHeight)
    const y = sheet.y
    for (const { fact, left, body } of items) {
      const line = fact.lines[at]
      if (line !== undefined) body.add(() => sheet.pen.write(line, left, y, fact.style))
    }
    sheet.y += lineHeight
  }
  for (const { item, body } of items) {
    body.end()
    item.end()
  }
}
