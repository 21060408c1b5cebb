import { onScopeDispose, watch } from 'vue'
import type { Ref } from 'vue'

interface DismissOptions {
  element: Readonly<Ref<HTMLElement | null>>
  isOpen: Ref<boolean>
  /** Called when Escape closed it: give the focus back. */
  onDismiss?: () => void
}

/** Closes an opened panel by Escape, by a press outside, or when the focus goes elsewhere. */
export function useDismiss({ element, isOpen, onDismiss }: DismissOptions): void {
  const isOutside = (target: EventTarget | null) => target instanceof Node && !element.value?.contains(target)
  const onPress = (event: Event) => {
    if (isOutside(event.target)) isOpen.value = false
  }
  const onKey = (event: KeyboardEvent) => {
    if (event.key !== 'Escape') return
    isOpen.value = false
    onDismiss?.()
  }
  const stop = () => {
    document.removeEventListener('pointerdown', onPress)
    document.removeEventListener('focusin', onPress)
    document.removeEventListener('keydown', onKey)
  }
  watch(isOpen, (now) => {
    stop()
    if (!now) return
    document.addEventListener('pointerdown', onPress)
    document.addEventListener('focusin', onPress)
    document.addEventListener('keydown', onKey)
  })
  onScopeDispose(stop)
}
