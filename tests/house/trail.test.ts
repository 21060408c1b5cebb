import { readdirSync, readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { en } from '../../shared/language/en'

/** What the services write into the trail: `action` and `subject` stand as plain words in the note. */
const services = readdirSync('server/modules', { recursive: true, encoding: 'utf8' }).filter((file) => file.endsWith('.service.ts')).map((file) => `server/modules/${file}`)
const notes = services.flatMap((file) =>
  [...readFileSync(file, 'utf8').matchAll(/\{\s*action: ([^,]+), subject: ([^,]+),/g)].map(([, action, subject]) => ({ file, action: action ?? '', subject: subject ?? '' })))
const quoted = (code: string): string[] => [...code.matchAll(/'([a-z-]+)'/g)].map(([, word]) => word ?? '')

describe('every note in the trail', () => {
  it('has words for its action and its kind of record', () => {
    expect(notes.length).toBeGreaterThan(20)
    for (const { file, action, subject } of notes) {
      for (const word of quoted(action)) expect([file, Object.keys(en.trail.actions)]).toEqual([file, expect.arrayContaining([word])])
      for (const word of quoted(subject)) expect([file, Object.keys(en.trail.subjects)]).toEqual([file, expect.arrayContaining([word])])
    }
  })
})
