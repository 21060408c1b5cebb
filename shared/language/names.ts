/** Languages by their BCP 47 tag, each in its own words. */
export const LANGUAGE_NAMES: Record<string, string> = { en: 'English' }
