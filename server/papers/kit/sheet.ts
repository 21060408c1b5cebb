import { setImmediate as nextTurn, setTimeout as pause } from 'node:timers/promises'
import PDFDocument from 'pdfkit'
import { internalsOf, type PendingObject } from './internals'
import { COLOUR, MARGIN, STYLE, type PaperSize, type TextStyle } from './look'
import { inkOf, Pen } from './pen'

type Document = InstanceType<typeof PDFDocument>
export type Element = ReturnType<Document['struct']>

export interface SheetSetup {
  paper: PaperSize
  /** BCP 47 tag of the language. */
  language: string
  title: string
  subject: string
  author: string
  /** The instant that the paper was made. */
  madeAt: Date
  /** Stands on top of every page but the first. */
  runningHead: string
  /** Stands at the foot of every page: when, by whom and for which company. */
  footer: string
  pageLabel: (page: number, pages: number) => string
}

const TURN_MS = 15 // [ms] after which other requests get their turn
const MOST_WAITING = 1_000_000 // [bytes] written and not yet taken by the reader
const WAIT_MS = 10 // [ms]
const LABEL_WIDTH = 150 // [pt]
const FOOT_GAP = 16 // [pt] from the content to the foot

/**
 * A tagged PDF that grows page by page: each page leaves as soon as it is full, so a long paper needs no more
 * memory than a short one. Only the page numbers wait for the end.
 */
export class Sheet {
  readonly document: Document
  readonly pen: Pen
  /** [pt] from the top; where the next block begins. */
  y: number = MARGIN.top
  private parents: Element[] = []
  private labels: PendingObject[] = []
  private turnBegan = performance.now()

  constructor(private readonly setup: SheetSetup) {
    this.document = new PDFDocument({
      size: setup.paper, margin: 0, autoFirstPage: false, pdfVersion: '1.7', subset: 'PDF/UA', tagged: true, lang: setup.language, displayTitle: true,
      font: undefined,
      info: { Title: setup.title, Subject: setup.subject, Author: setup.author, Creator: 'Weighback', Producer: 'Weighback', CreationDate: setup.madeAt },
    } as unknown as PDFKit.PDFDocumentOptions) // the declared type lacks 'PDF/UA', which pdfkit has
    this.document.addPage()
    this.pen = new Pen(this.document)
    const root = this.document.struct('Document')
    this.document.addStructure(root)
    this.parents = [root]
    this.frame()
  }

  get left(): number { return MARGIN.left }
  get right(): number { return this.document.page.width - MARGIN.right }
  get width(): number { return this.right - this.left }
  get bottom(): number { return this.document.page.height - MARGIN.bottom }
  get pages(): number { return this.labels.length }

  /** Runs work whose blocks belong together in the structure of the document. */
  async within<Result>(tag: string, work: () => Promise<Result> | Result): Promise<Result> {
    await this.breathe()
    const element = this.open(tag)
    try {
      return await work()
    } finally {
      this.close(element)
    }
  }

  open(tag: string, options: PDFKit.Mixins.StructureElementOptions & { scope?: string } = {}): Element {
    const element = this.document.struct(tag, options)
    this.parent.add(element)
    this.parents.push(element)
    return element
  }

  close(element: Element): void {
    if (this.parents.at(-1) !== element) throw new Error('Structure elements are closed in the order in which they were opened.')
    this.parents.pop()
    element.end()
  }

  /** Leaves an element open to further content while its neighbours are filled; the caller ends it. */
  suspend(element: Element): void {
    if (this.parents.at(-1) !== element) throw new Error('Structure elements are left in the order in which they were opened.')
    this.parents.pop()
  }

  /** Content of the open element, on the page at hand. */
  content(draw: () => void): void {
    this.parent.add(draw)
  }

  /** A piece of content with a tag of its own. */
  tagged(tag: string, draw: () => void, options: PDFKit.Mixins.StructureElementOptions & { scope?: string } = {}): void {
    const element = this.open(tag, options)
    this.content(draw)
    this.close(element)
  }

  /** Lines, fields and other ornament that is not read aloud. */
  ornament(draw: (document: Document) => void, type: 'Layout' | 'Pagination' = 'Layout'): void {
    this.document.markContent('Artifact', { type })
    draw(this.document)
    this.document.endMarkedContent()
  }

  rule(y: number, { colour = COLOUR.rule as string, width = 0.5, from = this.left, to = this.right } = {}): void {
    this.ornament((document) => document.moveTo(from, y).lineTo(to, y).lineWidth(width).stroke(colour))
  }

  space(points: number): void {
    this.y += points
  }

  /** Begins a new page unless so much room is left [pt]. */
  need(height: number): void {
    if (this.y + height > this.bottom) this.newPage()
  }

  /** Begins a part of its own, which has at least so much room [pt], under a rule. */
  begin(height: number): void {
    this.need(height)
    if (this.y === MARGIN.top) return
    this.rule(this.y, { colour: COLOUR.spruce, width: 0.8 })
    this.space(7)
  }

  newPage(): void {
    this.document.addPage()
    this.y = MARGIN.top
    this.frame()
  }

  /** A text over as many lines and pages as it takes. */
  text(text: string, style: TextStyle = STYLE.body, { tag = 'P', x = this.left, width = this.width, after = 0 } = {}): void {
    const element = this.open(tag)
    const height = this.pen.lineHeight(style)
    for (const line of this.pen.lines(text, style, width)) {
      this.need(height)
      const y = this.y
      this.content(() => this.pen.write(line, x, y, style))
      this.y += height
    }
    this.close(element)
    this.y += after
  }

  heading(level: 1 | 2 | 3, text: string, style: TextStyle, keepWith = 60): void {
    this.need(keepWith)
    this.text(text, style, { tag: `H${level}`, after: 3 })
  }

  /** Lets other requests have their turn, and a slow reader catch up. @throws Error if the reader has gone */
  async breathe(): Promise<void> {
    if (performance.now() - this.turnBegan < TURN_MS) return
    await nextTurn()
    while (this.document.readableLength > MOST_WAITING && !this.document.destroyed) await pause(WAIT_MS)
    if (this.document.destroyed) throw new Error('The reader of the paper has gone.')
    this.turnBegan = performance.now()
  }

  /** Fills in the page numbers and closes the document. */
  finish(): void {
    const font = this.pen.font(STYLE.small.weight)
    this.labels.forEach((label, index) => {
      const text = this.setup.pageLabel(index + 1, this.labels.length)
      const x = LABEL_WIDTH - this.pen.width(text, STYLE.small)
      label.end(`${inkOf(STYLE.small.colour)} rg BT /${font.id} ${STYLE.small.size} Tf 1 0 0 1 ${x.toFixed(2)} 3 Tm [${this.pen.glyphs(text, STYLE.small)}] TJ ET`)
    })
    for (const element of this.parents.splice(0).reverse()) element.end()
    this.document.end()
  }

  private get parent(): Element {
    const parent = this.parents.at(-1)
    if (!parent) throw new Error('The paper is finished.')
    return parent
  }

  /** What stands on every page: the head of the following pages, the foot, and the place of the page number. */
  private frame(): void {
    const isFirst = this.labels.length === 0
    const footY = this.bottom + FOOT_GAP
    this.ornament((document) => {
      if (!isFirst) {
        this.pen.write(this.shortened(this.setup.runningHead, this.width), this.left, 28, STYLE.small)
        document.moveTo(this.left, 43).lineTo(this.right, 43).lineWidth(0.8).stroke(COLOUR.spruce)
      }
      document.moveTo(this.left, footY - 4).lineTo(this.right, footY - 4).lineWidth(0.5).stroke(COLOUR.ruleStrong)
      this.pen.write(this.shortened(this.setup.footer, this.width - 70), this.left, footY, STYLE.small)
      this.placeLabel(footY)
    }, 'Pagination')
  }

  private shortened(text: string, width: number): string {
    const [first = '', ...rest] = this.pen.lines(text, STYLE.small, width - 8)
    return rest.length > 0 ? `${first} …` : first
  }

  private placeLabel(y: number): void {
    const internals = internalsOf(this.document)
    const font = this.pen.font(STYLE.small.weight)
    const height = this.pen.lineHeight(STYLE.small)
    const label = internals.ref({
      Type: 'XObject', Subtype: 'Form', FormType: 1, BBox: [0, 0, LABEL_WIDTH, height], Resources: { Font: { [font.id]: font.ref() } },
    })
    internals.page.xobjects.PageLabel = label
    internals.addContent(`q 1 0 0 -1 ${this.right - LABEL_WIDTH} ${y + height} cm /PageLabel Do Q`)
    this.labels.push(label)
  }
}
