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
const HEAD_ROOM = 40 // [pt] of a repeated head
const TURN_ROOM = 7 // [pt] between a column that ends right and one that begins left

interface Laid {
  lines: string[]
  style: TextStyle
  shape?: Shape
  hasShapeRoom?: boolean
}

/** A table with ruled lines, its head repeated on every page. A row goes over to the next page whole where it fits there. */
export async function drawTable(sheet: Sheet, { columns, rows, summary }: { columns: readonly Column[]; rows: readonly Row[]; summary?: string }): Promise<void> {
  const grid = gridOf(columns, sheet.left, sheet.width)
  const head = grid.map(({ column, width }) => headOf(sheet, column, inner(width)))
  const table = sheet.open('Table', summary ? { alt: summary } : {})
  sheet.need(heightOf(sheet, head) + 2 * sheet.pen.lineHeight(STYLE.cell) + 8)
  drawHead(sheet, grid, head, false)
  for (const row of rows) {
    const cells = grid.map(({ width }, index) => lay(sheet, row.cells[index] ?? '', row, inner(width)))
    drawRow(sheet, grid, cells, row, () => drawHead(sheet, grid, head, true))
    await sheet.breathe()
  }
  sheet.close(table)
  sheet.space(8)
}

const inner = (width: number): number => width - 2 * PADDING.x

function widthsOf(columns: readonly Column[], whole: number): number[] {
  const fixed = columns.reduce((sum, { width }) => sum + ('points' in width ? width.points : 0), 0)
  const shares = columns.reduce((sum, { width }) => sum + ('share' in width ? width.share : 0), 0)
  return columns.map(({ width }) => ('points' in width ? width.points : ((whole - fixed) * width.share) / shares))
}

/** Where each column begins and how wide it is, with its padding [pt]. */
interface Place {
  column: Column
  start: number
  width: number
}

function gridOf(columns: readonly Column[], left: number, whole: number): Place[] {
  const widths = widthsOf(columns, whole)
  let x = left
  return columns.map((column, index) => {
    const isTurn = column.align !== 'right' && columns[index - 1]?.align === 'right'
    const indent = isTurn ? TURN_ROOM : 0
    const place = { column, start: x + indent, width: (widths[index] ?? 0) - indent }
    x += widths[index] ?? 0
    return place
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

function drawHead(sheet: Sheet, grid: readonly Place[], head: readonly Laid[], isRepeated: boolean): void {
  const height = heightOf(sheet, head)
  const top = sheet.y
  sheet.rule(top, { colour: COLOUR.spruce, width: 1 })
  const write = (place: Place, index: number): void => {
    const lines = head[index]?.lines ?? []
    const blank = height - PADDING.top - PADDING.bottom - lines.length * sheet.pen.lineHeight(STYLE.label)
    writeLines(sheet, place, { lines, style: STYLE.label }, top + PADDING.top + blank)
  }
  // on the following pages the head is there for the eye; read aloud it would interrupt the rows
  if (isRepeated) sheet.ornament(() => grid.forEach(write), 'Pagination')
  else {
    const row = sheet.open('TR')
    grid.forEach((place, index) => sheet.tagged('TH', () => write(place, index), { scope: 'Column' }))
    sheet.close(row)
  }
  sheet.y = top + height
  sheet.rule(sheet.y, { colour: COLOUR.spruce, width: 0.5 })
}

/** A row on one page where it fits a page at all; a longer one goes on over as many as it takes. */
function drawRow(sheet: Sheet, grid: readonly Place[], cells: readonly Laid[], row: Row, repeatHead: () => void): void {
  const turn = (): void => {
    sheet.newPage()
    repeatHead()
  }
  const whole = heightOf(sheet, cells)
  const pageRoom = sheet.bottom - MARGIN.top - HEAD_ROOM
  if (sheet.y + whole > sheet.bottom && whole < pageRoom) turn()
  const tr = sheet.open('TR')
  const elements = grid.map(({ column }) => {
    const element = column.isRowHeader ? sheet.open('TH', { scope: 'Row' }) : sheet.open('TD')
    sheet.suspend(element)
    return element
  })
  const most = Math.max(...cells.map((cell) => cell.lines.length))
  const lineHeight = Math.max(...cells.map((cell) => sheet.pen.lineHeight(cell.style)))
  for (let done = 0; done < most;) {
    const fitting = Math.max(1, Math.floor((sheet.bottom - sheet.y - PADDING.top - PADDING.bottom) / lineHeight))
    const part = cells.map((cell) => ({ ...cell, lines: cell.lines.slice(done, done + fitting), shape: done === 0 ? cell.shape : undefined, hasShapeRoom: cell.shape !== undefined }))
    drawPart(sheet, grid, part, row, elements)
    done += fitting
    if (done < most) turn()
  }
  for (const element of elements) element.end()
  sheet.close(tr)
}

function drawPart(sheet: Sheet, grid: readonly Place[], cells: readonly Laid[], row: Row, elements: readonly Element[]): void {
  const top = sheet.y
  const height = heightOf(sheet, cells)
  sheet.ornament((document) => {
    const ground = row.kind === 'alert' ? COLOUR.overWash : row.kind === 'total' ? COLOUR.spruceWash : null
    if (ground) document.rect(sheet.left, top + 0.3, sheet.width, height - 0.3).fill(ground)
    cells.forEach((cell, index) => {
      if (cell.shape) drawShape(document, cell.shape, (grid[index]?.start ?? 0) + PADDING.x, top + PADDING.top + sheet.pen.lineHeight(cell.style) / 2)
    })
  })
  grid.forEach((place, index) => {
    const cell = cells[index]
    if (cell && cell.lines.length > 0) elements[index]?.add(() => writeLines(sheet, place, cell, top + PADDING.top))
  })
  sheet.y = top + height
  sheet.rule(sheet.y, row.kind === 'total' ? { colour: COLOUR.spruce, width: 0.8 } : {})
}

function writeLines(sheet: Sheet, { column, start, width }: Place, { lines, style, hasShapeRoom }: Laid, top: number): void {
  lines.forEach((line, index) => {
    const x = column.align === 'right'
      ? start + width - PADDING.x - sheet.pen.width(line, style)
      : start + PADDING.x + (hasShapeRoom ? SHAPE_ROOM : 0)
    sheet.pen.write(line, x, top + index * sheet.pen.lineHeight(style), style)
  })
}
