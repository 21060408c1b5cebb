import type { MessageCompiler, MessageContext } from '@intlify/core-base'

type Part = string | { name: string }

/**
 * Reads the messages of shared/language: {name}, {'literal'} and forms parted by "|". The general compiler,
 * which the server uses, reads them alike but would weigh on the first screen.
 */
export const compileMessage: MessageCompiler<string> = (message) => {
  if (typeof message !== 'string') throw new TypeError('A message of the language file is a text.')
  const forms = readForms(message)
  return (context: MessageContext<string>): string => {
    const said = forms.map((parts) => parts.map((part) => (typeof part === 'string' ? part : String(context.named(part.name) ?? ''))).join(''))
    return said.length === 1 ? (said[0] ?? '') : context.plural(said)
  }
}

function readForms(message: string): Part[][] {
  const forms: Part[][] = [[]]
  for (const [token] of message.matchAll(/\{'[^']*'\}|\{\s*\w+\s*\}|\s*\|\s*|[^{|\s]+|\s+(?!\s*\|)|[{|]/g)) {
    if (/^\s*\|\s*$/.test(token)) forms.push([])
    else forms.at(-1)?.push(readPart(token))
  }
  return forms
}

function readPart(token: string): Part {
  const literal = /^\{'([^']*)'\}$/.exec(token)
  if (literal) return literal[1] ?? ''
  const name = /^\{\s*(\w+)\s*\}$/.exec(token)
  return name ? { name: name[1] ?? '' } : token
}
