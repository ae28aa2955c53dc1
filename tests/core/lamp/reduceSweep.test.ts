import { describe, expect, it } from 'vitest'
import { currentsFromSweep } from '../../../src/core/lamp/currentsFromSweep'
import { fittingSweep, type SweepProgress } from '../../../src/core/lamp/fitSweep'
import { reduceSweep } from '../../../src/core/lamp/reduceSweep'
import type { SweepSetup } from '../../../src/core/lamp/sweepSetup'
import { randomLamp, seeded, sweepOf } from './syntheticSweep'

const setup: SweepSetup = {
  seriesResistance: 100e3,
  meterResistance: 10e6,
  meterPlace: 'lamp',
  readingError: { absolute: 0.05, relative: 0 },
}
const lamp = randomLamp(seeded(2))
const longSweep = sweepOf(lamp, setup, { to: 300, count: 1e5, error: 0.05 }, seeded(4))

function pointsOf(readings: typeof longSweep) {
  const result = currentsFromSweep(readings, setup)
  if (!result.ok) throw new Error(result.message)
  return result.points
}

describe('a long sweep reduced', () => {
  const points = pointsOf(longSweep)
  const reduced = reduceSweep(points)

  it('comes to some hundreds of points, none of which mixes directions', () => {
    expect(reduced.points.length).toBeGreaterThan(200)
    expect(reduced.points.length).toBeLessThan(1000)
    expect(reduced.averaged).toBeGreaterThan(200)
    for (const direction of ['up', 'down'] as const) {
      expect(reduced.points.some((point) => point.direction === direction)).toBe(true)
    }
  })

  it('keeps the readings on both sides of a jump as they are', () => {
    // Where the lamp strikes the voltage falls by more than 10 V from one row to the next.
    const strike = points.findIndex(
      (point, i) => (points[i - 1]?.voltage ?? 0) > point.voltage + 10,
    )
    expect(strike).toBeGreaterThan(0)
    for (const point of [points[strike - 1]!, points[strike]!]) {
      expect(reduced.points).toContainEqual(point)
    }
  })

  it('has means as much surer as they stand for more readings', () => {
    const total = reduced.points.reduce((sum, p) => sum + (0.05 / p.sigmaVoltage) ** 2, 0)
    expect(total).toBeCloseTo(points.length, 0)
  })

  it('leaves a short sweep as it was', () => {
    const few = points.slice(0, 500)
    expect(reduceSweep(few)).toEqual({ points: few, averaged: 0 })
  })
})

describe('a fit of 10⁵ rows', () => {
  it('finds the lamp, tells how far it is, and loses no row', () => {
    const heard: SweepProgress[] = []
    const steps = fittingSweep(longSweep, setup)
    let step = steps.next()
    while (!step.done) {
      heard.push(step.value)
      step = steps.next()
    }
    const { fit, points, leftOut } = step.value
    expect(points.length + leftOut.length).toBe(1e5)
    expect(heard.map(({ done }) => done)).toEqual(heard.map(({ done }) => done).toSorted())
    expect(new Set(heard.map(({ stage }) => stage))).toEqual(
      new Set(['currents', 'averaging', 'fitting']),
    )
    if (!fit.ok) throw new Error(fit.message)
    for (const knot of [1, 2, 3]) {
      for (const key of ['current', 'voltage'] as const) {
        const miss = (fit.knots[knot]![key] - lamp[knot]![key]) / fit.sigma[knot]![key]
        expect(Math.abs(miss), `${key} of knot ${knot}`).toBeLessThan(4)
      }
    }
  })

  it('says why there is none, and which rows were left out', () => {
    const steps = fittingSweep([{ supply: 10, lamp: Number.NaN }], setup)
    let step = steps.next()
    while (!step.done) step = steps.next()
    expect(step.value.fit).toEqual({ ok: false, message: 'No row of the sweep can be used.' })
    expect(step.value.leftOut).toHaveLength(1)
  })
})
