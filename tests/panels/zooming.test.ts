import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { planeDomain, timeDomain, voltageDomain } from '../../src/chart/domains'
import { traceOf } from '../../src/chart/traceOf'
import { branchesOf, solveStage } from '../../src/core'
import { zoomPlane, zoomTime } from '../../src/panels/zooming'
import { kinds } from '../chart/drawing'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'

const whole = { current: null, voltage: null, time: null }
const stage = stageOf()
const path = branchesOf(stage.lamp.knots, stage.leadResistance)
const solution = solveStage(stage)
const trace = traceOf(stage, solution, 'cycles')

describe('zoomPlane', () => {
  it('halves what is seen about the middle, from the whole or from a zoom', () => {
    const [low, high] = voltageDomain(stage, path)
    const once = zoomPlane(whole, 'linear', stage, 2)
    expect(once.voltage![0]).toBeCloseTo(low + (high - low) / 4, 9)
    expect(once.voltage![1]).toBeCloseTo(high - (high - low) / 4, 9)
    const [, most] = planeDomain('linear', stage, path)
    expect(once.current![0]).toBeCloseTo(most / 4, 12)
    const twice = zoomPlane(once, 'linear', stage, 2)
    expect(twice.voltage![1] - twice.voltage![0]).toBeCloseTo((high - low) / 4, 9)
  })

  it('goes by ratio on a logarithmic axis', () => {
    const [low, high] = planeDomain('logarithmic', stage, path)
    const { current } = zoomPlane(whole, 'logarithmic', stage, 2)
    expect(current![1] / current![0]).toBeCloseTo(Math.sqrt(high / low), 3)
    expect(Math.sqrt(current![0] * current![1]) / Math.sqrt(high * low)).toBeCloseTo(1, 6)
  })

  it('leaves the time as it is', () => {
    expect(zoomPlane({ ...whole, time: [1, 2] }, 'linear', stage, 2).time).toEqual([1, 2])
  })

  it('comes back: in and out again is where one was', () => {
    fc.assert(
      fc.property(stages(), fc.constantFrom(...kinds), (any, kind) => {
        fc.pre(any.lamp.knots.at(-1)!.current <= 100)
        const lines = branchesOf(any.lamp.knots, any.leadResistance)
        const back = zoomPlane(zoomPlane(whole, kind, any, 1.5), kind, any, 1 / 1.5)
        const domain = planeDomain(kind, any, lines)
        expect(back.current![1] / domain[1]).toBeCloseTo(1, 6)
        expect(Math.abs(back.current![0] - domain[0])).toBeLessThan(1e-6 * domain[1])
        expect(back.voltage![1] / voltageDomain(any, lines)[1]).toBeCloseTo(1, 6)
      }),
      { seed: 911 },
    )
  })

  it('stays sound however often the button is pressed', () => {
    for (const kind of kinds) {
      for (const factor of [1.5, 1 / 1.5]) {
        let zoom: Parameters<typeof zoomPlane>[0] = whole
        for (let n = 0; n < 300; n++) zoom = zoomPlane(zoom, kind, stage, factor)
        for (const domain of [zoom.current!, zoom.voltage!]) {
          expect(domain.every(Number.isFinite)).toBe(true)
          expect(domain[1]).toBeGreaterThan(domain[0])
        }
      }
    }
  })
})

describe('zoomTime', () => {
  it('halves what is seen about the middle, and leaves the plane as it is', () => {
    const [from, to] = timeDomain('cycles', solution, trace.length)
    const zoom = zoomTime({ ...whole, voltage: [1, 2] }, 'cycles', solution, trace, 2)
    expect(zoom.time![0]).toBeCloseTo(from + (to - from) / 4, 9)
    expect(zoom.time![1]).toBeCloseTo(to - (to - from) / 4, 9)
    expect(zoom.voltage).toEqual([1, 2])
    expect(zoom.current).toBeNull()
  })

  it('stays sound however often the button is pressed, on every span', () => {
    for (const span of ['cycles', 'flash', 'switch-on'] as const) {
      for (const factor of [1.5, 1 / 1.5]) {
        let zoom: Parameters<typeof zoomTime>[0] = whole
        for (let n = 0; n < 300; n++) zoom = zoomTime(zoom, span, solution, trace, factor)
        expect(zoom.time!.every(Number.isFinite)).toBe(true)
        expect(zoom.time![1]).toBeGreaterThan(zoom.time![0])
      }
    }
  })
})
