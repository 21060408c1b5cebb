import { toValue, watchEffect } from 'vue'
import type { MaybeRefOrGetter } from 'vue'
import { useI18n } from 'vue-i18n'

/** Names the page in the browser's title, such as "Circuit 2 · Weighback"; null keeps the route's own title. */
export function useTitle(title: MaybeRefOrGetter<string | null | undefined>): void {
  const { t } = useI18n()
  watchEffect(() => {
    const text = toValue(title)
    if (text) document.title = `${text} · ${t('common.product')}`
  })
}
