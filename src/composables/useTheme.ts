import { onScopeDispose, readonly, ref, watchEffect } from 'vue'
import type { Theme } from '../../shared/api/people'

const STORED_AS = 'weighback.theme'

/** Sets the theme last used on this device, before anything is drawn. */
export function applyStoredTheme(): void {
  const stored = localStorage.getItem(STORED_AS)
  applyTheme(stored === 'light' || stored === 'dark' ? stored : 'system')
}

/** Keeps the page in the chosen theme, and in the device's while "system" is chosen. */
export function useTheme({ theme }: { theme: () => Theme }) {
  const isDark = ref(false)
  const dark = darkQuery()
  const apply = () => {
    isDark.value = applyTheme(theme())
  }
  watchEffect(() => {
    localStorage.setItem(STORED_AS, theme())
    apply()
  })
  dark.addEventListener('change', apply)
  onScopeDispose(() => dark.removeEventListener('change', apply))
  return { isDark: readonly(isDark) }
}

const darkQuery = (): MediaQueryList => window.matchMedia('(prefers-color-scheme: dark)')

function applyTheme(theme: Theme): boolean {
  const isDark = theme === 'dark' || (theme === 'system' && darkQuery().matches)
  document.documentElement.dataset.theme = isDark ? 'dark' : 'light'
  return isDark
}
