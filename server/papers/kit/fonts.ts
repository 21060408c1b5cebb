import { readFileSync } from 'node:fs'
import { createRequire } from 'node:module'
import type { Weight } from './look'

// Whole font files: those made for web pages are cut into subsets, and the Latin one has no ≥ and no ₂.
const FILES: Record<Weight, string> = {
  regular: '@expo-google-fonts/inter/400Regular/Inter_400Regular.ttf',
  semibold: '@expo-google-fonts/inter/600SemiBold/Inter_600SemiBold.ttf',
}

const resolver = createRequire(import.meta.url)
const read = new Map<Weight, Buffer>()

/** The font file of a weight, read once per process. */
export function fontFile(weight: Weight): Buffer {
  const known = read.get(weight)
  if (known) return known
  const file = readFileSync(resolver.resolve(FILES[weight]))
  read.set(weight, file)
  return file
}
