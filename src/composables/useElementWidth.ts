import { onMounted, onScopeDispose, readonly, ref } from 'vue'
import type { Ref } from 'vue'

/** @returns [px] the width of an element's content box, kept up to date */
export function useElementWidth({ element, initial }: { element: Readonly<Ref<HTMLElement | null>>; initial: number }) {
  const width = ref(initial)
  const observer = new ResizeObserver(([entry]) => {
    if (entry) width.value = Math.floor(entry.contentRect.width)
  })
  onMounted(() => {
    if (!element.value) return
    width.value = Math.floor(element.value.clientWidth) || initial
    observer.observe(element.value)
  })
  onScopeDispose(() => observer.disconnect())
  return { width: readonly(width) }
}
