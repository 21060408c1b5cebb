import { createPinia } from 'pinia'
import { createApp } from 'vue'
import App from './App.vue'
import { applyStoredTheme } from './composables/useTheme'
import { DEFAULT_LOCALE, completeLanguage, i18n, showLanguage } from './language'
import { installWorker } from './offline/worker'
import { router } from './router/router'
import './theme/fonts.css'
import './theme/tokens.css'
import './theme/base.css'

applyStoredTheme()
await showLanguage(DEFAULT_LOCALE)

const app = createApp(App).use(createPinia()).use(i18n)

// PrimeVue and the other words come with the first page behind the sign-in, which they would only delay.
let isHouseFurnished = false
router.beforeResolve(async (to) => {
  if (to.meta.isOpen || isHouseFurnished) return
  const [{ installPrimeVue }] = await Promise.all([import('./theme/install-primevue'), completeLanguage()])
  if (!isHouseFurnished) installPrimeVue(app)
  isHouseFurnished = true
})

app.use(router).mount('#app')
installWorker()
