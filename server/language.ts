import { compile, createCoreContext, registerMessageCompiler, registerMessageResolver, resolveValue, translate } from '@intlify/core-base'
import { en } from '../shared/language/en'

// core-base alone looks up flat keys and leaves messages as they are: areas and {named} parts are added here
registerMessageResolver(resolveValue)
registerMessageCompiler(compile)

type LocaleMessages = { [key: string]: string | LocaleMessages }
const DEFAULT_LOCALE = 'en'
const languages: Record<string, LocaleMessages> = { en }
const context = createCoreContext({ locale: DEFAULT_LOCALE as string, fallbackLocale: DEFAULT_LOCALE, messages: languages, missingWarn: false, fallbackWarn: false })

/** The sentence of a key in a person's language; English where that language lacks it, the key where both do. */
export function say(locale: string, key: string, params: Record<string, unknown> = {}): string {
  const sentence = translate(context, key, params, { locale })
  return typeof sentence === 'string' ? sentence : key
}
