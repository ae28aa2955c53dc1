import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { linearAxis } from '../../src/chart/axes'
import { type Span, timeDomain } from '../../src/chart/domains'
import { planePicture } from '../../src/chart/planePicture'
import { bottomOf, rightOf } from '../../src/chart/plateLayout'
import { traceOf } from '../../src/chart/traceOf'
import { highestCurrent, tracePicture } from '../../src/chart/tracePicture'
import { equivalentSource, loadLineOf, type Stage } from '../../src/core'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'
import { anyStage, cornersOf, drawingOf, extremeStages } from './drawing'

const spans: readonly Span[] = ['cycles', 'flash', 'switch-on']

function wavesOf(stage: Stage, span: Span) {
  const drawing = drawingOf(stage, 'logarithmic')
  const { solution, layout, y } = drawing
  const trace = traceOf(stage, solution, span)
  const time = linearAxis(
    timeDomain(span, solution, trace.length),
    [layout.trace.x, rightOf(layout.trace)],
    80,
  )
  const most = 1.12 * Math.max(highestCurrent(trace), 1e-9)
  const current = linearAxis([0, most], [bottomOf(layout.current), layout.current.y], 30)
  return { ...drawing, trace, time, current, waves: tracePicture(trace, time, y, current) }
}

describe('tracePicture', () => {
  it('turns its corners at the levels at which the loop on the plane jumps', () => {
    const drawing = wavesOf(stageOf(), 'cycles')
    const heights = cornersOf(drawing.waves.voltage)
      .flat()
      .map(([, y]) => y)
    const jumps = planePicture(drawing).jumps.map((jump) => jump.y)
    expect(Math.min(...heights)).toBeCloseTo(Math.min(...jumps), 1)
    expect(Math.max(...heights)).toBeCloseTo(Math.max(...jumps), 1)
  })

  it('runs on to the right, from the first moment to the last', () => {
    fc.assert(
      fc.property(stages(), fc.constantFrom(...spans), (stage, span) => {
        const { waves, trace, time, y } = wavesOf(stage, span)
        const [run, ...more] = cornersOf(waves.voltage)
        expect(more).toEqual([])
        expect(run!.length).toBe(trace.moments.length)
        expect(run!.every(([x], k) => k === 0 || x >= run![k - 1]![0])).toBe(true)
        const first = trace.moments[0]!
        expect(run![0]![0]).toBeCloseTo(Math.max(-1e5, time.place(first.time)), 1)
        expect(run![0]![1]).toBeCloseTo(y.place(first.voltage), 1)
      }),
      { seed: 821, numRuns: 150 },
    )
  })

  it('fills light under the lamp current while the lamp is lit, and only then', () => {
    const { waves, trace, current } = wavesOf(stageOf(), 'cycles')
    const floor = current.place(0)
    const flashes = cornersOf(waves.light)
    expect(flashes.length).toBe(3)
    const lit = trace.moments.filter((moment) => moment.lit)
    expect(flashes.flat().length).toBe(2 * lit.length)
    for (const flash of flashes) {
      const heights = flash.map(([, y]) => y)
      expect(Math.max(...heights)).toBeCloseTo(floor, 1)
      expect(Math.min(...heights)).toBeCloseTo(current.place(highestCurrent(trace)), 1)
    }
  })

  it('fills none where the lamp stays dark', () => {
    expect(wavesOf(stageOf({ supplyVoltage: 60 }), 'switch-on').waves.light).toBe('')
  })

  it('never draws the voltage above what the source can give, nor below nothing', () => {
    fc.assert(
      fc.property(stages(), fc.constantFrom(...spans), (stage, span) => {
        const { waves, y } = wavesOf(stage, span)
        const open = equivalentSource(loadLineOf(stage)).voltage
        for (const [, height] of cornersOf(waves.voltage).flat()) {
          expect(height).toBeGreaterThanOrEqual(y.place(open) - 0.02)
          expect(height).toBeLessThanOrEqual(y.place(0) + 0.02)
        }
      }),
      { seed: 822, numRuns: 100 },
    )
  })

  it.each(extremeStages)(
    'has paths of 2000 points at most, all of them numbers: %s',
    (_, stage) => {
      for (const span of spans) {
        const { waves } = wavesOf(stage, span)
        for (const path of [waves.voltage, waves.current, waves.light]) {
          const spots = cornersOf(path).flat()
          expect(spots.length).toBeLessThanOrEqual(2000)
          expect(spots.flat().every(Number.isFinite)).toBe(true)
        }
        expect(waves.voltage).not.toBe('')
      }
    },
  )

  it('holds no number that is none, for any design', () => {
    fc.assert(
      fc.property(anyStage, fc.constantFrom(...spans), (stage, span) => {
        const { waves } = wavesOf(stage, span)
        expect(JSON.stringify(waves)).not.toMatch(/NaN|Infinity/)
      }),
      { seed: 823, numRuns: 150 },
    )
  })
})

describe('highestCurrent', () => {
  it('is the peak of the cycle', () => {
    const { trace, solution } = wavesOf(stageOf(), 'cycles')
    expect(highestCurrent(trace)).toBeCloseTo(solution.cycle!.peakLampCurrent, 12)
  })

  it('is nothing where no current flows', () => {
    expect(highestCurrent({ phases: [], moments: [], length: 0, loop: null })).toBe(0)
  })
})
