import type PDFDocument from 'pdfkit'
import { COLOUR } from './look'

/** Signs beside a word: each has a form of its own, so that it reads without colour. */
export type Shape = 'over' | 'near' | 'below' | 'none'

const R = 2.7 // [pt] half of a sign's width

/** Draws a sign with its left edge at x, in the middle of y. */
export function drawShape(document: InstanceType<typeof PDFDocument>, shape: Shape, x: number, y: number): void {
  const cx = x + R
  switch (shape) {
    case 'over':
      document.polygon([cx, y - R], [cx + R + 0.4, y + R], [cx - R - 0.4, y + R]).fill(COLOUR.over)
      return
    case 'near':
      document.polygon([cx, y - R - 0.3], [cx + R + 0.3, y], [cx, y + R + 0.3], [cx - R - 0.3, y]).fill(COLOUR.near)
      return
    case 'below':
      document.circle(cx, y, R).fill(COLOUR.far)
      return
    case 'none':
      document.circle(cx, y, R - 0.5).lineWidth(0.8).stroke(COLOUR.ruleStrong)
      return
    default:
      return shape satisfies never
  }
}
