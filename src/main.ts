import { createPinia } from 'pinia'
import PrimeVue from 'primevue/config'
import { createApp } from 'vue'
import App from './App.vue'
import { applyStoredTheme } from './composables/useTheme'
import { DEFAULT_LOCALE, i18n, showLanguage } from './language'
import { router } from './router/router'
import './theme/fonts.css'
import './theme/tokens.css'
import './theme/base.css'
import { weighbackPreset } from './theme/preset'

applyStoredTheme()
await showLanguage(DEFAULT_LOCALE)

createApp(App)
  .use(createPinia())
  .use(i18n)
  .use(router)
  .use(PrimeVue, {
    theme: { preset: weighbackPreset, options: { prefix: 'p', darkModeSelector: '[data-theme="dark"]', cssLayer: { name: 'primevue', order: 'base, primevue, house' } } },
    // The server names a fresh nonce in the page: styles are taken from us and from nobody else.
    csp: { nonce: cspNonce() },
  })
  .mount('#app')

function cspNonce(): string | undefined {
  return document.querySelector<HTMLMetaElement>('meta[property="csp-nonce"]')?.nonce || undefined
}
