import type { FULL_CHARGE_METHODS, LeakRateMethod, WirePackDecision } from '../../shared/api/places'
import type { PlainDate } from '../../shared/dates/plain-date'
import type { Percent } from '../../shared/leak-rate/percent'
import { sumMass, type Mass } from '../../shared/mass/mass'
import { drawBeam } from './kit/beam'
import { drawFacts } from './kit/facts'
import { paperSizeOf, STYLE } from './kit/look'
import { drawMasthead } from './kit/masthead'
import { Sheet } from './kit/sheet'
import type { Shape } from './kit/shapes'
import { drawTable, type Row } from './kit/table'
import { decisionsText, drawRules, type ThresholdOnPaper } from './rules-part'
import { wordsFor, type Words } from './words'

/** Who asked for a paper, and when. */
export interface Making {
  locale: string
  personName: string
  companyName: string
  madeAt: Date
}

export interface FullChargeOnPaper {
  massKg: Mass
  method: (typeof FULL_CHARGE_METHODS)[number]
  rangeLowKg: Mass | null
  rangeHighKg: Mass | null
  effectiveOn: PlainDate
  personName: string
  note: string | null
}

export interface RateOnPaper {
  countedKg: Mass
  addedKg: Mass
  days: number | null
  fullChargeKg: Mass | null
  rate: Percent | null
  threshold: Percent | null
  isAbove: boolean
  exempt: string | null
  basis: string[]
}

export interface SummaryAddition extends RateOnPaper {
  occurredOn: PlainDate
  personName: string
  massKg: Mass
}

export interface SummaryRemoval {
  kind: 'recovery' | 'loss'
  occurredOn: PlainDate
  personName: string
  massKg: Mass
  purpose: string | null
}

export interface SummaryTest {
  kind: 'initial' | 'follow-up'
  testedOn: PlainDate
  type: string
  passed: boolean
  personName: string
}

export interface SummaryCircuit {
  systemTag: string
  systemName: string
  location: string | null
  name: string
  refrigerant: string
  category: string
  status: string
  commissionedOn: PlainDate | null
  /** In the order in which they came into force. */
  fullCharges: FullChargeOnPaper[]
  additions: SummaryAddition[]
  removals: SummaryRemoval[]
  tests: SummaryTest[]
  /** Entries of the period that were taken back. */
  reversedCount: number
  thresholds: ThresholdOnPaper[]
  packs: WirePackDecision[]
}

export interface LeakRateSummary {
  site: { name: string; street: string; city: string; region: string | null; postalCode: string | null; country: string; timeZone: string; jurisdiction: string }
  owner: { name: string; address: string | null }
  method: LeakRateMethod
  period: { from: PlainDate; to: PlainDate }
  circuits: SummaryCircuit[]
}

const NEAR_SHARE = 70 // [% of the threshold] from which the overview calls a circuit near

/** The leak-rate summary of a site for a period. The caller pipes `sheet.document` before it calls `draw`. */
export function leakRateSummary(summary: LeakRateSummary, making: Making): { sheet: Sheet; draw: () => Promise<void> } {
  const words = wordsFor(making.locale, summary.site.jurisdiction)
  const title = words.text('summary.title')
  const period = words.text('period', { from: words.date(summary.period.from), to: words.date(summary.period.to) })
  const sheet = new Sheet({
    paper: paperSizeOf(summary.site.country), language: making.locale, title: `${title} – ${summary.site.name}`, subject: period, author: making.companyName,
    madeAt: making.madeAt, runningHead: words.text('runningHead', { title, subject: summary.site.name, period }), footer: footerOf(words, making, summary.site.timeZone),
    pageLabel: (page, pages) => words.text('page', { page, pages }),
  })
  return {
    sheet,
    draw: async () => {
      drawMasthead(sheet, {
        company: making.companyName, title, lead: words.text('summary.lead'),
        ticket: [{ label: words.text('summary.site'), value: summary.site.name }, { label: words.text('summary.period'), value: period }],
      })
      drawSite(sheet, words, summary)
      await drawGlance(sheet, words, summary)
      await drawRules(sheet, words, summary.circuits.flatMap((circuit) => circuit.thresholds))
      for (const circuit of summary.circuits) await sheet.within('Sect', () => drawCircuit(sheet, words, summary, circuit))
      sheet.finish()
    },
  }
}

/** When, by whom and for which company a paper was made. */
export const footerOf = (words: Words, { madeAt, personName, companyName }: Making, timeZone: string): string =>
  words.text('footer', { instant: words.instant(madeAt, timeZone), person: personName, company: companyName })

export const addressOf = ({ street, city, region, postalCode, country }: LeakRateSummary['site']): string =>
  [street, [city, [region, postalCode].filter(Boolean).join(' ')].filter(Boolean).join(', '), country].join('\n')

function drawSite(sheet: Sheet, words: Words, { site, owner, method }: LeakRateSummary): void {
  drawFacts(sheet, [
    { label: words.text('summary.owner'), value: [owner.name, words.orMissing(owner.address)].join('\n'), style: STYLE.value },
    { label: words.text('summary.address'), value: `${site.name}\n${addressOf(site)}` },
    { label: words.text('summary.method'), value: `${words.text(`method.${method}.name`)}\n${words.text(`method.${method}.sentence`)}` },
  ])
  sheet.space(6)
}

const shapeOf = (additions: readonly SummaryAddition[]): Shape => {
  const rated = additions.filter((addition) => addition.rate !== null && addition.threshold !== null)
  if (rated.some((addition) => addition.isAbove)) return 'over'
  if (rated.some(({ rate, threshold }) => rate && threshold && rate.times(100).dividedBy(threshold).greaterThanOrEqualTo(NEAR_SHARE))) return 'near'
  return rated.length > 0 ? 'below' : 'none'
}

/** The addition with the highest rate; one that is measured against a threshold goes before one that is not. */
const highestOf = (additions: readonly SummaryAddition[]): SummaryAddition | null =>
  measuredFirst(additions.filter((addition) => addition.rate !== null))
    .reduce<SummaryAddition | null>((highest, addition) => (highest?.rate && addition.rate && highest.rate.greaterThanOrEqualTo(addition.rate) ? highest : addition), null)

const measuredFirst = (rated: readonly SummaryAddition[]): readonly SummaryAddition[] => {
  const measured = rated.filter((addition) => addition.threshold !== null)
  return measured.length > 0 ? measured : rated
}

const massOrDash = (words: Words, masses: readonly { massKg: Mass }[]): string => (masses.length > 0 ? words.mass(sumMass(masses.map((each) => each.massKg))) : '–')

async function drawGlance(sheet: Sheet, words: Words, { circuits }: LeakRateSummary): Promise<void> {
  await sheet.within('Sect', async () => {
    sheet.heading(2, words.text('summary.glance', { count: circuits.length }), STYLE.heading, 90)
    if (circuits.length === 0) {
      sheet.text(words.text('summary.noCircuits'), STYLE.body, { after: 8 })
      return
    }
    const unit = words.text(`unit.name.${words.massUnit}`)
    await drawTable(sheet, {
      columns: [
        { title: words.text('summary.circuit'), width: { share: 28 }, isRowHeader: true },
        { title: words.text('refrigerant'), width: { points: 58 } },
        { title: words.text('fullCharge'), unit, width: { points: 56 }, align: 'right' },
        { title: words.text('summary.added'), unit, width: { points: 54 }, align: 'right' },
        { title: words.text('summary.recovered'), unit, width: { points: 54 }, align: 'right' },
        { title: words.text('summary.highest'), unit: words.text('unit.percent'), width: { points: 54 }, align: 'right' },
        { title: words.text('rules.threshold'), unit: words.text('unit.percent'), width: { points: 52 }, align: 'right' },
        { title: words.text('summary.result'), width: { points: 76 } },
      ],
      rows: [...circuits.map((circuit) => glanceRow(words, circuit)), ...totalRows(words, circuits)],
    })
  })
}

function glanceRow(words: Words, circuit: SummaryCircuit): Row {
  const shape = shapeOf(circuit.additions)
  const highest = highestOf(circuit.additions)
  const fullCharge = circuit.fullCharges.at(-1)
  return {
    kind: shape === 'over' ? 'alert' : 'plain',
    cells: [
      { text: `${circuit.systemTag} · ${circuit.name}`, style: STYLE.cellStrong }, circuit.refrigerant,
      fullCharge ? words.mass(fullCharge.massKg) : words.text('notRecorded'),
      massOrDash(words, circuit.additions), massOrDash(words, circuit.removals.filter(({ kind }) => kind === 'recovery')),
      highest?.rate ? words.rate(highest.rate, highest.threshold) : '–',
      highest?.threshold ? words.threshold(highest.threshold) : '–',
      { text: words.text(highest && !highest.threshold ? 'standing.noThreshold' : `standing.${shape}`), shape, style: shape === 'over' ? STYLE.cellStrong : STYLE.cell },
    ],
  }
}

function totalRows(words: Words, circuits: readonly SummaryCircuit[]): Row[] {
  const refrigerants = [...new Set(circuits.map((circuit) => circuit.refrigerant))].sort()
  return refrigerants.map((refrigerant) => {
    const own = circuits.filter((circuit) => circuit.refrigerant === refrigerant)
    return {
      kind: 'total',
      cells: [
        words.text('summary.total', { refrigerant }), '', '', massOrDash(words, own.flatMap((circuit) => circuit.additions)),
        massOrDash(words, own.flatMap((circuit) => circuit.removals.filter(({ kind }) => kind === 'recovery'))), '', '', '',
      ],
    }
  })
}

async function drawCircuit(sheet: Sheet, words: Words, summary: LeakRateSummary, circuit: SummaryCircuit): Promise<void> {
  sheet.begin(190)
  sheet.heading(2, `${circuit.systemTag} · ${circuit.name}`, STYLE.heading)
  drawFacts(sheet, [
    { label: words.text('summary.system'), value: [circuit.systemName, circuit.location].filter(Boolean).join(', ') },
    { label: words.text('refrigerant'), value: circuit.refrigerant, style: STYLE.strong },
    { label: words.text('rules.category'), value: words.common(`rules.categories.${circuit.category}`) },
    { label: words.text('summary.status'), value: words.text(`status.${circuit.status}`) },
    { label: words.text('summary.commissionedOn'), value: circuit.commissionedOn ? words.date(circuit.commissionedOn) : words.text('notRecorded') },
    { label: words.text('fullCharge'), value: fullChargeLine(words, circuit), style: STYLE.strong },
  ])
  drawFacts(sheet, [{ label: words.text('rules.decisions'), value: decisionsText(words, circuit.packs), style: STYLE.small }], { columns: 1 })
  const highest = highestOf(circuit.additions)
  if (highest?.rate && highest.threshold) drawHighest(sheet, words, highest, shapeOf(circuit.additions))
  await drawFullCharges(sheet, words, circuit)
  await drawAdditions(sheet, words, summary, circuit)
  await drawRemovals(sheet, words, circuit)
  await drawTests(sheet, words, circuit)
  if (circuit.reversedCount > 0) sheet.text(words.text('summary.reversed', { count: circuit.reversedCount }), STYLE.small, { after: 4 })
  sheet.space(10)
}

function fullChargeLine(words: Words, { fullCharges }: SummaryCircuit): string {
  const last = fullCharges.at(-1)
  return last ? words.massInBoth(last.massKg) : words.text('notRecorded')
}

function drawHighest(sheet: Sheet, words: Words, highest: SummaryAddition, shape: Shape): void {
  if (!highest.rate || !highest.threshold) return
  const rate = words.rate(highest.rate, highest.threshold)
  const threshold = words.threshold(highest.threshold)
  const params = { rate, threshold, date: words.date(highest.occurredOn), standing: words.text(`standing.${shape}`) }
  drawBeam(sheet, {
    rate: highest.rate, threshold: highest.threshold, standing: shape,
    words: { rate: words.text('beam.rate', params), threshold: words.text('beam.threshold', params), caption: words.text('beam.caption'), spoken: words.text('beam.spoken', params) },
  })
}

async function drawFullCharges(sheet: Sheet, words: Words, { fullCharges }: SummaryCircuit): Promise<void> {
  if (fullCharges.length === 0) return
  sheet.heading(3, words.text('summary.fullCharges'), STYLE.subheading, 70)
  const unit = words.text(`unit.name.${words.massUnit}`)
  await drawTable(sheet, {
    columns: [
      { title: words.text('summary.effectiveOn'), width: { points: 64 }, isRowHeader: true },
      { title: words.text('fullCharge'), unit, width: { points: 56 }, align: 'right' },
      { title: words.text('summary.determinedBy'), width: { share: 40 } },
      { title: words.text('summary.recordedBy'), width: { share: 24 } },
      { title: words.text('note'), width: { share: 30 } },
    ],
    rows: fullCharges.map((charge) => ({
      cells: [words.date(charge.effectiveOn), words.mass(charge.massKg), methodOf(words, charge), charge.personName, charge.note ?? ''],
    })),
  })
}

/** How a full charge was determined; of a range both ends and that its midpoint counts. */
export function methodOf(words: Words, { method, rangeLowKg, rangeHighKg }: Pick<FullChargeOnPaper, 'method' | 'rangeLowKg' | 'rangeHighKg'>): string {
  const name = words.text(`fullChargeMethod.${method}`)
  if (!rangeLowKg || !rangeHighKg) return name
  return words.text('fullChargeRange', { method: name, low: words.mass(rangeLowKg), high: words.mass(rangeHighKg), unit: words.text(`unit.name.${words.massUnit}`) })
}

async function drawAdditions(sheet: Sheet, words: Words, { method }: LeakRateSummary, { additions }: SummaryCircuit): Promise<void> {
  sheet.heading(3, words.text('summary.additions'), STYLE.subheading, 110)
  if (additions.length === 0) {
    sheet.text(words.text('summary.noAdditions'), STYLE.body, { after: 6 })
    return
  }
  const unit = words.text(`unit.name.${words.massUnit}`)
  const notes = new Notes(words)
  const number = (title: string, sub: string, points: number) => ({ title: words.text(title), unit: sub, width: { points }, align: 'right' as const })
  await drawTable(sheet, {
    columns: [
      { title: words.text('date'), width: { points: 61 }, isRowHeader: true },
      { title: words.text('technician'), width: { share: 1 } },
      number('summary.amount', unit, 41), number('summary.counted', unit, 41),
      number(method === 'rolling' ? 'summary.inWindow' : 'summary.forLeak', unit, 44), number('summary.days', words.text('unit.days'), 30),
      number('fullCharge', unit, 43), number('summary.rate', words.text('unit.percent'), 45), number('rules.threshold', words.text('unit.percent'), 45),
      { title: words.text('summary.result'), width: { points: 76 } },
      { title: words.text('summary.notes'), width: { points: 25 } },
    ],
    rows: additions.map((addition) => additionRow(words, addition, notes)),
  })
  notes.draw(sheet)
}

function additionRow(words: Words, addition: SummaryAddition, notes: Notes): Row {
  const { massKg, countedKg, addedKg, days, fullChargeKg, rate, threshold, isAbove, exempt, basis } = addition
  const shape = shapeOf([addition])
  return {
    kind: isAbove ? 'alert' : 'plain',
    cells: [
      words.date(addition.occurredOn), addition.personName, words.mass(massKg), words.mass(countedKg),
      rate ? words.mass(addedKg) : '–', days === null ? '–' : String(days), fullChargeKg ? words.mass(fullChargeKg) : '–',
      rate ? { text: words.rate(rate, threshold), style: STYLE.cellStrong } : '–', threshold ? words.threshold(threshold) : '–',
      { text: words.text(exempt ? 'standing.exempt' : threshold ? `standing.${shape}` : 'standing.noThreshold'), shape, style: isAbove ? STYLE.cellStrong : STYLE.cell },
      [...(exempt ? [notes.letterOf(`exempt.${exempt}`)] : []), ...basis.map((code) => notes.letterOf(`basis.${code}`))].join(' '),
    ],
  }
}

/** Explanations below a table, each with the letter that stands in its rows. */
class Notes {
  private readonly keys: string[] = []
  constructor(private readonly words: Words) {}

  letterOf(key: string): string {
    if (!this.keys.includes(key)) this.keys.push(key)
    return String.fromCharCode('a'.charCodeAt(0) + this.keys.indexOf(key))
  }

  draw(sheet: Sheet): void {
    for (const key of this.keys) sheet.text(this.words.text('summary.explained', { letter: this.letterOf(key), text: this.words.text(key) }), STYLE.small, { tag: 'Note' })
    if (this.keys.length > 0) sheet.space(5)
  }
}

async function drawRemovals(sheet: Sheet, words: Words, { removals }: SummaryCircuit): Promise<void> {
  if (removals.length === 0) return
  sheet.heading(3, words.text('summary.removals'), STYLE.subheading, 80)
  const recovered = removals.filter(({ kind }) => kind === 'recovery')
  const unit = words.text(`unit.name.${words.massUnit}`)
  const total: Row[] = recovered.length > 1
    ? [{ kind: 'total', cells: [words.text('summary.recoveredTotal'), '', '', words.mass(sumMass(recovered.map(({ massKg }) => massKg))), ''] }]
    : []
  await drawTable(sheet, {
    columns: [
      { title: words.text('date'), width: { points: 70 }, isRowHeader: true },
      { title: words.text('technician'), width: { share: 30 } },
      { title: words.text('summary.removal'), width: { share: 34 } },
      { title: words.text('summary.amount'), unit, width: { points: 56 }, align: 'right' },
      { title: words.text('purposeLabel'), width: { share: 30 } },
    ],
    rows: [
      ...removals.map((removal) => ({
        cells: [
          words.date(removal.occurredOn), removal.personName, words.text(`kind.${removal.kind}`), words.mass(removal.massKg),
          removal.purpose ? words.text(`purpose.${removal.purpose}`) : words.text('notRecorded'),
        ],
      })),
      ...total,
    ],
  })
}

async function drawTests(sheet: Sheet, words: Words, { tests }: SummaryCircuit): Promise<void> {
  if (tests.length === 0) return
  sheet.heading(3, words.text('summary.tests'), STYLE.subheading, 70)
  await drawTable(sheet, {
    columns: [
      { title: words.text('date'), width: { points: 70 }, isRowHeader: true },
      { title: words.text('technician'), width: { share: 30 } },
      { title: words.text('test.kindLabel'), width: { share: 22 } },
      { title: words.text('test.type'), width: { share: 40 } },
      { title: words.text('test.result'), width: { share: 16 } },
    ],
    rows: tests.map((test) => ({
      cells: [
        words.date(test.testedOn), test.personName, words.text(`test.kind.${test.kind}`), test.type,
        { text: words.text(test.passed ? 'test.passed' : 'test.failed'), shape: test.passed ? 'below' : 'over' },
      ],
    })),
  })
}
