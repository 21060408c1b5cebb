import { onScopeDispose, readonly, ref } from 'vue'

/** Whether the device has a line, and since when it has none. */
export function useOnline() {
  const isOnline = ref(navigator.onLine)
  const offlineSince = ref<Date | null>(navigator.onLine ? null : new Date())

  const goOnline = () => {
    isOnline.value = true
    offlineSince.value = null
  }
  const goOffline = () => {
    isOnline.value = false
    offlineSince.value ??= new Date()
  }
  window.addEventListener('online', goOnline)
  window.addEventListener('offline', goOffline)
  onScopeDispose(() => {
    window.removeEventListener('online', goOnline)
    window.removeEventListener('offline', goOffline)
  })
  return { isOnline: readonly(isOnline), offlineSince: readonly(offlineSince) }
}
