import { describe, expect, it } from 'vitest'
import { judgeVacuumDecay } from '../../../shared/field/vacuum-decay'

const watch = (first: number, middle: number, last: number, minutes = 10) =>
  judgeVacuumDecay([{ minutes: 0, microns: first }, { minutes: minutes / 2, microns: middle }, { minutes, microns: last }])

describe('the limits of a vacuum decay test; common practice, no published source', () => {
  it.each([[499.9, 'passes'], [500, 'not-deep-enough'], [500.1, 'not-deep-enough']])('pulled to %d µm at the closing of the valve: %s', (first, verdict) => {
    expect(watch(first, 600, 620)).toBe(verdict)
  })
  it.each([[999.9, 'passes'], [1000, 'moisture'], [1000.1, 'moisture']])('levelling at %d µm after ten minutes: %s', (last, verdict) => {
    expect(watch(300, 900, last)).toBe(verdict)
  })
  it.each([[9.99, 'too-short'], [10, 'passes']])('watched for %d minutes: %s', (minutes, verdict) => {
    expect(watch(300, 400, 430, minutes)).toBe(verdict)
  })
  it('rises in the second half by half of the first: still levelling, which is our reading; a hair more: a leak', () => {
    expect(watch(300, 500, 600)).toBe('passes')
    expect(watch(300, 500, 600.1)).toBe('leak')
  })
  it('falling or standing still is tight', () => {
    expect(watch(300, 300, 300)).toBe('passes')
    expect(watch(300, 290, 280)).toBe('passes')
  })
  it('two readings do not show whether a curve levels', () => {
    expect(judgeVacuumDecay([{ minutes: 0, microns: 300 }, { minutes: 15, microns: 400 }])).toBe('too-short')
    expect(judgeVacuumDecay([])).toBe('too-short')
  })
  it('refuses what no gauge shows', () => {
    expect(() => watch(0, 400, 430)).toThrow(RangeError)
    expect(() => watch(Number.NaN, 400, 430)).toThrow(RangeError)
    expect(() => watch(300, 400, 430, 0)).toThrow(RangeError)
  })
})
