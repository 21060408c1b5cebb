import { computed, onScopeDispose, reactive, ref, shallowRef, toRaw, watch } from 'vue'
import type { FieldProblem } from '../../shared/api/problem'
import { fieldProblemsOf, toProblem } from '../api/problem'
import type { Problem } from '../api/problem'
import { useSessionStore } from '../stores/session'

interface FormOptions<Values extends object> {
  /** Names the draft on this device, such as "site.new" or "site.<id>"; null keeps none (passwords). */
  draft: string | null
  /** The values to begin with. */
  initial: () => Values
  /** What is wrong before it is sent; the server looks again. */
  check?: (values: Values) => FieldProblem[]
  /** Sends it. What it throws becomes the problem of the form. */
  submit: (values: Values) => Promise<void>
}

const KEEP_AFTER_MS = 250

/** A form that keeps what was typed: on the device until it is sent, in the fields when it is refused. */
export function useForm<Values extends object>({ draft, initial, check, submit }: FormOptions<Values>) {
  const session = useSessionStore()
  const storedAs = draft === null ? null : `weighback.draft.${session.me?.id ?? 'nobody'}.${draft}`
  const kept = storedAs === null ? null : readDraft(storedAs, initial())
  const values = reactive(kept ?? initial()) as Values
  const start = shallowRef(JSON.stringify(initial()))
  const isDraftRestored = ref(kept !== null)
  const isBusy = ref(false)
  const problem = shallowRef<Problem | null>(null)
  const fieldProblems = shallowRef<FieldProblem[]>([])
  const isDirty = computed(() => JSON.stringify(values) !== start.value)
  let timer: ReturnType<typeof setTimeout> | undefined

  const keepDraft = () => {
    clearTimeout(timer)
    if (storedAs === null) return
    if (isDirty.value) localStorage.setItem(storedAs, JSON.stringify(values))
    else localStorage.removeItem(storedAs)
  }
  const dropDraft = () => {
    clearTimeout(timer)
    if (storedAs !== null) localStorage.removeItem(storedAs)
  }

  watch(values, () => {
    clearTimeout(timer)
    timer = setTimeout(keepDraft, KEEP_AFTER_MS)
  })
  window.addEventListener('pagehide', keepDraft)
  onScopeDispose(() => {
    window.removeEventListener('pagehide', keepDraft)
    if (timer !== undefined) keepDraft()
  })

  // What was found wrong here and has been mended needs a look no more.
  const stillWrong = computed(() => (problem.value || fieldProblems.value.length === 0 ? null : check?.(values).map(({ field }) => field) ?? null))
  watch(stillWrong, (wrong) => {
    if (!wrong) return
    const left = fieldProblems.value.filter(({ field }) => wrong.includes(field))
    if (left.length < fieldProblems.value.length) fieldProblems.value = left
  })

  /** Back to other values, such as the row that has just been read again. */
  function reset(to: Values = initial()): void {
    Object.assign(values, to)
    start.value = JSON.stringify(to)
    isDraftRestored.value = false
    problem.value = null
    fieldProblems.value = []
    dropDraft()
  }

  /** @returns whether it was sent and taken */
  async function send(): Promise<boolean> {
    if (isBusy.value) return false
    problem.value = null
    fieldProblems.value = check?.(values) ?? []
    if (fieldProblems.value.length > 0) return false
    isBusy.value = true
    try {
      await submit(structuredClone(toRaw(values)))
      start.value = JSON.stringify(values)
      isDraftRestored.value = false
      dropDraft()
      timer = undefined
      return true
    } catch (thrown) {
      problem.value = toProblem(thrown)
      fieldProblems.value = fieldProblemsOf(problem.value)
      return false
    } finally {
      isBusy.value = false
    }
  }

  const errorOf = (field: string): string | undefined => fieldProblems.value.find((wrong) => wrong.field === field)?.message

  return { values, isDirty, isBusy, isDraftRestored, problem, fieldProblems, errorOf, reset, send }
}

function readDraft<Values extends object>(storedAs: string, initial: Values): Values | null {
  const text = localStorage.getItem(storedAs)
  if (text === null) return null
  try {
    const draft: unknown = JSON.parse(text)
    if (typeof draft !== 'object' || draft === null) return null
    // A draft of yesterday's form may lack a field or have one too many.
    const known = Object.entries(draft).filter(([field]) => field in initial)
    return { ...initial, ...Object.fromEntries(known) }
  } catch {
    return null
  }
}
