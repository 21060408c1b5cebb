import { computed, shallowRef, watch } from 'vue'
import { useI18n } from 'vue-i18n'
import { v7 as uuid } from 'uuid'
import type { WireCylinder, WirePartner } from '../../shared/api/cylinders'
import type { MassUnit, PostingDraft, PostingKind, WirePosting } from '../../shared/api/ledger'
import type { WireCircuit } from '../../shared/api/places'
import type { FieldProblem } from '../../shared/api/problem'
import { localDateOf, type PlainDate } from '../../shared/dates/plain-date'
import { ACCOUNTS_OF_KIND } from '../../shared/mass/draft-faults'
import { isZero, kg, toKgText, type Mass } from '../../shared/mass/mass'
import { refusePosting } from '../../shared/mass/refusals'
import type { PostingStates } from '../../shared/mass/states'
import { circuitStateOf, cylinderStateOf } from '../../shared/mass/states-from-wire'
import { postingWarnings } from '../../shared/mass/warnings'
import { netOf, parseMass, varianceFromScale, type NetReading } from '../../shared/units/mass-units'
import { useCircuitsStore } from '../stores/circuits'
import { useLedgerStore } from '../stores/ledger'
import { usePartnersStore } from '../stores/partners'
import { useForm } from './useForm'

/** Postings that are made at the desk or in the store, outside a circuit's weigh-in. */
export const STOCK_KINDS = ['purchase', 'receipt', 'return', 'reclaim', 'destruction', 'transfer', 'variance', 'opening-stock', 'opening-charge'] as const satisfies readonly PostingKind[]
export type StockKind = (typeof STOCK_KINDS)[number]
/** What a technician may post too; the rest is the office's. */
export const FIELD_KINDS: readonly StockKind[] = ['transfer', 'variance']
export const PARTNER_OF_KIND: Partial<Record<StockKind, WirePartner['kind']>> = {
  purchase: 'supplier', receipt: 'supplier', return: 'supplier', reclaim: 'reclaimer', destruction: 'destroyer',
}
const INTO_CYLINDER: readonly StockKind[] = ['purchase', 'receipt', 'opening-stock']

export interface StockEntry {
  id: string
  kind: StockKind
  way: 'net' | 'readings' | 'all'
  unit: MassUnit
  before: string
  after: string
  amount: string
  isNewlyFilled: boolean
  /** The accounts chosen, so that a draft brings them back too. */
  cylinderId: string | null
  toCylinderId: string | null
  circuitId: string | null
  partnerId: string | null
  occurredOn: PlainDate | null
  occurredAt: string
  note: string | null
}

/** A stock posting: the entry, what it comes to, what speaks against it, and its one sending. */
export function useStockPosting({ kind, massUnit, begunAt = { cylinderId: null, circuitId: null } }: {
  kind: StockKind
  massUnit: MassUnit
  /** The cylinder or circuit it was begun at: its draft is kept apart from the others. */
  begunAt?: { cylinderId: string | null; circuitId: string | null }
}) {
  const { t } = useI18n()
  const ledger = useLedgerStore()
  const circuits = useCircuitsStore()
  const partners = usePartnersStore()
  const cylinder = shallowRef<WireCylinder | null>(null)
  const toCylinder = shallowRef<WireCylinder | null>(null)
  const circuit = shallowRef<WireCircuit | null>(null)
  const partner = shallowRef<WirePartner | null>(null)
  const posted = shallowRef<WirePosting | null>(null)
  const fresh = { ...freshEntry(kind, massUnit), ...begunAt }
  const begun = begunAt.cylinderId ?? begunAt.circuitId
  const form = useForm<StockEntry>({ draft: begun ? `posting.stock.${begun}` : 'posting.stock', initial: () => ({ ...fresh }), check: () => faults(), submit: send })
  const entry = form.values

  const today = localDateOf(new Date().toISOString(), Intl.DateTimeFormat().resolvedOptions().timeZone)
  const partnerKind = computed(() => PARTNER_OF_KIND[entry.kind] ?? null)
  const accounts = computed(() => ACCOUNTS_OF_KIND[entry.kind])
  const mayTakeAll = computed(() => partnerKind.value !== null && !INTO_CYLINDER.includes(entry.kind))
  const refrigerant = computed(() => circuit.value?.refrigerant ?? cylinder.value?.refrigerant ?? null)

  /** [kg] what moves; a variance may be negative or zero */
  const net = computed<NetReading>(() => {
    if (entry.kind === 'variance') return varianceNet()
    if (entry.way === 'all' && mayTakeAll.value && cylinder.value) return { ok: true, mass: kg(cylinder.value.contentKg) }
    const { unit, before, after, amount } = entry
    const isNet = entry.way !== 'readings'
    return netOf({ unit, before: isNet ? null : before, after: isNet ? null : after, amount: isNet ? amount : null }, INTO_CYLINDER.includes(entry.kind) ? 'in' : 'out')
  })
  function varianceNet(): NetReading {
    if (!entry.after) return { ok: false, field: 'after', code: 'missing' }
    const gross = parseMass(entry.after, entry.unit)
    if (!gross.ok) return { ok: false, field: 'after', code: gross.code }
    const { tareKg = '0', contentKg = '0' } = cylinder.value ?? {}
    return { ok: true, mass: varianceFromScale({ grossKg: gross.mass, tareKg: kg(tareKg), bookKg: kg(contentKg) }) }
  }

  const states = computed<PostingStates>(() => ({
    cylinder: cylinder.value ? cylinderStateOf(cylinder.value) : undefined,
    toCylinder: entry.kind === 'transfer' && toCylinder.value ? cylinderStateOf(toCylinder.value) : undefined,
    circuit: entry.kind === 'opening-charge' && circuit.value ? circuitStateOf(circuit.value, entry.occurredOn ?? today) : undefined,
  }))
  const draft = computed<PostingDraft | null>(() => (net.value.ok && !isZero(net.value.mass) && refrigerant.value && isNamed() ? draftOf(net.value.mass) : null))
  const refusal = computed(() => draft.value && refusePosting(draft.value, states.value, today))
  const warnings = computed(() => (draft.value && !refusal.value ? postingWarnings(draft.value, states.value, today) : []))

  const idOf = { cylinderId: cylinder, toCylinderId: toCylinder, circuitId: circuit, partnerId: partner }
  const named = (field: keyof typeof idOf): string | null => (accounts.value.includes(field) ? idOf[field].value?.id ?? null : null)
  function isNamed(): boolean {
    return accounts.value.every((field) => field === 'reversesId' || named(field) !== null)
      && !(entry.kind === 'transfer' && cylinder.value?.id === toCylinder.value?.id)
  }
  function draftOf(mass: Mass): PostingDraft {
    const { id, kind: chosen, unit, before, after, amount, way, note, occurredOn, occurredAt } = entry
    const isGross = chosen === 'variance'
    const isNet = way === 'net' && !isGross
    return {
      id, kind: chosen, occurredOn: occurredOn ?? today, occurredAt, refrigerant: refrigerant.value ?? '', massKg: toKgText(mass),
      entered: way === 'all' && mayTakeAll.value ? null : { unit, before: isNet || isGross ? null : before || null, after: isNet ? null : after || null, amount: isNet ? amount || null : null },
      cylinderId: named('cylinderId'), toCylinderId: named('toCylinderId'), circuitId: named('circuitId'), partnerId: named('partnerId'),
      visitId: null, leakId: null, purpose: chosen === 'opening-charge' && entry.isNewlyFilled ? 'installation' : null, isComplete: false,
      part: null, workDone: null, note: note?.trim() || null, reversesId: null, reason: null,
    }
  }

  /** The words beside the field, for the summary on top that stands far from it. */
  function nameOf(field: 'cylinderId' | 'toCylinderId' | 'circuitId' | 'partnerId'): string {
    switch (field) {
      case 'cylinderId': return t(entry.kind === 'transfer' ? 'posting.form.from' : 'posting.form.cylinder')
      case 'toCylinderId': return t('posting.form.to')
      case 'circuitId': return t('posting.form.circuit')
      case 'partnerId': return partnerKind.value ? t(`posting.form.partner.${partnerKind.value}`) : ''
      default: return field satisfies never
    }
  }

  function faults(): FieldProblem[] {
    const found: FieldProblem[] = []
    for (const field of accounts.value) {
      if (field !== 'reversesId' && named(field) === null) found.push({ field, message: `${nameOf(field)}: ${t('posting.form.needed')}` })
    }
    if (entry.kind === 'transfer' && cylinder.value && cylinder.value.id === toCylinder.value?.id) found.push({ field: 'toCylinderId', message: t('validation.posting.same-cylinder') })
    if (!net.value.ok) found.push(...readingFaults(net.value))
    else if (isZero(net.value.mass)) found.push({ field: entry.kind === 'variance' ? 'after' : 'amount', message: t(entry.kind === 'variance' ? 'posting.form.agrees' : 'validation.posting.mass-zero') })
    if (entry.kind === 'variance' && !entry.note?.trim()) found.push({ field: 'note', message: t('posting.form.noteMissing') })
    if (!entry.occurredOn) found.push({ field: 'occurredOn', message: t('common.form.fieldRequired') })
    return found
  }

  function readingFaults({ field, code }: Extract<NetReading, { ok: false }>): FieldProblem[] {
    const fields = field === 'amount' && entry.way === 'readings' ? (['before', 'after'] as const) : [field]
    return fields.map((each) => ({ field: each, message: `${t(entry.kind === 'variance' ? 'posting.form.gross' : `posting.form.${each}`)}: ${t(`units.fault.${code}`)}` }))
  }

  async function send(): Promise<void> {
    if (draft.value) posted.value = await ledger.post(draft.value)
  }
  async function submit(): Promise<boolean> {
    if (refusal.value && faults().length === 0) return false
    const isSent = await form.send()
    if (form.problem.value?.kind === 'refused' && form.problem.value.body.code !== 'posting-id-reused') entry.id = uuid()
    return isSent
  }
  function beginAgain(): void {
    form.reset(freshEntry(entry.kind, entry.unit))
    cylinder.value = toCylinder.value = circuit.value = partner.value = posted.value = null
  }

  for (const field of ['cylinderId', 'toCylinderId', 'circuitId', 'partnerId'] as const) watch(() => idOf[field].value?.id ?? null, (id) => { entry[field] = id })
  if (form.isDraftRestored.value) void bringBack({ ...entry })
  /** What cannot be read again is chosen again. */
  async function bringBack({ cylinderId, toCylinderId, circuitId, partnerId }: StockEntry): Promise<void> {
    const again = async <Row>(id: string | null, get: (id: string) => Promise<Row>): Promise<Row | null> => (id ? get(id).catch(() => null) : null)
    const [from, to, into, by] = await Promise.all([
      again(cylinderId, ledger.getCylinder), again(toCylinderId, ledger.getCylinder), again(circuitId, circuits.get), again(partnerId, partners.get),
    ])
    cylinder.value ??= from
    toCylinder.value ??= to
    circuit.value ??= into
    partner.value ??= by
  }

  watch(() => entry.kind, () => {
    form.fieldProblems.value = []
    if (partner.value && partner.value.kind !== partnerKind.value) partner.value = null
    if (entry.kind === 'opening-charge') cylinder.value = null
    else circuit.value = null
    entry.way = mayTakeAll.value ? 'all' : 'net'
  })

  return { form, entry, cylinder, toCylinder, circuit, partner, posted, net, refusal, warnings, accounts, partnerKind, mayTakeAll, refrigerant, today, submit, beginAgain }
}

function freshEntry(kind: StockKind, unit: MassUnit): StockEntry {
  const now = new Date().toISOString()
  return {
    id: uuid(), kind, way: kind === 'return' || kind === 'reclaim' || kind === 'destruction' ? 'all' : 'net', unit, before: '', after: '', amount: '', isNewlyFilled: false,
    cylinderId: null, toCylinderId: null, circuitId: null, partnerId: null,
    occurredOn: localDateOf(now, Intl.DateTimeFormat().resolvedOptions().timeZone), occurredAt: now, note: null,
  }
}
