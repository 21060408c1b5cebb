import { createI18n } from 'vue-i18n'
import { compileMessage } from './language-compiler'

/** The words before the sign-in, and all others: the first screen does not wait for the whole language. */
type Part = 'first' | 'rest'

/** One line per language; vite.config.ts takes its file apart. */
const LANGUAGES: Record<string, Record<Part, () => Promise<{ words: object }>>> = {
  en: { first: () => import('../shared/language/en.ts?first'), rest: () => import('../shared/language/en.ts?rest') },
}
export const DEFAULT_LOCALE = 'en'

export const i18n = createI18n({
  legacy: false,
  locale: DEFAULT_LOCALE,
  fallbackLocale: DEFAULT_LOCALE,
  messages: {},
  messageCompiler: compileMessage,
  missingWarn: import.meta.env.DEV,
  fallbackWarn: false,
})

const wanted: Part[] = ['first']
const loaded = new Set<string>()

/** Fetches a language, English beside it for what it lacks, and shows it. An unknown one becomes English. */
export async function showLanguage(tag: string): Promise<void> {
  const locale = LANGUAGES[tag] ? tag : DEFAULT_LOCALE
  await loadLanguages(locale)
  i18n.global.locale.value = locale
  document.documentElement.lang = locale
}

/** Fetches the words of the pages behind the sign-in. */
export async function completeLanguage(): Promise<void> {
  if (!wanted.includes('rest')) wanted.push('rest')
  await loadLanguages(i18n.global.locale.value)
}

async function loadLanguages(locale: string): Promise<void> {
  await Promise.all([...new Set([DEFAULT_LOCALE, locale])].flatMap((each) => wanted.map((part) => loadPart(each, part))))
}

async function loadPart(locale: string, part: Part): Promise<void> {
  const language = LANGUAGES[locale]
  if (!language || loaded.has(`${locale} ${part}`)) return
  const { words } = await language[part]()
  i18n.global.mergeLocaleMessage(locale, words)
  loaded.add(`${locale} ${part}`)
}
