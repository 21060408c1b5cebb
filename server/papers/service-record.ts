import type { EnteredWeighing, PostingKind } from '../../shared/api/ledger'
import type { LeakRateMethod, WirePackDecision } from '../../shared/api/places'
import type { PlainDate } from '../../shared/dates/plain-date'
import type { Mass } from '../../shared/mass/mass'
import { drawFacts, type Fact } from './kit/facts'
import { COLOUR, paperSizeOf, STYLE, type TextStyle } from './kit/look'
import { drawMasthead, drawTicketEdge } from './kit/masthead'
import { Sheet } from './kit/sheet'
import { drawShape } from './kit/shapes'
import { drawTable } from './kit/table'
import { addressOf, footerOf, methodOf, type FullChargeOnPaper, type LeakRateSummary, type Making, type RateOnPaper } from './leak-rate-summary'
import { decisionsText, drawRules, type ThresholdOnPaper } from './rules-part'
import { wordsFor, type Words } from './words'

/** An entry of the ledger on the record: what was weighed, where and by whom. */
export interface RecordEntry {
  kind: PostingKind
  occurredOn: PlainDate
  personName: string
  certificateNumber: string | null
  certificateType: string | null
  refrigerant: string
  massKg: Mass
  entered: EnteredWeighing | null
  /** Null: none recorded. Withheld: the reader may not see the company's cylinders. */
  cylinderNumber: string | null
  isCylinderWithheld: boolean
  purpose: string | null
  isComplete: boolean
  part: string | null
  workDone: string | null
  note: string | null
  /** For a charge; null where it is not rated. */
  rate: RateOnPaper | null
  /** Why and by whom the entry was taken back; null where it stands. */
  reversal: { reason: string; personName: string; occurredOn: PlainDate } | null
}

export interface RecordLeak {
  foundOn: PlainDate
  place: string | null
  cause: string
  method: string
  personName: string
  note: string | null
  repairedOn: PlainDate | null
  repair: string | null
}

export interface RecordTest {
  kind: 'initial' | 'follow-up'
  testedOn: PlainDate
  type: string
  passed: boolean
  showsAllRepaired: boolean
  leakPlace: string | null
  personName: string
  note: string | null
}

export interface RecordMark {
  markedOn: PlainDate
  place: string | null
  text: string
  personName: string
  resolvedOn: PlainDate | null
}

export interface RecordCircuit {
  systemTag: string
  systemName: string
  location: string | null
  maker: string | null
  model: string | null
  serial: string | null
  name: string
  refrigerant: string
  category: string
  /** In force on the day of the work; null: never determined. */
  fullCharge: FullChargeOnPaper | null
  entries: RecordEntry[]
  leaks: RecordLeak[]
  tests: RecordTest[]
  marks: RecordMark[]
  thresholds: ThresholdOnPaper[]
  packs: WirePackDecision[]
}

export interface ServiceRecord {
  site: LeakRateSummary['site']
  owner: LeakRateSummary['owner']
  method: LeakRateMethod
  servicedOn: PlainDate
  /** Everyone who stands behind an entry, a leak or a test of this record. */
  people: { name: string; certificateNumber: string | null; certificateType: string | null }[]
  remark: string | null
  circuits: RecordCircuit[]
  /** Results of the bench that were put into the visit, as they were shown then. */
  calculations: { title: string; lines: { label: string; value: string }[]; personName: string }[]
}

/** The record of a service that its person hands to the owner or operator, 40 CFR 82.157(l). */
export function serviceRecord(record: ServiceRecord, making: Making): { sheet: Sheet; draw: () => Promise<void> } {
  const words = wordsFor(making.locale, record.site.jurisdiction)
  const title = words.text('record.title')
  const date = words.date(record.servicedOn)
  const sheet = new Sheet({
    paper: paperSizeOf(record.site.country), language: making.locale, title: `${title} – ${record.site.name}, ${date}`, subject: record.site.name,
    author: making.companyName, madeAt: making.madeAt, runningHead: words.text('runningHead', { title, subject: record.site.name, period: date }),
    footer: footerOf(words, making, record.site.timeZone), pageLabel: (page, pages) => words.text('page', { page, pages }),
  })
  return {
    sheet,
    draw: async () => {
      drawMasthead(sheet, {
        company: making.companyName, title, lead: words.text(record.site.jurisdiction.startsWith('US') ? 'record.lead' : 'record.leadElsewhere'),
        ticket: [{ label: words.text('record.servicedOn'), value: date }, { label: words.text('summary.site'), value: record.site.name }],
      })
      drawParties(sheet, words, record, making)
      if (record.circuits.length === 0) sheet.text(words.text('record.noWork'), STYLE.body, { after: 8 })
      for (const circuit of record.circuits) await sheet.within('Sect', () => drawCircuit(sheet, words, record, circuit))
      if (record.calculations.length > 0) await sheet.within('Sect', () => drawCalculations(sheet, words, record.calculations))
      await drawRules(sheet, words, record.circuits.flatMap((circuit) => circuit.thresholds))
      await sheet.within('Sect', () => drawHandover(sheet, words))
      sheet.finish()
    },
  }
}

function drawCalculations(sheet: Sheet, words: Words, calculations: ServiceRecord['calculations']): void {
  sheet.begin(120)
  sheet.heading(2, words.text('record.calculations'), STYLE.heading)
  for (const { title, lines, personName } of calculations) {
    sheet.heading(3, `${title}, ${personName}`, STYLE.subheading, 60)
    drawFacts(sheet, [...lines])
  }
  sheet.space(8)
}

function drawParties(sheet: Sheet, words: Words, { site, owner, people, remark }: ServiceRecord, { companyName }: Making): void {
  const technicians = people.map((person) => `${person.name}\n${certificateOf(words, person)}`)
  drawFacts(sheet, [
    { label: words.text('summary.owner'), value: [owner.name, words.orMissing(owner.address)].join('\n') },
    { label: words.text('record.location'), value: `${site.name}\n${addressOf(site)}` },
    { label: words.text('record.servicedBy'), value: [companyName, ...(technicians.length > 0 ? technicians : [words.text('notRecorded')])].join('\n') },
  ])
  if (remark) drawFacts(sheet, [{ label: words.text('record.remark'), value: remark }], { columns: 1 })
  sheet.space(4)
}

function certificateOf(words: Words, { certificateNumber, certificateType }: { certificateNumber: string | null; certificateType: string | null }): string {
  if (!certificateNumber) return words.text('record.noCertificate')
  return certificateType
    ? words.text('record.certificate', { number: certificateNumber, type: words.text(`certificateType.${certificateType}`) })
    : words.text('record.certificateNumber', { number: certificateNumber })
}

async function drawCircuit(sheet: Sheet, words: Words, record: ServiceRecord, circuit: RecordCircuit): Promise<void> {
  sheet.begin(210)
  sheet.heading(2, `${circuit.systemTag} · ${circuit.name}`, STYLE.heading)
  drawFacts(sheet, [
    { label: words.text('record.appliance'), value: [circuit.systemName, circuit.location].filter(Boolean).join(', ') },
    { label: words.text('record.make'), value: words.orMissing([circuit.maker, circuit.model].filter(Boolean).join(' ') || null) },
    { label: words.text('record.serial'), value: words.orMissing(circuit.serial) },
    { label: words.text('refrigerant'), value: circuit.refrigerant, style: STYLE.strong },
    { label: words.text('rules.category'), value: words.common(`rules.categories.${circuit.category}`) },
    { label: words.text('fullCharge'), ...fullChargeOf(words, circuit.fullCharge) },
  ])
  drawFacts(sheet, [{ label: words.text('rules.decisions'), value: decisionsText(words, circuit.packs), style: STYLE.small }], { columns: 1 })
  sheet.heading(3, words.text('record.entries', { count: circuit.entries.length }), STYLE.subheading)
  if (circuit.entries.length === 0) sheet.text(words.text('record.noEntries'), STYLE.body, { after: 6 })
  for (const entry of circuit.entries) {
    drawEntry(sheet, words, record, circuit, entry)
    await sheet.breathe()
  }
  await drawLeaks(sheet, words, circuit.leaks)
  await drawTests(sheet, words, circuit.tests)
  await drawMarks(sheet, words, circuit.marks)
  sheet.space(8)
}

function fullChargeOf(words: Words, charge: FullChargeOnPaper | null): Omit<Fact, 'label'> {
  if (!charge) return { value: words.text('notRecorded') }
  return { value: words.text('record.fullCharge', { mass: words.massInBoth(charge.massKg), method: methodOf(words, charge), date: words.date(charge.effectiveOn) }) }
}

const TICKET_PAD = 9 // [pt]
const TICKET_HEAD = 42 // [pt]

/** One entry as a weigh ticket: what it was and how much on top, everything the law asks for below. */
function drawEntry(sheet: Sheet, words: Words, record: ServiceRecord, circuit: RecordCircuit, entry: RecordEntry): void {
  sheet.need(TICKET_HEAD + 160) // the most that an entry with short texts takes
  const top = sheet.y
  const left = sheet.left + TICKET_PAD
  const right = sheet.right - TICKET_PAD
  drawTicketEdge(sheet, sheet.left, top, sheet.width, TICKET_HEAD)
  const kind = words.text(`record.did.${entry.kind}`)
  const amount = words.text('record.amount', { mass: words.mass(entry.massKg), unit: words.text(`unit.short.${words.massUnit}`) })
  const exact = words.massExact(entry.massKg)
  sheet.tagged('P', () => sheet.pen.write(kind, left, top + 6, STYLE.heading))
  sheet.tagged('P', () => sheet.pen.write(`${words.date(entry.occurredOn)} · ${entry.refrigerant}`, left, top + 23, STYLE.value))
  sheet.tagged('P', () => sheet.pen.write(amount, right - sheet.pen.width(amount, STYLE.figure), top + 3, STYLE.figure))
  sheet.tagged('P', () => sheet.pen.write(exact, right - sheet.pen.width(exact, STYLE.small), top + 27, STYLE.small))
  sheet.y = top + TICKET_HEAD + 6
  if (entry.reversal) drawReversal(sheet, words, entry.reversal)
  drawFacts(sheet, entryFacts(words, entry), { columns: 3, x: left, width: sheet.width - 2 * TICKET_PAD })
  drawRate(sheet, words, record, circuit, entry)
  sheet.space(8)
}

function drawReversal(sheet: Sheet, words: Words, { reason, personName, occurredOn }: NonNullable<RecordEntry['reversal']>): void {
  const x = sheet.left + TICKET_PAD
  sheet.text(words.text('record.reversed', { person: personName, date: words.date(occurredOn), reason }), { ...STYLE.strong, colour: COLOUR.overText },
    { x, width: sheet.width - 2 * TICKET_PAD, after: 4 })
}

function entryFacts(words: Words, entry: RecordEntry): Fact[] {
  const { entered } = entry
  const unit = entered ? words.text(`unit.name.${entered.unit}`) : ''
  const inTwo = /^\d+-/ // pounds and ounces as they are stored
  const reading = (value: string | null | undefined): string => (value ? words.text(inTwo.test(value) ? 'record.readingInTwo' : 'record.reading', { value, unit, pounds: value.split('-')[0], ounces: value.split('-')[1] }) : words.text('notRecorded'))
  const readings = entered?.before || entered?.after
    ? [
        { label: words.text('record.before'), value: reading(entered.before) },
        { label: words.text('record.after'), value: reading(entered.after) },
      ]
    : [{ label: words.text('record.scale'), value: words.text('record.noReadings') }, { label: words.text('record.enteredAmount'), value: reading(entered?.amount) }]
  return [
    ...readings,
    { label: words.text('record.cylinder'), value: entry.isCylinderWithheld ? words.text('record.cylinderWithheld') : words.orMissing(entry.cylinderNumber), style: STYLE.strong },
    { label: words.text('record.part'), value: words.orMissing(entry.part) },
    { label: words.text('purposeLabel'), value: entry.purpose ? words.text(`purpose.${entry.purpose}`) : words.text('notRecorded') },
    { label: words.text('record.person'), value: `${entry.personName}\n${certificateOf(words, entry)}` },
    { label: words.text('record.workDone'), value: words.orMissing(entry.workDone) },
    { label: words.text('record.state'), value: words.text(stateKey(entry)) },
    { label: words.text('note'), value: entry.note ?? words.text('none') },
  ]
}

const stateKey = ({ kind, isComplete }: RecordEntry): string => {
  if (kind === 'charge' || kind === 'opening-charge') return isComplete ? 'record.filledWhole' : 'record.filledPart'
  return isComplete ? 'record.emptied' : 'record.emptiedPart'
}

function drawRate(sheet: Sheet, words: Words, record: ServiceRecord, circuit: RecordCircuit, { kind, rate, reversal }: RecordEntry): void {
  if (kind !== 'charge' && kind !== 'opening-charge') return
  const x = sheet.left + TICKET_PAD
  const width = sheet.width - 2 * TICKET_PAD
  sheet.need(44)
  sheet.rule(sheet.y, { from: x, to: x + width })
  sheet.space(4)
  const say = (text: string, style: TextStyle = STYLE.body, indent = 0): void =>
    sheet.text(text, style, { x: x + indent, width: width - indent, after: 1 })
  if (reversal) return say(words.text('record.rateReversed'))
  if (!rate) return say(words.text('record.rateMissing'))
  if (rate.exempt) {
    say(words.text('record.exempt', { reason: words.text(`exempt.${rate.exempt}`) }))
    return
  }
  if (!rate.rate || !rate.fullChargeKg) return say(words.text('record.rateMissing'))
  const shape = rate.isAbove ? 'over' : rate.threshold ? 'below' : 'none'
  const y = sheet.y
  sheet.ornament((document) => drawShape(document, shape, x, y + sheet.pen.lineHeight(STYLE.strong) / 2))
  say(words.text(rate.threshold ? 'record.rate' : 'record.rateAlone', {
    rate: words.rate(rate.rate, rate.threshold), threshold: rate.threshold ? words.threshold(rate.threshold) : '',
    standing: words.text(rate.isAbove ? 'record.isAbove' : 'record.isNotAbove'),
  }), STYLE.strong, 10)
  say(words.text(`record.computed.${record.method}`, {
    method: words.text(`method.${record.method}.name`), added: words.mass(rate.addedKg), fullCharge: words.mass(rate.fullChargeKg), days: rate.days ?? 0,
    unit: words.text(`unit.short.${words.massUnit}`), rate: words.rate(rate.rate, rate.threshold), refrigerant: circuit.refrigerant,
  }), STYLE.small, 10)
  for (const code of rate.basis) say(words.text(`basis.${code}`), STYLE.small, 10)
}

async function drawLeaks(sheet: Sheet, words: Words, leaks: readonly RecordLeak[]): Promise<void> {
  sheet.heading(3, words.text('leak.title'), STYLE.subheading, 70)
  if (leaks.length === 0) return sheet.text(words.text('leak.none'), STYLE.body, { after: 6 })
  await drawTable(sheet, {
    columns: [
      { title: words.text('leak.foundOn'), width: { points: 62 }, isRowHeader: true },
      { title: words.text('leak.place'), width: { share: 24 } },
      { title: words.text('leak.causeLabel'), width: { share: 16 } },
      { title: words.text('leak.methodLabel'), width: { share: 18 } },
      { title: words.text('leak.foundBy'), width: { share: 18 } },
      { title: words.text('leak.repair'), width: { share: 30 } },
    ],
    rows: leaks.map((leak) => ({
      cells: [
        words.date(leak.foundOn), [words.orMissing(leak.place), leak.note].filter(Boolean).join('\n'), words.text(`leak.cause.${leak.cause}`),
        words.text(`leak.method.${leak.method}`), leak.personName,
        leak.repairedOn
          ? { text: words.text('leak.repaired', { date: words.date(leak.repairedOn), repair: words.orMissing(leak.repair) }), shape: 'below' }
          : { text: words.text('leak.notRepaired'), shape: 'over', style: STYLE.cellStrong },
      ],
    })),
  })
}

async function drawTests(sheet: Sheet, words: Words, tests: readonly RecordTest[]): Promise<void> {
  sheet.heading(3, words.text('test.title'), STYLE.subheading, 70)
  if (tests.length === 0) return sheet.text(words.text('test.none'), STYLE.body, { after: 6 })
  await drawTable(sheet, {
    columns: [
      { title: words.text('date'), width: { points: 62 }, isRowHeader: true },
      { title: words.text('test.kindLabel'), width: { share: 18 } },
      { title: words.text('test.type'), width: { share: 30 } },
      { title: words.text('test.ofLeak'), width: { share: 24 } },
      { title: words.text('record.person'), width: { share: 20 } },
      { title: words.text('test.result'), width: { share: 24 } },
    ],
    rows: tests.map((test) => ({
      cells: [
        words.date(test.testedOn), words.text(`test.kind.${test.kind}`), [test.type, test.note].filter(Boolean).join('\n'),
        test.leakPlace ?? words.text(test.showsAllRepaired ? 'test.allLeaks' : 'notRecorded'), test.personName,
        { text: resultOf(words, test), shape: test.passed ? 'below' : 'over', style: STYLE.cellStrong },
      ],
    })),
  })
}

const resultOf = (words: Words, test: RecordTest): string =>
  words.text(!test.passed ? 'test.failed' : test.showsAllRepaired ? 'test.passedAll' : 'test.passed')

async function drawMarks(sheet: Sheet, words: Words, marks: readonly RecordMark[]): Promise<void> {
  sheet.heading(3, words.text('mark.title'), STYLE.subheading, 70)
  if (marks.length === 0) return sheet.text(words.text('mark.none'), STYLE.body, { after: 6 })
  await drawTable(sheet, {
    columns: [
      { title: words.text('date'), width: { points: 62 }, isRowHeader: true },
      { title: words.text('leak.place'), width: { share: 24 } },
      { title: words.text('mark.text'), width: { share: 46 } },
      { title: words.text('record.person'), width: { share: 20 } },
      { title: words.text('mark.resolvedOn'), width: { points: 66 } },
    ],
    rows: marks.map((mark) => ({
      cells: [
        words.date(mark.markedOn), words.orMissing(mark.place), mark.text, mark.personName,
        mark.resolvedOn ? words.date(mark.resolvedOn) : words.text('mark.open'),
      ],
    })),
  })
}

/** Lines on which both sides sign that the record changed hands. */
function drawHandover(sheet: Sheet, words: Words): void {
  sheet.need(96)
  sheet.heading(2, words.text('record.handover'), STYLE.heading)
  sheet.text(words.text('record.handoverText'), STYLE.small, { after: 26 })
  const half = (sheet.width - 24) / 2
  const y = sheet.y
  const labels = [words.text('record.signService'), words.text('record.signOwner')]
  labels.forEach((label, index) => {
    const x = sheet.left + index * (half + 24)
    sheet.rule(y, { colour: COLOUR.ink, width: 0.6, from: x, to: x + half })
    sheet.tagged('P', () => sheet.pen.write(label, x, y + 2, STYLE.small))
  })
  sheet.y = y + 16
}
