import { describe, expect, it } from 'vitest'
import { expectedAbsoluteKpa, judgeStandingTest } from '../../../shared/field/standing-test'

describe('a standing pressure test, worked by hand in kelvins and kilopascals absolute', () => {
  const start = { absoluteKpa: 3000, celsius: 26.85 } // 300 K
  it.each([
    [26.85, 3000], // no change
    [16.85, 2900], // 3000 × 290 / 300
    [36.85, 3100], // 3000 × 310 / 300
  ])('3,000 kPa at 26.85 °C is at %d °C %d kPa', (celsius, kPa) => {
    expect(expectedAbsoluteKpa(start, celsius)).toBeCloseTo(kPa, 6)
  })
  it.each([
    [2890.001, 'holds'], [2889.9, 'falls'], [2909.999, 'holds'], [2910.1, 'rises'],
  ])('%d kPa at 16.85 °C on a gauge of 10 kPa %s: the resolution itself still holds', (absoluteKpa, verdict) => {
    expect(judgeStandingTest(start, { absoluteKpa, celsius: 16.85 }, 10).verdict).toBe(verdict)
  })
  it('says how much is missing beyond the temperature', () => {
    const { expectedKpa, differenceKpa } = judgeStandingTest(start, { absoluteKpa: 2850, celsius: 16.85 }, 10)
    expect(expectedKpa).toBeCloseTo(2900, 6)
    expect(differenceKpa).toBeCloseTo(-50, 6)
  })
  it('knows no temperature below absolute zero', () => {
    expect(() => expectedAbsoluteKpa(start, -300)).toThrow(RangeError)
  })
})
