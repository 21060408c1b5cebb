import { dictionary } from '@zxcvbn-ts/language-common'

const REFUSED = 3000 // the commonest ones that are long enough to be chosen at all, OWASP ASVS 5
const LEAST_CHARACTERS = 8

/** The commonest passwords in small letters, by the ranking that ships with @zxcvbn-ts/language-common (MIT). */
export const COMMON_PASSWORDS: ReadonlySet<string> = new Set(
  dictionary.passwords.filter((word) => word.length >= LEAST_CHARACTERS).slice(0, REFUSED),
)
