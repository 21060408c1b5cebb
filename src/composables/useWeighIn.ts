import { computed, shallowRef, watch } from 'vue'
import { useI18n } from 'vue-i18n'
import { v7 as uuid } from 'uuid'
import type { WirePosting } from '../../shared/api/ledger'
import type { WireCircuit } from '../../shared/api/places'
import type { FieldProblem } from '../../shared/api/problem'
import { localTimeOf } from '../../shared/dates/local-instant'
import { localDateOf } from '../../shared/dates/plain-date'
import { ZERO_MASS } from '../../shared/mass/mass'
import { useLedgerStore } from '../stores/ledger'
import { useVisitsStore } from '../stores/visits'
import { useForm } from './useForm'
import { useOnline } from './useOnline'
import { useUnits } from './useUnits'
import { draftOf, isClockTime, netOfEntry, PURPOSES_OF } from './weigh-in/entry'
import type { WeighInEntry } from './weigh-in/entry'
import { outlookOf, refusalOfCylinder } from './weigh-in/outlook'

interface WeighInOptions {
  circuit: () => WireCircuit
  /** The instant now, ISO 8601. */
  now?: () => string
}

/** One weigh-in at a circuit, from the first figure to the posting in the ledger. */
export function useWeighIn({ circuit, now = () => new Date().toISOString() }: WeighInOptions) {
  const { t } = useI18n()
  const { massUnit } = useUnits()
  const { isOnline } = useOnline()
  const ledger = useLedgerStore()
  const visits = useVisitsStore()
  const posted = shallowRef<WirePosting | null>(null)

  const first = blank()
  const form = useForm<WeighInEntry>({ draft: `weigh-in.${circuit().id}`, initial: () => ({ ...first }), check, submit })
  const entry = form.values

  const today = computed(() => localDateOf(now(), circuit().siteTimeZone))
  const net = computed(() => netOfEntry(entry, circuit().bookChargeKg))
  const draft = computed(() => (net.value.ok ? draftOf(entry, circuit(), net.value.mass) : null))
  const cylinder = computed(() => (entry.kind === 'loss' ? null : entry.cylinder))
  const outlook = computed(() => draft.value && outlookOf({ draft: draft.value, circuit: circuit(), cylinder: cylinder.value, today: today.value }))
  /** What stands against this cylinder, whatever the amount. */
  const cylinderRefusal = computed(() => {
    const netKg = net.value.ok ? net.value.mass : null
    const asked = cylinder.value && draftOf(entry, circuit(), netKg ?? ZERO_MASS)
    return asked && cylinder.value ? refusalOfCylinder({ draft: asked, circuit: circuit(), cylinder: cylinder.value, today: today.value }) : null
  })
  const refusal = computed(() => outlook.value?.refusal ?? cylinderRefusal.value)
  /** Sent, and no answer came: it may stand in the ledger already, and sending it again posts it once. */
  const isUnsent = computed(() => form.problem.value?.kind === 'offline')

  /** A new entry: its posting has its own id from the start. */
  function blank(): WeighInEntry {
    const at = now()
    const { siteTimeZone, leaks, bookChargeKg, status } = circuit()
    const openLeaks = leaks.filter((leak) => leak.repairedOn === null)
    const kind = status === 'retired' ? 'recovery' : 'charge'
    return {
      id: uuid(), kind, cylinder: null, unit: massUnit.value, how: 'readings', before: null, after: null, amount: null,
      isComplete: false, isWhole: Number(bookChargeKg) > 0, purpose: PURPOSES_OF[kind][0] ?? null,
      leakId: openLeaks.length === 1 ? openLeaks[0]?.id ?? null : null,
      part: null, workDone: null, note: null, occurredOn: localDateOf(at, siteTimeZone), time: localTimeOf(at, siteTimeZone), visitId: null, newVisitId: uuid(),
    }
  }

  function check(values: WeighInEntry): FieldProblem[] {
    const wrong: FieldProblem[] = []
    const named = (field: string, label: string, words: string) => wrong.push({ field, message: `${label}: ${words}` })
    if (values.kind !== 'loss' && !values.cylinder) wrong.push({ field: 'cylinderId', message: t('weighIn.cylinder.missing') })
    const reading = netOfEntry(values, circuit().bookChargeKg)
    if (!reading.ok) named(reading.field, t(`weighIn.scale.${reading.field}`), t(`units.fault.${reading.code}`))
    if (!values.occurredOn) named('occurredOn', t('weighIn.work.date'), t('weighIn.work.dateMissing'))
    if (!isClockTime(values.time)) named('time', t('weighIn.work.time'), t('weighIn.work.timeWrong'))
    return wrong
  }

  /** Looks at the entry as it stands. @returns whether it can be looked at once more and posted */
  function review(): boolean {
    form.problem.value = null
    form.fieldProblems.value = check(entry)
    return form.fieldProblems.value.length === 0 && refusal.value === null
  }

  async function submit(values: WeighInEntry): Promise<void> {
    const reading = netOfEntry(values, circuit().bookChargeKg)
    const built = reading.ok ? draftOf({ ...values, visitId: await visitOf(values) }, circuit(), reading.mass) : null
    if (!built) throw new Error('An entry that was not reviewed was sent.')
    posted.value = await ledger.post(built)
  }

  /** The visit of this person at this site on this day; begun with the first weigh-in. */
  async function visitOf({ visitId, newVisitId, occurredOn }: WeighInEntry): Promise<string | null> {
    if (visitId || !occurredOn) return visitId
    const { siteId } = circuit()
    // Kept with the entry: a repeat must carry the same visit, or it would be another posting.
    entry.visitId = (await visits.mine(siteId, occurredOn)) ?? (await visits.create({ id: newVisitId, siteId, visitedOn: occurredOn, remark: null })).id
    return entry.visitId
  }

  /** The next one, with an id of its own. */
  function beginAnew(): void {
    posted.value = null
    form.reset(blank())
  }

  watch(() => entry.kind, (kind) => {
    entry.purpose = PURPOSES_OF[kind][0] ?? null
    entry.isComplete = false
  })
  watch(() => entry.occurredOn, () => {
    entry.visitId = null
    entry.newVisitId = uuid()
  })
  watch(isOnline, (isBack) => {
    if (isBack && isUnsent.value) void form.send()
  })

  return { entry, form, today, net, outlook, refusal, cylinderRefusal, isUnsent, posted, review, beginAnew }
}
