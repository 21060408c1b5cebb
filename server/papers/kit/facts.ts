import { STYLE, type TextStyle } from './look'
import type { Sheet } from './sheet'

export interface Fact {
  label: string
  value: string
  style?: TextStyle
}

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

function drawFactRow(sheet: Sheet, row: readonly { label: string; style: TextStyle; lines: string[] }[], x: number, width: number): void {
  const labelHeight = sheet.pen.lineHeight(STYLE.label)
  const most = Math.max(...row.map((fact) => fact.lines.length))
  const lineHeight = sheet.pen.lineHeight(STYLE.value)
  sheet.need(labelHeight + Math.min(most, 6) * lineHeight)
  const items = row.map((fact, index) => {
    const left = x + index * (width + GAP.x)
    const item = sheet.open('LI')
    const labelTop = sheet.y
    sheet.tagged('Lbl', () => sheet.pen.write(fact.label, left, labelTop, STYLE.label))
    const body = sheet.open('LBody')
    sheet.suspend(body)
    sheet.suspend(item)
    return { fact, left, item, body }
  })
  sheet.y += labelHeight
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
  sheet.space(GAP.y)
}
