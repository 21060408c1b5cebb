import type { WirePackDecision, WireThreshold } from '../../shared/api/places'
import { isPlainDate } from '../../shared/dates/plain-date'
import { percent } from '../../shared/leak-rate/percent'
import { kg } from '../../shared/mass/mass'
import { STYLE } from './kit/look'
import type { Sheet } from './kit/sheet'
import { drawTable } from './kit/table'
import type { Words } from './words'

/** A threshold and the circuits' category for which it is in force. */
export interface ThresholdOnPaper extends WireThreshold {
  category: string
}

/**
 * The thresholds that a paper measures against, with what must stand beside them wherever they are shown:
 * source, date checked, on what the figure rests, who is responsible, and who decides.
 */
export async function drawRules(sheet: Sheet, words: Words, thresholds: readonly ThresholdOnPaper[]): Promise<void> {
  await sheet.within('Sect', async () => {
    sheet.heading(2, words.text('rules.title'), STYLE.heading, 110)
    if (thresholds.length === 0) sheet.text(words.text('rules.none'), STYLE.body, { after: 4 })
    else await drawTable(sheet, {
      columns: [
        { title: words.text('rules.pack'), width: { share: 20 }, isRowHeader: true },
        { title: words.text('rules.category'), width: { share: 20 } },
        { title: words.text('rules.threshold'), unit: words.text('rules.perYear'), width: { share: 15 }, align: 'right' },
        { title: words.text('rules.source'), width: { share: 20 } },
        { title: words.text('rules.basis'), width: { share: 27 } },
        { title: words.text('rules.checkedOn'), width: { share: 14 } },
      ],
      rows: distinct(thresholds).map((threshold) => ({
        cells: [
          words.common(`rules.packs.${threshold.packId}.title`), words.common(`rules.categories.${threshold.category}`),
          words.text('rules.above', { percent: words.threshold(percent(threshold.percent)) }),
          threshold.cite, words.common(`rules.basis.${threshold.basis}`), words.date(threshold.checkedOn),
        ],
      })),
    })
    sheet.text(words.text('rules.responsible'), STYLE.small, { after: 3 })
    sheet.text(words.text('rules.caution'), STYLE.smallStrong, { after: 10 })
  })
}

/** Which rule packs apply to a circuit, and why or why not. */
export const decisionsText = (words: Words, packs: readonly WirePackDecision[]): string =>
  packs.map(({ packId, applies, reasons }) => words.text('rules.decision', {
    pack: words.common(`rules.packs.${packId}.title`), applies: words.common(`rules.applies.${applies}`),
    reasons: reasons.map(({ code, params }) => words.common(`rules.reasons.${code}`, saidParams(words, params))).join(' '),
  })).join('\n')

function saidParams(words: Words, { chargeKg, ...rest }: Record<string, string>): Record<string, string> {
  const said = Object.fromEntries(Object.entries(rest).map(([name, text]) => [name, isPlainDate(text) ? words.date(text) : text]))
  return chargeKg ? { ...said, charge: words.massInBoth(kg(chargeKg)) } : said
}

function distinct(thresholds: readonly ThresholdOnPaper[]): ThresholdOnPaper[] {
  const byKey = new Map(thresholds.map((threshold) =>
    [[threshold.packId, threshold.category, threshold.percent, threshold.cite, threshold.checkedOn].join(' '), threshold]))
  return [...byKey.keys()].sort().flatMap((key) => byKey.get(key) ?? [])
}
