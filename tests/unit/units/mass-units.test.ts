import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { MASS_UNITS, type MassUnit } from '../../../shared/api/ledger'
import { equalMass, kg, lb, oz, plus, toKgText } from '../../../shared/mass/mass'
import { FINEST_DIGITS, massIn, massText, netOf, parseMass, varianceFromScale } from '../../../shared/units/mass-units'

const parsed = (text: string, unit: MassUnit) => {
  const reading = parseMass(text, unit)
  return reading.ok ? toKgText(reading.mass) : reading.code
}

describe('what a person types, kilograms worked by hand from 1 lb = 0.45359237 kg', () => {
  it.each<[string, MassUnit, string]>([
    ['10', 'lb', '4.5359237'],
    ['12.5', 'lb', '5.669904625'],
    ['12,5', 'lb', '5.669904625'],
    [' 12.50 lb ', 'lb', '5.669904625'],
    ['12.5 lbs', 'lb', '5.669904625'],
    ['.5', 'lb', '0.226796185'],
    ['0.0001', 'lb', '0.000045359237'],
    ['012', 'lb', '5.44310844'],
    ['16', 'oz', '0.45359237'],
    ['0.01 oz', 'oz', '0.00028349523125'],
    ['12-4.5', 'lb-oz', '5.5706812940625'], // 12.28125 lb
    ['1,5', 'kg', '1.5'],
    ['1,250', 'kg', '1.25'],
    ['2.5 kg', 'kg', '2.5'],
    ['250', 'g', '0.25'],
    ['0.001 g', 'g', '0.000001'],
    ['0', 'lb', '0'],
  ])('"%s" in %s is %s kg', (text, unit, expected) => {
    expect(parsed(text, unit)).toBe(expected)
  })
  it.each(['12-4.5', '12 - 4.5', '12 4.5', '12 lb 4.5 oz', '12lb4.5oz', '12 lbs. 4,5 oz.', '12lb 4.50', '12-04.5'])('"%s" is 12 pounds and 4.5 ounces', (text) => {
    expect(parsed(text, 'lb-oz')).toBe(toKgText(plus(lb('12'), oz('4.5'))))
  })
  it('either part may stand alone', () => {
    expect([parsed('12', 'lb-oz'), parsed('12 lb', 'lb-oz'), parsed('4.5 oz', 'lb-oz')]).toEqual(['5.44310844', '5.44310844', toKgText(oz('4.5'))])
  })
  it.each<[string, MassUnit, string]>([
    ['', 'lb', 'not-a-number'], ['ten', 'lb', 'not-a-number'], ['1.2.3', 'lb', 'not-a-number'], ['1,250.5', 'lb', 'not-a-number'],
    ['1e3', 'lb', 'not-a-number'], ['.', 'lb', 'not-a-number'], ['5 kg', 'lb', 'not-a-number'], ['NaN', 'kg', 'not-a-number'],
    ['1,250', 'lb', 'comma-unclear'], ['12,250', 'oz', 'comma-unclear'],
    ['-1', 'lb', 'negative'], ['\u22121', 'kg', 'negative'], ['-12-4', 'lb-oz', 'negative'],
    ['0.00001', 'lb', 'too-fine'], ['0.001', 'oz', 'too-fine'], ['12-4.555', 'lb-oz', 'too-fine'], ['0.0000001', 'kg', 'too-fine'], ['0.0001', 'g', 'too-fine'],
    ['1000000.1', 'kg', 'too-large'], ['99999999999999999999', 'lb', 'too-large'], ['3000000', 'lb', 'too-large'],
    ['12-16', 'lb-oz', 'ounces-over-16'], ['20 oz', 'lb-oz', 'ounces-over-16'],
    ['12.5', 'lb-oz', 'not-a-number'], ['4-12-5', 'lb-oz', 'not-a-number'], ['12 lb lb', 'lb-oz', 'not-a-number'],
  ])('"%s" in %s: %s', (text, unit, code) => {
    expect(parsed(text, unit)).toBe(code)
  })
  it('fifteen and ninety-nine hundredths ounces are not sixteen', () => {
    expect(parsed('0-15.99', 'lb-oz')).toBe(toKgText(oz('15.99')))
  })
})

describe('a mass to read, worked by hand', () => {
  it.each<[string, MassUnit, number, object]>([
    ['12.28125', 'lb', 2, { unit: 'lb', value: '12.28' }],
    ['12.28125', 'lb-oz', 1, { unit: 'lb-oz', isNegative: false, pounds: '12', ounces: '4.5' }],
    ['0.999', 'lb-oz', 1, { unit: 'lb-oz', isNegative: false, pounds: '1', ounces: '0.0' }], // 15.984 oz
    ['-0.5', 'lb-oz', 1, { unit: 'lb-oz', isNegative: true, pounds: '0', ounces: '8.0' }],
    ['-0.001', 'lb-oz', 1, { unit: 'lb-oz', isNegative: false, pounds: '0', ounces: '0.0' }],
    ['-0.001', 'lb', 2, { unit: 'lb', value: '0.00' }],
    ['-0.5', 'lb', 2, { unit: 'lb', value: '-0.50' }],
    ['1', 'oz', 1, { unit: 'oz', value: '16.0' }],
    ['10', 'kg', 2, { unit: 'kg', value: '4.54' }],
    ['1', 'g', 1, { unit: 'g', value: '453.6' }],
    ['0.125', 'lb', 2, { unit: 'lb', value: '0.12' }], // half to even
  ])('%s lb in %s with %i digits', (pounds, unit, digits, expected) => {
    expect(massIn(lb(pounds), unit, digits)).toEqual(expected)
  })
  it('as text for an input', () => {
    expect(MASS_UNITS.map((unit) => massText(lb('12.28125'), unit))).toEqual(['12.2812', '12-4.5', '196.5', '5.570681', '5570.681'])
    expect(massText(lb('-12.28125'), 'lb-oz', 1)).toBe('-12-4.5')
  })
})

describe('reading and writing', () => {
  const someText = fc.record({ unit: fc.constantFrom(...MASS_UNITS), whole: fc.nat(99_999), fraction: fc.nat(9999), ounces: fc.nat(1599) })
  it('what was typed comes back exactly', () => {
    fc.assert(fc.property(someText, fc.constantFrom('.', ','), ({ unit, whole, fraction, ounces }, point) => {
      const digits = Math.min(4, FINEST_DIGITS[unit])
      const typed = unit === 'lb-oz' ? `${whole}-${ounces / 100}` : `${whole}.${String(fraction).padStart(4, '0').slice(0, digits)}`
      fc.pre(point === '.' || !/^[1-9]\d{0,2}\.\d{3}$/.test(typed))
      const reading = parseMass(typed.replace('.', point), unit)
      const mass = reading.ok ? reading.mass : expect.fail(reading.code)
      const again = parseMass(massText(mass, unit), unit)
      expect(again.ok && equalMass(again.mass, mass)).toBe(true)
    }))
  })
  it('a reading in any unit fits what storage keeps', () => {
    fc.assert(fc.property(someText, ({ unit, whole, fraction }) => {
      const reading = parseMass(unit === 'lb-oz' ? `${whole}-1.${fraction % 100}` : `${whole}.${fraction % 10 ** Math.min(4, FINEST_DIGITS[unit])}`, unit)
      expect(reading.ok && equalMass(kg(toKgText(reading.mass)), reading.mass)).toBe(true)
    }))
  })
})

describe('the net of a weighing', () => {
  const net = (before: string | null, after: string | null, direction: 'out' | 'in', amount: string | null = null) => {
    const reading = netOf({ unit: 'lb-oz', before, after, amount }, direction)
    return reading.ok ? massText(reading.mass, 'lb-oz') : `${reading.field} ${reading.code}`
  }
  it.each<[string | null, string | null, 'out' | 'in', string | null, string]>([
    ['32-8', '22-4.5', 'out', null, '10-3.5'],
    ['22-4.5', '32-8', 'in', null, '10-3.5'],
    [null, null, 'out', '10-3.5', '10-3.5'],
    ['32-8', '22-4.5', 'out', '9-0', '9-0'],
    ['22-4.5', '32-8', 'out', null, 'after net-not-positive'],
    ['32-8', '32-8', 'out', null, 'after net-not-positive'],
    ['32-16', '22-4.5', 'out', null, 'before ounces-over-16'],
    ['32-8', '-2', 'out', null, 'after negative'],
    ['32-8', null, 'out', null, 'after missing'],
    [null, '32-8', 'out', null, 'before missing'],
    [null, ' ', 'out', null, 'amount missing'],
    [null, null, 'out', '0', 'amount missing'],
    [null, null, 'out', 'x', 'amount not-a-number'],
  ])('before %s, after %s, %s, amount %s: %s', (before, after, direction, amount, expected) => {
    expect(net(before, after, direction, amount)).toBe(expected)
  })
  it('the variance of a scale is what it shows beyond tare and book', () => {
    expect(equalMass(varianceFromScale({ grossKg: lb('31.5'), tareKg: lb('17'), bookKg: lb('15') }), lb('-0.5'))).toBe(true)
  })
})
