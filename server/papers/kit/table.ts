import { COLOUR, MARGIN, STYLE, type TextStyle } from './look'
import type { Element, Sheet } from './sheet'
import { drawShape, type Shape } from './shapes'

export interface Column {
  title: string
  /** Stands below the title, where the numbers have one. */
  unit?: string
  /** Share of the width that is left beside the columns of fixed width; or a fixed width [pt]. */
  width: { share: number } | { points: number }
  align?: 'left' | 'right'
  /** The cells of this column say what the row is about. */
  isRowHeader?: boolean
}

export interface Cell {
  text: string
  style?: TextStyle
  /** A sign beside the word, so that colour never stands alone. */
  shape?: Shape
}

export interface Row {
  cells: (Cell | string)[]
  kind?: 'plain' | 'total' | 'alert'
}

const PADDING = { x: 4, top: 2.6, bottom: 2.8 } // [pt]
const SHAPE_ROOM = 9 // [pt]

interface Laid {
  lines: string[]
  style: TextStyle
  shape?: Shape
}

/** A table with ruled lines, its head repeated on every page. A row goes over to the next page whole where it fits there. */
export async function drawTable(sheet: Sheet, { columns, rows, summary }: { columns: readonly Column[]; rows: readonly Row[]; summary?: string }): Promise<void> {
  const widths = widthsOf(columns, sheet.width)
  const starts = startsOf(widths, sheet.left)
  const head = columns.map((column, index) => headOf(sheet, column, inner(widths[index])))
  const table = sheet.open('Table', summary ? { alt: summary } : {})
  sheet.need(heightOf(sheet, head) + 2 * sheet.pen.lineHeight(STYLE.cell) + 8)
  drawHead(sheet, columns, head, starts, widths, false)
  for (const row of rows) {
    const cells = row.cells.map((cell, index) => lay(sheet, cell, row, inner(widths[index])))
    drawRow(sheet, columns, cells, row, starts, widths, () => drawHead(sheet, columns, head, starts, widths, true))
    await sheet.breathe()
  }
  sheet.close(table)
  sheet.space(8)
}

const inner = (width = 0): number => width - 2 * PADDING.x

function widthsOf(columns: readonly Column[], whole: number): number[] {
  const fixed = columns.reduce((sum, { width }) => sum + ('points' in width ? width.points : 0), 0)
  const shares = columns.reduce((sum, { width }) => sum + ('share' in width ? width.share : 0), 0)
  return columns.map(({ width }) => ('points' in width ? width.points : ((whole - fixed) * width.share) / shares))
}

function startsOf(widths: readonly number[], left: number): number[] {
  let x = left
  return widths.map((width) => {
    const start = x
    x += width
    return start
  })
}

function headOf(sheet: Sheet, { title, unit }: Column, width: number): Laid {
  return { lines: [...sheet.pen.lines(title, STYLE.label, width), ...(unit ? sheet.pen.lines(unit, STYLE.label, width) : [])], style: STYLE.label }
}

function lay(sheet: Sheet, cell: Cell | string, row: Row, width: number): Laid {
  const { text, style, shape } = typeof cell === 'string' ? { text: cell, style: undefined, shape: undefined } : cell
  const own = style ?? (row.kind === 'total' ? STYLE.cellStrong : STYLE.cell)
  return { lines: sheet.pen.lines(text, own, shape ? width - SHAPE_ROOM : width), style: own, shape }
}

const heightOf = (sheet: Sheet, cells: readonly Laid[]): number =>
  Math.max(...cells.map((cell) => cell.lines.length * sheet.pen.lineHeight(cell.style))) + PADDING.top + PADDING.bottom

function drawHead(sheet: Sheet, columns: readonly Column[], head: readonly Laid[], starts: readonly number[], widths: readonly number[], isRepeated: boolean): void {
  const height = heightOf(sheet, head)
  const top = sheet.y
  sheet.rule(top, { colour: COLOUR.spruce, width: 1 })
  const write = (index: number): void => {
    const cell = head[index]
    const lineHeight = sheet.pen.lineHeight(STYLE.label)
    const blank = height - PADDING.top - PADDING.bottom - (cell?.lines.length ?? 0) * lineHeight
    cell?.lines.forEach((line, at) => writeLine(sheet, line, cell.style, columns[index], starts[index] ?? 0, widths[index] ?? 0, top + PADDING.top + blank + at * lineHeight, 0))
  }
  // on the following pages the head is there for the eye; read aloud it would interrupt the rows
  if (isRepeated) sheet.ornament(() => columns.forEach((_column, index) => write(index)), 'Pagination')
  else {
    const row = sheet.open('TR')
    columns.forEach((_column, index) => sheet.tagged('TH', () => write(index), { scope: 'Column' }))
    sheet.close(row)
  }
  sheet.y = top + height
  sheet.rule(sheet.y, { colour: COLOUR.spruce, width: 0.5 })
}

function drawRow(sheet: Sheet, columns: readonly Column[], cells: Laid[], row: Row, starts: readonly number[], widths: readonly number[], repeatHead: () => void): void {
  const whole = heightOf(sheet, cells)
  const pageRoom = sheet.bottom - 90 - MARGIN.top
  if (sheet.y + whole > sheet.bottom && whole < pageRoom) turn(sheet, repeatHead)
  const tr = sheet.open('TR')
  const elements = cells.map((_cell, index) => {
    const element = columns[index]?.isRowHeader ? sheet.open('TH', { scope: 'Row' }) : sheet.open('TD')
    sheet.suspend(element)
    return element
  })
  let done = 0
  const most = Math.max(...cells.map((cell) => cell.lines.length))
  do {
    const lineHeight = Math.max(...cells.map((cell) => sheet.pen.lineHeight(cell.style)))
    const fitting = Math.max(1, Math.floor((sheet.bottom - sheet.y - PADDING.top - PADDING.bottom) / lineHeight))
    const count = Math.min(most - done, fitting)
    const part = cells.map((cell) => ({ ...cell, lines: cell.lines.slice(done, done + count) }))
    drawPart(sheet, columns, part, row, starts, widths, elements, done === 0)
    done += count
    if (done < most) turn(sheet, repeatHead)
  } while (done < most)
  for (const element of elements) element.end()
  sheet.close(tr)
}

function turn(sheet: Sheet, repeatHead: () => void): void {
  sheet.newPage()
  repeatHead()
}

function drawPart(
  sheet: Sheet, columns: readonly Column[], cells: readonly Laid[], row: Row, starts: readonly number[], widths: readonly number[],
  elements: readonly Element[], isFirst: boolean,
): void {
  const top = sheet.y
  const height = heightOf(sheet, cells)
  sheet.ornament((document) => {
    if (row.kind === 'alert') document.rect(sheet.left, top, sheet.width, height).fill(COLOUR.overWash)
    if (row.kind === 'total') document.rect(sheet.left, top, sheet.width, height).fill(COLOUR.spruceWash)
    cells.forEach((cell, index) => {
      if (cell.shape && isFirst) drawShape(document, cell.shape, (starts[index] ?? 0) + PADDING.x, top + PADDING.top + sheet.pen.lineHeight(cell.style) / 2)
    })
  })
  cells.forEach((cell, index) => {
    if (cell.lines.length === 0) return
    elements[index]?.add(() => cell.lines.forEach((line, at) =>
      writeLine(sheet, line, cell.style, columns[index], starts[index] ?? 0, widths[index] ?? 0, top + PADDING.top + at * sheet.pen.lineHeight(cell.style), cell.shape ? SHAPE_ROOM : 0)))
  })
  sheet.y = top + height
  sheet.rule(sheet.y, row.kind === 'total' ? { colour: COLOUR.spruce, width: 0.8 } : {})
}

function writeLine(sheet: Sheet, line: string, style: TextStyle, column: Column | undefined, start: number, width: number, y: number, indent: number): void {
  const x = column?.align === 'right' ? start + width - PADDING.x - sheet.pen.width(line, style) : start + PADDING.x + indent
  sheet.pen.write(line, x, y, style)
}
