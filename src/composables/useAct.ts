import { ref, shallowRef } from 'vue'
import { toProblem } from '../api/problem'
import type { Problem } from '../api/problem'

/** One act at a time, such as a button's; what it throws becomes the problem beside it. */
export function useAct() {
  const isBusy = ref(false)
  const problem = shallowRef<Problem | null>(null)
  /** @returns whether it went through */
  async function run(work: () => Promise<unknown>): Promise<boolean> {
    if (isBusy.value) return false
    isBusy.value = true
    problem.value = null
    try {
      await work()
      return true
    } catch (thrown) {
      problem.value = toProblem(thrown)
      return false
    } finally {
      isBusy.value = false
    }
  }
  return { isBusy, problem, run }
}
