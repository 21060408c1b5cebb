import { computed, shallowRef, watch } from 'vue'
import { useI18n } from 'vue-i18n'
import { v7 as uuid } from 'uuid'
import type { WireCylinder } from '../../shared/api/cylinders'
import type { MassUnit, WirePosting } from '../../shared/api/ledger'
import type { WireCircuit } from '../../shared/api/places'
import type { FieldProblem } from '../../shared/api/problem'
import { localTimeOf } from '../../shared/dates/local-instant'
import { localDateOf } from '../../shared/dates/plain-date'
import { kg, minus, plus, type Mass } from '../../shared/mass/mass'
import { refusePosting, type Refusal } from '../../shared/mass/refusals'
import type { PostingStates } from '../../shared/mass/states'
import { circuitStateOf, cylinderStateOf } from '../../shared/mass/states-from-wire'
import { postingWarnings } from '../../shared/mass/warnings'
import { netOf, type NetReading } from '../../shared/units/mass-units'
import { isRefusedWith } from '../api/problem'
import { useLedgerStore } from '../stores/ledger'
import { useVisitsStore } from '../stores/visits'
import { useForm } from './useForm'
import { draftOf, enteredOf, isTime, PURPOSES_OF_KIND, type WeighInEntry } from './weigh-in-entry'
import { outlookOf } from './weigh-in-outlook'

/** [kg] the least that can move: shows at once whether a cylinder can be used at all */
const LEAST_KG = kg('0.000001')

/** Weighing gas into or out of a circuit: the entry, what it would do, and its one sending. */
export function useWeighIn({ circuit: current, massUnit }: { circuit: () => WireCircuit; massUnit: MassUnit }) {
  const { t } = useI18n()
  const ledger = useLedgerStore()
  const visits = useVisitsStore()
  const cylinder = shallowRef<WireCylinder | null>(null)
  const posted = shallowRef<WirePosting | null>(null)
  const circuit = computed(current)
  const fresh = freshEntry(circuit.value, massUnit)

  const form = useForm<WeighInEntry>({
    draft: `weigh-in.${circuit.value.id}`,
    initial: () => ({ ...fresh }),
    check: () => faults(),
    submit: send,
  })
  const entry = form.values

  const today = computed(() => localDateOf(new Date().toISOString(), circuit.value.siteTimeZone))
  const isLoss = computed(() => entry.kind === 'loss')
  const direction = computed(() => (entry.kind === 'recovery' ? 'in' : 'out'))
  const net = computed(() => {
    const entered = enteredOf(entry)
    return entered ? netOf(entered, direction.value) : { ok: true as const, mass: kg(circuit.value.bookChargeKg) }
  })
  const circuitState = computed(() => circuitStateOf(circuit.value, entry.occurredOn ?? today.value))

  const statesWith = (chosen: WireCylinder | null): PostingStates =>
    ({ circuit: circuitState.value, cylinder: chosen && !isLoss.value ? cylinderStateOf(chosen) : undefined })

  function draftWith(chosen: WireCylinder | null, massKg: Mass) {
    return isLoss.value || chosen ? draftOf(entry, { circuit: circuit.value, cylinder: chosen, massKg }) : null
  }
  const draft = computed(() => (net.value.ok && !net.value.mass.isZero() ? draftWith(cylinder.value, net.value.mass) : null))
  const refusal = computed<Refusal | null>(() => draft.value && refusePosting(draft.value, statesWith(cylinder.value), today.value))
  const warnings = computed(() => (draft.value && !refusal.value ? postingWarnings(draft.value, statesWith(cylinder.value), today.value) : []))
  const outlook = computed(() => (draft.value ? outlookOf(circuit.value, circuitState.value, draft.value) : null))
  /** [kg] by the book, once it is posted */
  const cylinderAfterKg = computed(() => {
    if (!cylinder.value || !net.value.ok || isLoss.value) return null
    const contentKg = kg(cylinder.value.contentKg)
    return entry.kind === 'recovery' ? plus(contentKg, net.value.mass) : minus(contentKg, net.value.mass)
  })

  /** Why a cylinder cannot be used here at all, whatever the amount; null if it can. */
  function refuseCylinder(chosen: WireCylinder): Refusal | null {
    const trial = draftWith(chosen, LEAST_KG)
    return trial && refusePosting(trial, statesWith(chosen), today.value)
  }

  function faults(): FieldProblem[] {
    const found: FieldProblem[] = []
    if (!isLoss.value && !cylinder.value) found.push({ field: 'cylinderId', message: t('weighIn.cylinder.missing') })
    if (!net.value.ok) found.push(...readingFaults(net.value))
    else if (net.value.mass.isZero()) found.push({ field: 'amount', message: t('weighIn.loss.empty') })
    if (!entry.occurredOn) found.push({ field: 'occurredOn', message: t('weighIn.work.dateMissing') })
    if (!isTime(entry.time)) found.push({ field: 'time', message: t('weighIn.work.timeWrong') })
    return found
  }

  /** Named by its field, since the summary on top stands far from it; both readings where none was entered. */
  function readingFaults({ field, code }: Extract<NetReading, { ok: false }>): FieldProblem[] {
    const fields = field === 'amount' && !entry.isNet && !isLoss.value ? (['before', 'after'] as const) : [field]
    return fields.map((each) => ({ field: each, message: `${t(`weighIn.scale.${each}`)}: ${t(`units.fault.${code}`)}` }))
  }

  /** Looks at everything that can be seen from here. @returns whether it may be reviewed */
  function look(): boolean {
    form.problem.value = null
    form.fieldProblems.value = faults()
    return form.fieldProblems.value.length === 0 && !refusal.value
  }

  /** The visit's id is kept in the entry, so that a second sending is word for word the first. */
  async function send(): Promise<void> {
    if (!entry.occurredOn) return
    if (entry.visitId === null) entry.visitId = (await visits.mine(circuit.value.siteId, entry.occurredOn)) ?? uuid()
    await visits.create({ id: entry.visitId, siteId: circuit.value.siteId, visitedOn: entry.occurredOn, remark: null })
    if (draft.value) posted.value = await ledger.post(draft.value)
  }

  /** What was sent under this id before and stands; null if nothing does. */
  const standingId = computed(() => (isRefusedWith(form.problem.value, 'posting-id-reused') ? entry.id : null))

  async function submit(): Promise<boolean> {
    const isSent = await form.send()
    // Refused: it is mended under a new id. Fate unknown: it is sent again unchanged.
    if (form.problem.value?.kind === 'refused' && standingId.value === null) entry.id = uuid()
    return isSent
  }

  function beginAgain(): void {
    form.reset(freshEntry(circuit.value, massUnit))
    cylinder.value = null
    posted.value = null
  }

  watch(() => entry.kind, (kind) => {
    if (!PURPOSES_OF_KIND[kind].includes(entry.purpose)) entry.purpose = PURPOSES_OF_KIND[kind][0] ?? 'leak'
    // That a circuit is full or empty is for the person to say: the book follows it.
    entry.isComplete = false
    form.fieldProblems.value = []
  })
  watch(() => entry.occurredOn, () => (entry.visitId = null))
  watch(cylinder, (chosen) => (entry.cylinderId = chosen?.id ?? null))

  return { form, entry, cylinder, posted, net, draft, refusal, warnings, outlook, cylinderAfterKg, today, standingId, refuseCylinder, look, submit, beginAgain }
}

function freshEntry(circuit: WireCircuit, unit: MassUnit): WeighInEntry {
  const now = new Date().toISOString()
  return {
    id: uuid(), visitId: null, kind: 'charge', cylinderId: null, isNet: false, unit, before: '', after: '', amount: '', isWholeLoss: true, isComplete: false,
    purpose: 'leak', leakId: null, part: null, workDone: null, note: null,
    occurredOn: localDateOf(now, circuit.siteTimeZone), time: localTimeOf(now, circuit.siteTimeZone),
  }
}
