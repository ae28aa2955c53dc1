import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  isPreferred,
  nearestPreferred,
  nextPreferred,
  preferredValues,
  type Series,
  tolerance,
} from '../../../src/core/quantity/preferred'

// The tables of IEC 60063, "Preferred number series for resistors and capacitors", written out
// from memory; none of them is computed.
const tables: Readonly<Record<Series, string>> = {
  E6: '10 15 22 33 47 68',
  E12: '10 12 15 18 22 27 33 39 47 56 68 82',
  E24: '10 11 12 13 15 16 18 20 22 24 27 30 33 36 39 43 47 51 56 62 68 75 82 91',
  E48:
    '100 105 110 115 121 127 133 140 147 154 162 169 178 187 196 205 215 226 237 249 261 274 287 ' +
    '301 316 332 348 365 383 402 422 442 464 487 511 536 562 590 619 649 681 715 750 787 825 866 ' +
    '909 953',
  E96:
    '100 102 105 107 110 113 115 118 121 124 127 130 133 137 140 143 147 150 154 158 162 165 169 ' +
    '174 178 182 187 191 196 200 205 210 215 221 226 232 237 243 249 255 261 267 274 280 287 294 ' +
    '301 309 316 324 332 340 348 357 365 374 383 392 402 412 422 432 442 453 464 475 487 499 511 ' +
    '523 536 549 562 576 590 604 619 634 649 665 681 698 715 732 750 768 787 806 825 845 866 887 ' +
    '909 931 953 976',
  E192:
    '100 101 102 104 105 106 107 109 110 111 113 114 115 117 118 120 121 123 124 126 127 129 130 ' +
    '132 133 135 137 138 140 142 143 145 147 149 150 152 154 156 158 160 162 164 165 167 169 172 ' +
    '174 176 178 180 182 184 187 189 191 193 196 198 200 203 205 208 210 213 215 218 221 223 226 ' +
    '229 232 234 237 240 243 246 249 252 255 258 261 264 267 271 274 277 280 284 287 291 294 298 ' +
    '301 305 309 312 316 320 324 328 332 336 340 344 348 352 357 361 365 370 374 379 383 388 392 ' +
    '397 402 407 412 417 422 427 432 437 442 448 453 459 464 470 475 481 487 493 499 505 511 517 ' +
    '523 530 536 542 549 556 562 569 576 583 590 597 604 612 619 626 634 642 649 657 665 673 681 ' +
    '690 698 706 715 723 732 741 750 759 768 777 787 796 806 816 825 835 845 856 866 876 887 898 ' +
    '909 920 931 942 953 965 976 988',
}

const series = Object.keys(tables) as Series[]
const anySeries = fc.constantFrom(...series)
const anyValue = fc.double({ min: -14, max: 14, noNaN: true }).map((power) => 10 ** power)

function tableOf(name: Series): readonly string[] {
  return tables[name].split(' ')
}

/** Every value of a series over 24 decades, read from the written-out digits. */
function ladder(name: Series): readonly number[] {
  const figures = tableOf(name)[0]?.length ?? 0
  return Array.from({ length: 34 }, (_, i) => i - 17).flatMap((decade) =>
    tableOf(name).map((digits) => Number(`${digits}e${decade - figures + 1}`)),
  )
}

describe('preferred values', () => {
  it.each(series)('of %s are those of IEC 60063', (name) => {
    const digits = tableOf(name)
    expect(digits).toHaveLength(Number(name.slice(1)))
    expect(preferredValues(name)).toEqual(
      digits.map((text) => Number(`${text.charAt(0)}.${text.slice(1)}`)),
    )
  })

  it('come with the tolerance of their series', () => {
    expect(series.map(tolerance)).toEqual([0.2, 0.1, 0.05, 0.02, 0.01, 0.005])
  })

  it('are the literals a person would write', () => {
    expect(nearestPreferred(4.5e-7, 'E12')).toBe(4.7e-7)
    expect(nextPreferred(5e-7, 'E12', 'down')).toBe(4.7e-7)
    expect(nextPreferred(8.2e-9, 'E12', 'up')).toBe(1e-8)
    expect(nextPreferred(1e6, 'E24', 'down')).toBe(910000)
    expect(nextPreferred(9.76e5, 'E96', 'up')).toBe(1e6)
    expect(nextPreferred(9.9, 'E12', 'up')).toBe(10)
  })

  it('are nearest by ratio, not by difference', () => {
    // Between 10 and 15 the geometric middle is 12.247, the arithmetic one 12.5.
    expect(nearestPreferred(12.2, 'E6')).toBe(10)
    expect(nearestPreferred(12.3, 'E6')).toBe(15)
    expect(nearestPreferred(8.3, 'E6')).toBe(10)
  })

  it('take a product that misses by rounding for the value itself', () => {
    const missed = 4.7 * 1e-7 * (1 - 2e-16)
    expect(missed).not.toBe(4.7e-7)
    expect(isPreferred(missed, 'E6')).toBe(true)
    expect(nextPreferred(missed, 'E6', 'up')).toBe(6.8e-7)
    expect(nextPreferred(missed, 'E6', 'down')).toBe(3.3e-7)
    expect(isPreferred(4.701e-7, 'E6')).toBe(false)
  })

  it('are none for what is not positive and finite', () => {
    for (const value of [0, -1, Number.NaN, Number.POSITIVE_INFINITY]) {
      expect(nearestPreferred(value, 'E12')).toBeNull()
      expect(nextPreferred(value, 'E12', 'up')).toBeNull()
      expect(nextPreferred(value, 'E12', 'down')).toBeNull()
      expect(isPreferred(value, 'E12')).toBe(false)
    }
    expect(nextPreferred(Number.MAX_VALUE, 'E12', 'up')).toBeNull()
    expect(nextPreferred(Number.MIN_VALUE, 'E12', 'down')).toBeNull()
  })

  it('agree with a search through the written-out tables', () => {
    const ladders = new Map(series.map((name) => [name, ladder(name)]))
    fc.assert(
      fc.property(anySeries, anyValue, (name, value) => {
        const all = ladders.get(name) ?? []
        expect(nextPreferred(value, name, 'up')).toBe(all.find((one) => one > value * (1 + 1e-9)))
        expect(nextPreferred(value, name, 'down')).toBe(
          all.findLast((one) => one < value / (1 + 1e-9)),
        )
        const nearest = nearestPreferred(value, name) ?? Number.NaN
        const miss = (one: number) => Math.abs(Math.log(one / value))
        expect(miss(nearest)).toBeCloseTo(Math.min(...all.map(miss)), 12)
        expect(all).toContain(nearest)
      }),
      { seed: 31, numRuns: 1000 },
    )
  })

  it('step up and back down to where they started', () => {
    fc.assert(
      fc.property(anySeries, anyValue, (name, value) => {
        const start = nearestPreferred(value, name) ?? Number.NaN
        expect(isPreferred(start, name)).toBe(true)
        const up = nextPreferred(start, name, 'up') ?? Number.NaN
        expect(up).toBeGreaterThan(start)
        expect(nextPreferred(up, name, 'down')).toBe(start)
      }),
      { seed: 32, numRuns: 1000 },
    )
  })
})
