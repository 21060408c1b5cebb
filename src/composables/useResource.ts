import { computed, onScopeDispose, shallowRef, toValue, watch } from 'vue'
import type { MaybeRefOrGetter, ShallowRef } from 'vue'
import { isCalledOff, toProblem } from '../api/problem'
import type { Problem } from '../api/problem'

interface ResourceOptions<Value, Key> {
  /** What decides which thing it is, such as the id in the address; a change loads anew. */
  key: MaybeRefOrGetter<Key>
  fetch: (key: Key) => Promise<Value>
}

/** One thing from the server with its states: loading, there, problem. An older answer never overwrites a newer one. */
export function useResource<Value, Key = null>({ key, fetch }: ResourceOptions<Value, Key>) {
  const value: ShallowRef<Value | null> = shallowRef(null)
  const problem = shallowRef<Problem | null>(null)
  const isLoading = shallowRef(false)
  let turn = 0

  async function reload(): Promise<void> {
    const mine = ++turn
    isLoading.value = true
    problem.value = null
    try {
      const answer = await fetch(toValue(key))
      if (mine === turn) value.value = answer
    } catch (thrown) {
      if (mine === turn && !isCalledOff(thrown)) problem.value = toProblem(thrown)
    } finally {
      if (mine === turn) isLoading.value = false
    }
  }

  watch(
    () => toValue(key),
    () => {
      value.value = null
      void reload()
    },
    { immediate: true },
  )
  onScopeDispose(() => turn++)

  const state = computed(() => {
    if (value.value !== null) return 'there' as const
    return problem.value ? ('problem' as const) : ('loading' as const)
  })
  return { value, problem, isLoading, state, reload }
}
