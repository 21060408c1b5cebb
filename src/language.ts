import { createI18n } from 'vue-i18n'
import type { Language } from '../shared/language/en'
import { compileMessage } from './language-compiler'

/** One line per language: its file is fetched when it is wanted. */
const LANGUAGES: Record<string, () => Promise<Language>> = {
  en: async () => (await import('../shared/language/en')).en,
}
export const DEFAULT_LOCALE = 'en'
export const LOCALES = Object.keys(LANGUAGES)

export const i18n = createI18n({
  legacy: false,
  locale: DEFAULT_LOCALE,
  fallbackLocale: DEFAULT_LOCALE,
  messages: {},
  messageCompiler: compileMessage,
  missingWarn: import.meta.env.DEV,
  fallbackWarn: false,
})

const loaded = new Set<string>()

/** Fetches a language, English beside it for what it lacks, and shows it. An unknown one becomes English. */
export async function showLanguage(wanted: string): Promise<void> {
  const locale = LANGUAGES[wanted] ? wanted : DEFAULT_LOCALE
  await Promise.all([...new Set([DEFAULT_LOCALE, locale])].map(loadLanguage))
  i18n.global.locale.value = locale
  document.documentElement.lang = locale
}

async function loadLanguage(locale: string): Promise<void> {
  const load = LANGUAGES[locale]
  if (!load || loaded.has(locale)) return
  i18n.global.setLocaleMessage(locale, await load())
  loaded.add(locale)
}
