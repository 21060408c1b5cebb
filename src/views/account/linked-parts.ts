/** A letter's text in parts; an address of this installation becomes a path to open, others stay words. */
export function linkedParts(text: string): { text: string; path: string | null }[] {
  return text.split(/(https?:\/\/[^\s<>"]+)/).map((part) => ({ text: part, path: pathOf(part) }))
}

function pathOf(part: string): string | null {
  if (!/^https?:\/\//.test(part) || !URL.canParse(part)) return null
  const { pathname, search } = new URL(part)
  return /^\/(reset|invitation)\//.test(pathname) ? pathname + search : null
}
