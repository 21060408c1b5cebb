import { onScopeDispose, readonly, ref, toValue, watch } from 'vue'
import type { MaybeRefOrGetter } from 'vue'

/** True once the source has been true for so long; false at once. So a quick answer shows no flicker. */
export function useDelayed({ source, afterMs = 150 }: { source: MaybeRefOrGetter<boolean>; afterMs?: number }) {
  const isOn = ref(false)
  let timer: ReturnType<typeof setTimeout> | undefined

  watch(
    () => toValue(source),
    (now) => {
      clearTimeout(timer)
      if (!now) isOn.value = false
      else timer = setTimeout(() => (isOn.value = true), afterMs)
    },
    { immediate: true },
  )
  onScopeDispose(() => clearTimeout(timer))
  return readonly(isOn)
}
