import PrimeVue from 'primevue/config'
import type { App } from 'vue'
import { weighbackPreset } from './preset'

/** Sets PrimeVue up for the pages behind the sign-in; the pages before it do without. */
export function installPrimeVue(app: App): void {
  app.use(PrimeVue, {
    theme: {
      preset: weighbackPreset,
      options: { prefix: 'p', darkModeSelector: '[data-theme="dark"]', cssLayer: { name: 'primevue', order: 'base, primevue, house' } },
    },
    // The server names a fresh nonce in the page: styles are taken from us and from nobody else.
    csp: { nonce: cspNonce() },
  })
}

function cspNonce(): string | undefined {
  return document.querySelector<HTMLMetaElement>('meta[property="csp-nonce"]')?.nonce || undefined
}
