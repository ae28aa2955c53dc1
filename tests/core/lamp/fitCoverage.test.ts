import { describe, expect, it } from 'vitest'
import { currentsFromSweep } from '../../../src/core/lamp/currentsFromSweep'
import { fitCharacteristic } from '../../../src/core/lamp/fitCharacteristic'
import type { SweepSetup } from '../../../src/core/lamp/sweepSetup'
import { randomLamp, seeded, sweepOf } from './syntheticSweep'

const runs = 300

/** How many standard errors each knot is off, over many random lamps, each swept once with noise. */
function misses(setup: SweepSetup, sweep: { to: number; count: number }, last: number) {
  const off = new Map<string, number[]>()
  let asMany = 0
  for (let seed = 1; seed <= runs; seed++) {
    const random = seeded(seed)
    const lamp = randomLamp(random)
    const error = setup.readingError?.absolute ?? 0.05
    const got = currentsFromSweep(sweepOf(lamp, setup, { ...sweep, error }, random), setup)
    if (!got.ok) throw new Error(got.message)
    const fit = fitCharacteristic(got.points, { errors: got.errors, common: got.common })
    if (!fit.ok) throw new Error(`${fit.message} (seed ${seed})`)
    if (fit.knots.length !== last + 2) continue
    asMany++
    for (let knot = 1; knot <= last; knot++) {
      for (const key of ['current', 'voltage'] as const) {
        const miss = (fit.knots[knot]![key] - lamp[knot]![key]) / fit.sigma[knot]![key]
        const name = `${key} of knot ${knot}`
        off.set(name, [...(off.get(name) ?? []), Math.abs(miss)])
      }
    }
  }
  return { off, asMany }
}

const part = (values: readonly number[], within: number) =>
  values.filter((value) => value <= within).length / values.length

/*
 * A normal error lies within one standard error at 68 %, within two at 95 %; one that may lie anywhere in
 * a range, as at both ends of a bridge, at 58 % and 100 %. Over 300 runs the rates themselves vary by
 * 2.8 and 1.3 points: three of these are allowed, and two points of bias of the method at two.
 */
const rates = { oneLeast: 0.58 - 0.085, oneMost: 0.68 + 0.085, twoLeast: 0.95 - 0.06 }

describe('the knots of random lamps', () => {
  it.each<[string, SweepSetup, { to: number; count: number }, number]>([
    [
      'bridged, errors given',
      {
        seriesResistance: 100e3,
        meterResistance: 10e6,
        meterPlace: 'lamp',
        readingError: { absolute: 0.05, relative: 0 },
      },
      { to: 220, count: 300 },
      3,
    ],
    [
      'bridged, errors estimated',
      { seriesResistance: 47e3, meterResistance: 10e6, meterPlace: 'lamp' },
      { to: 150, count: 300 },
      3,
    ],
    [
      'with the falling region measured',
      {
        seriesResistance: 1e6,
        meterResistance: 10e6,
        meterPlace: 'resistor',
        readingError: { absolute: 0.05, relative: 0 },
      },
      { to: 300, count: 400 },
      2,
    ],
  ])('are as near as their uncertainty says, %s', { timeout: 120_000 }, (_, setup, sweep, last) => {
    const { off, asMany } = misses(setup, sweep, last)
    expect(asMany / runs).toBeGreaterThan(0.93)
    for (const [name, values] of off) {
      const found = `${name}: ${part(values, 1).toFixed(3)}, ${part(values, 2).toFixed(3)}`
      expect(part(values, 1), found).toBeGreaterThan(rates.oneLeast)
      expect(part(values, 1), found).toBeLessThan(rates.oneMost)
      expect(part(values, 2), found).toBeGreaterThan(rates.twoLeast)
    }
  })
})
