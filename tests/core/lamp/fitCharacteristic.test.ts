import { levenbergMarquardt } from 'ml-levenberg-marquardt'
import { describe, expect, it } from 'vitest'
import { currentsFromSweep } from '../../../src/core/lamp/currentsFromSweep'
import {
  type CharacteristicFit,
  fitCharacteristic,
  leastPoints,
} from '../../../src/core/lamp/fitCharacteristic'
import type { SweepPoint } from '../../../src/core/lamp/sweepPoint'
import type { SweepSetup } from '../../../src/core/lamp/sweepSetup'
import { faultInKnots, type Knot, lampVoltageAt } from '../../../src/core/stage/lamp'
import { normal, randomLamp, seeded, sweepOf } from './syntheticSweep'

const setup: SweepSetup = {
  seriesResistance: 100e3,
  meterResistance: 10e6,
  meterPlace: 'lamp',
  readingError: { absolute: 0.05, relative: 0 },
}
const lamp = randomLamp(seeded(3))

function pointsOf(change: Partial<SweepSetup> = {}, seed = 1, count = 300, to = 220) {
  const whole = { ...setup, ...change }
  const range = { to, count, error: 0.05 }
  const result = currentsFromSweep(sweepOf(lamp, whole, range, seeded(seed)), whole)
  if (!result.ok) throw new Error(result.message)
  return result.points
}

function fitted(points: readonly SweepPoint[], errors: 'given' | 'estimated' = 'given') {
  const fit = fitCharacteristic(points, { errors })
  if (!fit.ok) throw new Error(fit.message)
  return fit
}

function messageOf(fit: CharacteristicFit): string {
  return fit.ok ? '' : fit.message
}

/** A point on the lamp with errors of the voltage alone. */
function exactPoint(current: number, row: number, error: number): SweepPoint {
  const voltage = lampVoltageAt(lamp, current) ?? 0
  const sigmaVoltage = 0.01
  return { current, voltage: voltage + error, sigmaCurrent: 0, sigmaVoltage, direction: 'up', row }
}

describe('a fitted characteristic', () => {
  it('is one that a design can use, from (0, 0), rising, falling and rising', () => {
    for (const seriesResistance of [100e3, 1e6]) {
      const { knots, knee, valley } = fitted(pointsOf({ seriesResistance }))
      expect(faultInKnots(knots)).toBeNull()
      for (const [i, knot] of knots.entries()) {
        const rise = knot.voltage - (knots[i - 1]?.voltage ?? 0)
        if (i > knee && i <= valley) expect(rise).toBeLessThanOrEqual(0)
        else expect(rise).toBeGreaterThanOrEqual(0)
      }
    }
  })

  it('says that the falling region is bridged where the lamp jumps, and what bounds its ends', () => {
    const fit = fitted(pointsOf())
    expect(fit.fallingRegion).toBe('bridged')
    const [lowKnee, highKnee] = fit.kneeVoltage ?? [0, 0]
    // The sweep's step is 220 V / 150; reading errors are 0.05 V.
    expect(highKnee - lowKnee).toBeGreaterThan(1)
    expect(highKnee - lowKnee).toBeLessThan(2)
    expect(lamp[1]!.voltage).toBeGreaterThan(lowKnee - 0.2)
    expect(lamp[1]!.voltage).toBeLessThan(highKnee + 0.2)
    expect(fit.notes.join(' ')).toMatch(/drawn straight from knee to valley/)
  })

  it('says that the falling region is measured where the resistor holds the lamp in it', () => {
    const fit = fitted(pointsOf({ seriesResistance: 1e6 }))
    expect(fit.fallingRegion).toBe('measured')
    expect(fit.kneeVoltage).toBeNull()
  })

  it('sets no bound to the valley without a way down, nor to the knee without a way up', () => {
    const points = pointsOf()
    const up = fitted(points.filter(({ direction }) => direction === 'up'))
    expect(up.notes.join(' ')).toMatch(/valley may lie at any lower current/)
    expect(up.valleyCurrent?.[0]).toBeLessThan(lamp[2]!.current)
    const down = fitted(points.filter(({ direction }) => direction === 'down'))
    expect(down.sigma[down.knee]?.voltage).toBe(Number.POSITIVE_INFINITY)
    expect(down.notes.join(' ')).toMatch(/only known to be above/)
  })

  it('takes as many knots as the criterion says, within the limits asked for', () => {
    const points = pointsOf()
    expect(fitted(points).knots).toHaveLength(5)
    const { values } = fitted(points).criterion
    const least = Math.min(...values.map(({ value }) => value))
    expect(values.find(({ value }) => value === least)?.knots).toBe(5)
    const few = fitCharacteristic(points, { errors: 'given', mostKnots: 4 })
    expect(few.ok && few.knots.length).toBe(4)
    const many = fitCharacteristic(points, { errors: 'given', leastKnots: 7 })
    expect(many.ok && many.knots.length).toBeGreaterThanOrEqual(7)
  })

  it('finds the size of the errors where only their proportions are known', () => {
    const points = pointsOf().map((point) => ({
      ...point,
      sigmaCurrent: 7 * point.sigmaCurrent,
      sigmaVoltage: 7 * point.sigmaVoltage,
      covariance: 49 * (point.covariance ?? 0),
    }))
    expect(7 * fitted(points, 'estimated').errorScale).toBeCloseTo(1, 0)
  })

  it('widens the uncertainty and says so where the errors given are too small', () => {
    const points = pointsOf().map((point) => ({
      ...point,
      sigmaCurrent: point.sigmaCurrent / 4,
      sigmaVoltage: point.sigmaVoltage / 4,
      covariance: (point.covariance ?? 0) / 16,
    }))
    const fit = fitted(points)
    expect(fit.errorScale).toBeGreaterThan(3)
    expect(fit.notes.join(' ')).toMatch(/scatter .* times as much as the errors given/)
  })

  it('adds the errors that all readings share to the currents', () => {
    const points = pointsOf()
    const common = { resistor: 0.05, meter: 0, meterConductance: 0 }
    const shared = fitCharacteristic(points, { errors: 'given', common })
    if (!shared.ok) throw new Error(shared.message)
    const bend = shared.knots[3]!
    expect(shared.sigma[3]!.current).toBeGreaterThan(0.05 * bend.current)
    expect(fitted(points).sigma[3]!.current).toBeLessThan(0.05 * bend.current)
  })

  it('agrees with an outside Levenberg–Marquardt on a smooth case', () => {
    const random = seeded(11)
    const currents = [
      ...Array.from({ length: 40 }, (_, i) => (lamp[1]!.current * (i + 0.5)) / 40),
      ...Array.from({ length: 40 }, (_, i) => lamp[1]!.current + 2e-6 * (i + 0.5)),
      ...Array.from({ length: 60 }, (_, i) => 150e-6 + 8e-6 * i),
    ].filter((current) => current < lamp[3]!.current)
    const points = currents.map((at, i) => exactPoint(at, i + 1, 0.01 * normal(random)))
    const fit = fitted(points)
    expect(fit.knots).toHaveLength(4)
    // Currents in units of 10 µA and voltages of 10 V, so that all numbers are of one size.
    const end = currents.at(-1)!
    const model = (p: readonly number[]) => (x: number) => {
      const knots: Knot[] = [
        { current: 0, voltage: 0 },
        { current: p[0]! * 1e-5, voltage: p[1]! * 10 },
        { current: p[2]! * 1e-5, voltage: p[3]! * 10 },
        { current: end, voltage: p[4]! * 10 },
      ]
      return lampVoltageAt(knots, x) ?? Number.NaN
    }
    const start = [lamp[1]!.current * 1e5, lamp[1]!.voltage / 10, lamp[2]!.current * 1e5]
    const outside = levenbergMarquardt(
      { x: currents, y: points.map(({ voltage }) => voltage) },
      model,
      {
        initialValues: [...start, lamp[2]!.voltage / 10, points.at(-1)!.voltage / 10],
        damping: 1e-3,
        gradientDifference: 1e-6,
        centralDifference: true,
        improvementThreshold: 1e-9,
        errorTolerance: 1e-9,
        maxIterations: 300,
      },
    )
    const [i1, v1, i2, v2, v3] = outside.parameterValues as number[]
    const pairs = [
      [fit.knots[1]!.current, i1! * 1e-5, fit.sigma[1]!.current],
      [fit.knots[1]!.voltage, v1! * 10, fit.sigma[1]!.voltage],
      [fit.knots[2]!.current, i2! * 1e-5, fit.sigma[2]!.current],
      [fit.knots[2]!.voltage, v2! * 10, fit.sigma[2]!.voltage],
      [fit.knots[3]!.voltage, v3! * 10, fit.sigma[3]!.voltage],
    ] as const
    for (const [ours, theirs, sigma] of pairs) {
      expect(Math.abs(ours - theirs) / sigma).toBeLessThan(0.05)
    }
    expect(fit.chiSquare).toBeLessThanOrEqual((outside.parameterError / 0.01 ** 2) * 1.0001)
  })
})

describe('a fit that cannot be', () => {
  const point = exactPoint(1e-4, 1, 0)

  it('asks for more readings', () => {
    expect(messageOf(fitCharacteristic([]))).toBe(
      `A fit needs ${leastPoints} usable readings at least; there are 0.`,
    )
    expect(messageOf(fitCharacteristic([point]))).toMatch(/there is 1\.$/)
  })

  it('says that all readings are the same', () => {
    expect(messageOf(fitCharacteristic(new Array(20).fill(point)))).toMatch(/all the readings/i)
  })

  it.each([
    ['the lamp never struck', (p: SweepPoint) => p.current < 20e-6],
    ['the lamp was never dark', (p: SweepPoint) => p.current > 40e-6],
  ])('says that no strike is seen where %s', (_, chosen) => {
    const fit = fitCharacteristic(pointsOf().filter(chosen), { errors: 'given' })
    expect(messageOf(fit)).toMatch(/no strike/)
  })

  it('names the row of a point that lacks a number', () => {
    const points = pointsOf().map((p, i) => (i === 4 ? { ...p, voltage: Number.NaN } : p))
    expect(messageOf(fitCharacteristic(points))).toMatch(/^Row 5 /)
  })

  it('gives an answer and no exception for any scatter of points', { timeout: 60_000 }, () => {
    const random = seeded(5)
    for (let run = 0; run < 30; run++) {
      const scale = 10 ** (-7 + 5 * random())
      const points = Array.from(
        { length: 8 + Math.floor(40 * random()) },
        (_, i): SweepPoint => ({
          current: scale * (random() - 0.1),
          voltage: 100 * random(),
          sigmaCurrent: scale * 0.01 * random(),
          sigmaVoltage: 0.01 + random(),
          direction: random() < 0.5 ? 'up' : 'down',
          row: i + 1,
        }),
      )
      const fit = fitCharacteristic(points)
      if (fit.ok) expect(faultInKnots(fit.knots)).toBeNull()
      else expect(fit.message).toMatch(/^[A-Z].*\.$/)
    }
  })
})
