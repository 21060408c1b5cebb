import { toPercentText, type Percent } from '../../../shared/leak-rate/percent'
import { COLOUR, STYLE } from './look'
import type { Shape } from './shapes'
import type { Sheet } from './sheet'

const HEIGHT = 34 // [pt]
const LINE_Y = 19 // [pt] of the balance line within it
const CLEAR = 4 // [pt] between two words

/**
 * The beam of the house: the leak rate as a weight on a balance line whose fulcrum is the threshold.
 * Left of the fulcrum there is room left, right of it there is none.
 */
export function drawBeam(sheet: Sheet, { rate, threshold, standing, words }: {
  rate: Percent
  threshold: Percent
  standing: Shape
  words: { rate: string; threshold: string; caption: string; spoken: string }
}): void {
  sheet.need(HEIGHT)
  const top = sheet.y
  const y = top + LINE_Y
  const fulcrum = sheet.left + sheet.width / 2
  // twice the threshold is the end of the beam; what is beyond it rests on the end
  const share = Math.min(1, Number(toPercentText(rate.dividedBy(threshold).times(50) as Percent, 4)) / 100)
  const weight = sheet.left + sheet.width * share
  const colour = { over: COLOUR.over, near: COLOUR.near, below: COLOUR.far, none: COLOUR.ruleStrong }[standing]
  const textColour = { over: COLOUR.overText, near: COLOUR.nearText, below: COLOUR.farText, none: COLOUR.soft }[standing]
  const rateStyle = { ...STYLE.smallStrong, colour: textColour, hasTabularFigures: true }
  const rateWidth = sheet.pen.width(words.rate, rateStyle)
  const thresholdWidth = sheet.pen.width(words.threshold, STYLE.small)
  const rateX = Math.max(sheet.left, Math.min(weight - rateWidth / 2, sheet.right - rateWidth))
  sheet.ornament((document) => {
    document.moveTo(sheet.left, y).lineTo(sheet.right, y).lineWidth(0.8).stroke(COLOUR.spruce)
    for (const x of [sheet.left, sheet.right]) document.moveTo(x, y - 3).lineTo(x, y + 3).lineWidth(0.8).stroke(COLOUR.spruce)
    document.polygon([fulcrum, y + 0.5], [fulcrum + 4.5, y + 8], [fulcrum - 4.5, y + 8]).fill(COLOUR.spruce)
    document.rect(sheet.left, y - 1.6, Math.max(0, weight - sheet.left), 3.2).fill(colour)
    document.moveTo(weight, y - 6).lineTo(weight, y + 3).lineWidth(1.6).stroke(colour)
  })
  sheet.tagged('Figure', () => {
    sheet.pen.write(words.rate, rateX, top, rateStyle)
    sheet.pen.write(words.threshold, Math.min(fulcrum + 8, sheet.right - thresholdWidth), y + 3, STYLE.small)
    const captionWidth = sheet.pen.width(words.caption, STYLE.label)
    const captionX = rateX > sheet.left + captionWidth + CLEAR ? sheet.left : sheet.right - captionWidth
    sheet.pen.write(words.caption, captionX, top + 1, STYLE.label)
  }, { alt: words.spoken })
  sheet.y = top + HEIGHT + 2
}
