import { computed, shallowRef, watch } from 'vue'
import type { Ref } from 'vue'
import { useI18n } from 'vue-i18n'
import type { FieldProblem } from '../../shared/api/problem'
import { isRefusedWith } from '../api/problem'
import type { Problem } from '../api/problem'

interface FormToWatch<Values> {
  values: Values
  problem: Ref<Problem | null>
  fieldProblems: Ref<readonly FieldProblem[]>
  isDraftRestored: Ref<boolean>
}

/**
 * A record that somebody else may change while it is edited here. Refused as overtaken, it is read again: what
 * now stands is shown beside the entry, and the next save knows it and may replace it.
 */
export function useOvertaken<Row extends { id: string; version: number }>(row: Row | null, get: (id: string) => Promise<Row>) {
  const { t } = useI18n()
  const read = shallowRef<Row | null>(row)
  const isOvertaken = computed(() => read.value !== row)
  /** The version that is sent along. */
  const version = (): number => read.value?.version ?? 0

  function heed(form: FormToWatch<unknown>): void {
    watch(form.problem, async (problem) => {
      if (!row || !isRefusedWith(problem, 'changed-meanwhile')) return
      try {
        read.value = await get(row.id)
      } catch {
        // The refusal stands in the form; the next save is refused again until it can be read.
      }
    })
  }

  /** What now stands in a field, where it is not what is entered; the hint of the field otherwise. */
  function beside<Field extends keyof Row>(form: FormToWatch<{ [Key in Field]?: unknown }>, field: Field, hint?: string, words: (value: Row[Field]) => string = plainly): string | undefined {
    if (!read.value || (!isOvertaken.value && !form.isDraftRestored.value)) return hint
    const now = read.value[field]
    return JSON.stringify(now) === JSON.stringify(form.values[field]) ? hint : t('common.form.standsNow', { value: words(now) })
  }
  const plainly = (value: unknown): string => (value === null || value === undefined || value === '' ? t('common.none') : String(value))

  return { isOvertaken, version, heed, beside }
}
