import { createPinia } from 'pinia'
import { createApp } from 'vue'
import App from './App.vue'
import { applyStoredTheme } from './composables/useTheme'
import { DEFAULT_LOCALE, i18n, showLanguage } from './language'
import { router } from './router/router'
import './theme/fonts.css'
import './theme/tokens.css'
import './theme/base.css'

applyStoredTheme()
await showLanguage(DEFAULT_LOCALE)

const app = createApp(App).use(createPinia()).use(i18n)

// PrimeVue comes with the first page behind the sign-in, which it would only delay.
let isPrimeVueThere = false
router.beforeResolve(async (to) => {
  if (to.meta.isOpen || isPrimeVueThere) return
  const { installPrimeVue } = await import('./theme/install-primevue')
  if (!isPrimeVueThere) installPrimeVue(app)
  isPrimeVueThere = true
})

app.use(router).mount('#app')
