import { computed } from 'vue'
import { useI18n } from 'vue-i18n'
import type { FieldProblem } from '../../shared/api/problem'
import { fieldProblemsOf } from '../api/problem'
import type { Problem } from '../api/problem'

/** A problem as components take it. */
export type ProblemToShow = Problem

interface ProblemWordsOptions {
  problem: () => Problem | null
  /** The wrong fields found on this side, where nothing was sent yet. */
  fields: () => readonly FieldProblem[]
}

/** A problem in words: what is wrong, what to do next, which fields, and the id to quote. */
export function useProblemWords({ problem, fields }: ProblemWordsOptions) {
  const { t } = useI18n()

  const wrong = computed(() => (fields().length > 0 ? fields() : fieldProblemsOf(problem())))
  const words = computed<{ title: string; text: string | null } | null>(() => {
    const now = problem()
    switch (now?.kind) {
      case 'offline': return { title: t('common.problem.offlineTitle'), text: t('common.problem.offlineText') }
      case 'signed-out': return { title: t('common.problem.signedOutTitle'), text: t('common.problem.signedOutText') }
      case 'ours': return { title: t('common.problem.oursTitle'), text: t('common.problem.oursText') }
      case 'refused': return { title: now.body.title, text: now.body.detail === now.body.title ? null : now.body.detail }
      default: return wrong.value.length > 0 ? { title: t('common.form.wrongFields', wrong.value.length), text: null } : null
    }
  })
  const id = computed(() => {
    const now = problem()
    const instance = now?.kind === 'ours' ? now.id : now?.kind === 'refused' ? now.body.instance : null
    return instance?.split('/').at(-1) || null
  })
  return { wrong, words, id }
}
