import { describe, expect, it } from 'vitest'
import { isNear } from '../../../shared/leak-rate/near'
import { percent } from '../../../shared/leak-rate/percent'

describe('near a threshold, our own figure of 70 % of it; worked by hand', () => {
  it.each([
    ['6.9999', '10', false],
    ['7', '10', true],
    ['20.9999', '30', false],
    ['21', '30', true],
  ])('%s %% against %s %%: %s', (rate, threshold, expected) => {
    expect(isNear(percent(rate), percent(threshold))).toBe(expected)
  })
})
