import { COLOUR, STYLE } from './look'
import type { Sheet } from './sheet'

const TICKET_WIDTH = 176 // [pt]
const PAD = 8 // [pt]

/** The head of the first page: the company, what this paper is, and a ticket with what it covers. */
export function drawMasthead(sheet: Sheet, { company, title, lead, ticket }: {
  company: string
  title: string
  lead: string
  ticket: readonly { label: string; value: string }[]
}): void {
  const top = 36
  const textWidth = sheet.width - TICKET_WIDTH - 18
  sheet.y = top
  drawMark(sheet, sheet.left, top + 1)
  sheet.text(company, STYLE.smallStrong, { x: sheet.left + 24, width: textWidth - 24, after: 5 })
  sheet.text(title, STYLE.title, { tag: 'H1', width: textWidth, after: 1 })
  sheet.text(lead, STYLE.small, { width: textWidth })
  const textEnd = sheet.y
  const ticketEnd = drawTicket(sheet, ticket, sheet.right - TICKET_WIDTH, top)
  sheet.y = Math.max(textEnd, ticketEnd) + 8
  sheet.rule(sheet.y, { colour: COLOUR.spruce, width: 2 })
  sheet.rule(sheet.y + 2.6, { colour: COLOUR.spruce, width: 0.5 })
  sheet.space(12)
}

/** The mark of the house: a beam on its fulcrum. */
function drawMark(sheet: Sheet, x: number, y: number): void {
  sheet.ornament((document) => {
    document.moveTo(x, y + 3).lineTo(x + 18, y + 3).lineWidth(1.6).stroke(COLOUR.spruce)
    document.polygon([x + 9, y + 3], [x + 12.4, y + 9], [x + 5.6, y + 9]).fill(COLOUR.spruce)
    document.moveTo(x + 0.5, y + 3).lineTo(x + 0.5, y + 6).lineWidth(1).stroke(COLOUR.spruce)
    document.moveTo(x + 17.5, y + 3).lineTo(x + 17.5, y + 6).lineWidth(1).stroke(COLOUR.spruce)
  })
}

function drawTicket(sheet: Sheet, ticket: readonly { label: string; value: string }[], x: number, top: number): number {
  const labelHeight = sheet.pen.lineHeight(STYLE.label)
  const valueHeight = sheet.pen.lineHeight(STYLE.strong)
  const laid = ticket.map(({ label, value }) => ({ label, lines: sheet.pen.lines(value, STYLE.strong, TICKET_WIDTH - 2 * PAD) }))
  const height = PAD * 2 + laid.reduce((sum, { lines }) => sum + labelHeight + lines.length * valueHeight + 3, -3)
  drawTicketEdge(sheet, x, top, TICKET_WIDTH, height)
  const list = sheet.open('L')
  let y = top + PAD
  for (const { label, lines } of laid) {
    const item = sheet.open('LI')
    const labelY = y
    sheet.tagged('Lbl', () => sheet.pen.write(label, x + PAD, labelY, STYLE.label))
    y += labelHeight
    const valueY = y
    sheet.tagged('LBody', () => lines.forEach((line, at) => sheet.pen.write(line, x + PAD, valueY + at * valueHeight, STYLE.strong)))
    y += lines.length * valueHeight + 3
    sheet.close(item)
  }
  sheet.close(list)
  return top + height
}

/** A weigh ticket torn off its block: ruled on three sides, perforated on the fourth. */
export function drawTicketEdge(sheet: Sheet, x: number, y: number, width: number, height: number): void {
  sheet.ornament((document) => {
    document.rect(x, y, width, height).fill(COLOUR.sunk)
    document.moveTo(x, y).lineTo(x + width, y).lineTo(x + width, y + height).lineTo(x, y + height).lineWidth(0.6).stroke(COLOUR.ruleStrong)
    document.save()
    document.moveTo(x, y).lineTo(x, y + height).lineWidth(1.2).dash(1.2, { space: 2.6 }).stroke(COLOUR.spruce)
    document.undash()
    document.restore()
  })
}
