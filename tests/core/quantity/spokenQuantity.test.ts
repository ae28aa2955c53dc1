import { describe, expect, it } from 'vitest'
import { spokenQuantity } from '../../../src/core/quantity/spokenQuantity'
import type { Unit } from '../../../src/core/quantity/units'

describe('spokenQuantity', () => {
  it.each<[number, Unit, string]>([
    [4.7e6, 'Ω', '4.7 megohms'],
    [1e6, 'Ω', '1 megohm'],
    [33e3, 'Ω', '33 kilohms'],
    [2e9, 'Ω', '2 gigaohms'],
    [4.7e-7, 'F', '470 nanofarads'],
    [1, 'V', '1 volt'],
    [-5, 'V', 'minus 5 volts'],
    [0.0006, 'A', '600 microamps'],
    [2600, 'Hz', '2.6 kilohertz'],
    [0.55, 'Ah', '550 milliamp-hours'],
    [5, '%', '5 percent'],
    [1.5, '', '1.5'],
    [200, 's', '3 minutes 20 seconds'],
    [3660, 's', '61 minutes'],
    [121, 's', '2 minutes 1 second'],
    [31557600 * 2.5, 's', '2.5 years'],
    [1e-30, 'F', '1 times ten to the minus 15 femtofarads'],
    [Number.POSITIVE_INFINITY, 'Ω', 'infinite'],
    [Number.NEGATIVE_INFINITY, 'V', 'minus infinite'],
    [Number.NaN, 'V', 'no value'],
  ])('says %d %s as "%s"', (value, unit, said) => {
    expect(spokenQuantity(value, unit)).toBe(said)
  })
})
