import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  edgeLines,
  planePicture,
  slopeHandle,
  slopeHandleLevel,
} from '../../src/chart/planePicture'
import { lampVoltageAt, loadCurrent, loadLineOf, type Stage, solveStage } from '../../src/core'
import { stages } from '../support/lampArbitrary'
import { knotsOf, stageOf } from '../support/stages'
import {
  anyStage,
  cornersOf,
  distanceTo,
  drawingOf,
  extremeStages,
  kinds,
  plateWidths,
  type Spot,
} from './drawing'

const anyKind = fc.constantFrom(...kinds)
const anyWidth = fc.constantFrom(...plateWidths)

/** A lamp with one falling region, that recovers at once, with a window of both edges. */
const plainFlashers = fc
  .record({
    supplyVoltage: fc.double({ min: 85, max: 300, noNaN: true }),
    leakageResistance: fc.oneof(
      fc.constant(Number.POSITIVE_INFINITY),
      fc.double({ min: 2e7, max: 1e9, noNaN: true }),
    ),
    leadResistance: fc.oneof(fc.constant(0), fc.double({ min: 10, max: 1e5, noNaN: true })),
    sourceResistance: fc.oneof(fc.constant(0), fc.double({ min: 1, max: 1e4, noNaN: true })),
  })
  .map((parts) => stageOf({ ...parts, seriesResistance: 2.2e6 }))

const drawn = (stage: Stage, kind: (typeof kinds)[number], width?: number) => {
  const input = drawingOf(stage, kind, width)
  return { ...input, picture: planePicture(input) }
}

/** Whether a spot lies inside a closed line. */
function within(outline: readonly Spot[], [x, y]: Spot): boolean {
  let inside = false
  outline.forEach(([x1, y1], k) => {
    const [x2, y2] = outline[(k + 1) % outline.length]!
    if (y1 > y !== y2 > y && x < x1 + ((y - y1) / (y2 - y1)) * (x2 - x1)) inside = !inside
  })
  return inside
}

describe('the edges of the region of oscillation', () => {
  it('are load lines exactly through knee and valley', () => {
    fc.assert(
      fc.property(plainFlashers, (stage) => {
        const solution = solveStage(stage)
        fc.pre(solution.window !== null && solution.window.min > 0)
        const { lit, dark } = edgeLines(stage, solution, loadLineOf(stage))
        const { strike, extinction } = solution.reason
        expect(loadCurrent(dark!, strike!.voltage) / strike!.current).toBeCloseTo(1, 9)
        expect(loadCurrent(lit!, extinction!.voltage) / extinction!.current).toBeCloseTo(1, 9)
      }),
      { seed: 801 },
    )
  })

  it('are drawn through knee and valley, to half a pixel, on either axis at every width', () => {
    fc.assert(
      fc.property(plainFlashers, anyKind, anyWidth, (stage, kind, width) => {
        const { solution, path, picture, x, y } = drawn(stage, kind, width)
        fc.pre(solution.window !== null && solution.window.min > 0)
        const at = (knot: number): Spot => [
          x.place(path.current[knot]!),
          y.place(path.level[knot]!),
        ]
        const [dark] = cornersOf(picture.darkEdge)
        const [lit] = cornersOf(picture.litEdge)
        expect(distanceTo(dark!, at(path.top[0]!))).toBeLessThan(0.5)
        const valley = at(path.bottom[1]!)
        // On a linear axis the valley may lie far out of sight to the right.
        fc.pre(valley[0] < 1e5)
        expect(distanceTo(lit!, valley)).toBeLessThan(0.5)
      }),
      { seed: 802, numRuns: 200 },
    )
  })

  it('keep the load line of a stage that flashes between them', () => {
    fc.assert(
      fc.property(plainFlashers, anyKind, anyWidth, (stage, kind, width) => {
        const { solution, picture, x, y } = drawn(stage, kind, width)
        fc.pre(solution.verdict === 'flashes')
        const [region] = cornersOf(picture.region)
        const line = loadLineOf(stage)
        for (const level of [10, 20, 30, 50, 70]) {
          const spot: Spot = [x.place(loadCurrent(line, level)), y.place(level)]
          fc.pre(spot[0] < x.range[1] && spot[0] > x.range[0] + 1)
          expect(within(region!, spot)).toBe(true)
        }
      }),
      { seed: 803 },
    )
  })

  it('shade just what load lines of the window’s resistances pass over, whatever the lamp', () => {
    fc.assert(
      fc.property(
        stages({ delay: false, recovery: false }),
        anyKind,
        fc.double({ min: -0.5, max: 1.5, noNaN: true }),
        fc.double({ min: 0.03, max: 0.97, noNaN: true }),
        (stage, kind, part, height) => {
          const { solution, picture, x, y } = drawn(stage, kind)
          const { window } = solution
          fc.pre(window !== null)
          const least = Math.max(window!.min, window!.max * 1e-3)
          const seriesResistance = least * (window!.max / least) ** part
          const line = loadLineOf({ ...stage, seriesResistance })
          const level = height * stage.supplyVoltage
          const current = loadCurrent(line, level)
          const spot: Spot = [x.place(current), y.place(level)]
          fc.pre(spot[0] > x.range[0] + 1 && spot[0] < x.range[1] - 1)
          const [region] = cornersOf(picture.region)
          // On the edge itself rounding decides.
          fc.pre(distanceTo([...region!, region![0]!], spot) > 0.5)
          expect(within(region!, spot)).toBe(
            seriesResistance > window!.min && seriesResistance < window!.max,
          )
        },
      ),
      { seed: 804, numRuns: 250 },
    )
  })

  it('are not drawn, nor any region, where no resistance makes the stage flash', () => {
    const { picture } = drawn(stageOf({ supplyVoltage: 60 }), 'logarithmic')
    expect([picture.region, picture.litEdge, picture.darkEdge]).toEqual(['', '', ''])
  })

  it('have none on the lit side where the resistor is free to go down to nothing', () => {
    const stage = stageOf({ supplyVoltage: 80, sourceResistance: 500e3 })
    const { picture, solution, x } = drawn(stage, 'logarithmic')
    expect(solution.window!.min).toBe(0)
    expect(picture.litEdge).toBe('')
    const farthest = Math.max(...cornersOf(picture.region)[0]!.map(([at]) => at))
    expect(farthest).toBeCloseTo(x.range[1], 1)
  })
})

describe('planePicture', () => {
  it('marks the operating points where both curves meet', () => {
    fc.assert(
      fc.property(stages({ recovery: false }), anyKind, (stage, kind) => {
        const { solution, picture, x, y } = drawn(stage, kind)
        expect(picture.marks.length).toBe(solution.operatingPoints.length)
        for (const mark of picture.marks) {
          if (mark.x > x.range[1] || mark.current < x.domain[0]) continue
          const lamp = lampVoltageAt(stage.lamp.knots, mark.current)!
          const level = lamp + stage.leadResistance * mark.current
          expect(y.place(level)).toBeCloseTo(mark.y, 3)
          const line = loadLineOf(stage)
          expect(x.place(loadCurrent(line, y.value(mark.y)))).toBeCloseTo(mark.x, 1)
          const at: Spot = [mark.x, mark.y]
          expect(distanceTo(cornersOf(picture.characteristic).flat(), at)).toBeLessThan(0.5)
          expect(distanceTo(cornersOf(picture.loadLine).flat(), at)).toBeLessThan(0.5)
        }
      }),
      { seed: 805, numRuns: 150 },
    )
  })

  it('draws the dwelling stretches of the loop along the characteristic', () => {
    fc.assert(
      fc.property(stages({ delay: false }), anyKind, (stage, kind) => {
        const { solution, picture, x } = drawn(stage, kind)
        fc.pre(solution.cycle !== null)
        const curve = cornersOf(picture.characteristic).flat()
        const spots = cornersOf(picture.loop).flat()
        expect(spots.length).toBeGreaterThan(0)
        const seen = spots.filter(([at]) => at >= x.range[0] && at <= x.range[1])
        for (const spot of seen) expect(distanceTo(curve, spot)).toBeLessThan(0.5)
      }),
      { seed: 806, numRuns: 100 },
    )
  })

  it('jumps at strike to more current and at extinction to less, each at one voltage', () => {
    const { picture, solution, x, y } = drawn(stageOf(), 'logarithmic')
    const { highVoltage, lowVoltage, peakLampCurrent } = solution.cycle!
    expect(picture.jumps.length).toBe(2)
    const [strike, extinction] = picture.jumps
    expect(strike!.y).toBeCloseTo(y.place(highVoltage), 6)
    expect(strike!.from).toBeCloseTo(x.place(0.2e-6), 6)
    expect(strike!.to).toBeCloseTo(x.place(peakLampCurrent), 6)
    expect(extinction!.y).toBeCloseTo(y.place(lowVoltage), 6)
    expect(extinction!.from).toBeCloseTo(x.place(90e-6), 6)
    expect(extinction!.to).toBeLessThan(extinction!.from)
  })

  it('closes the loop: each stretch and jump begins where the one before ended', () => {
    const { picture } = drawn(stageOf(), 'logarithmic')
    const runs = cornersOf(picture.loop)
    const jumpOf = new Map(picture.jumps.map((jump) => [jump.phase, jump]))
    runs.forEach((run, index) => {
      const next = runs[(index + 1) % runs.length]!
      const [endX, endY] = run.at(-1)!
      const [startX, startY] = next[0]!
      const jump = jumpOf.get(index)
      expect(Math.abs(endY - startY)).toBeLessThan(0.02)
      expect(Math.abs((jump?.from ?? endX) - endX)).toBeLessThan(0.02)
      expect(Math.abs((jump?.to ?? endX) - startX)).toBeLessThan(0.02)
    })
  })

  it('draws the lamp alone beside it only where a lead resistor makes it differ', () => {
    expect(drawn(stageOf(), 'linear').picture.lampAlone).toBe('')
    const { picture, y } = drawn(stageOf({ leadResistance: 10e3 }), 'linear')
    const [alone] = cornersOf(picture.lampAlone)
    expect(alone!.at(-1)![1]).toBeCloseTo(y.place(84), 1)
  })

  it.each(extremeStages)(
    'has paths of 2000 points at most, all of them numbers: %s',
    (_, stage) => {
      for (const kind of kinds) {
        const { picture } = drawn(stage, kind)
        const { characteristic, lampAlone, loadLine, region, litEdge, darkEdge, loop } = picture
        for (const path of [characteristic, lampAlone, loadLine, region, litEdge, darkEdge, loop]) {
          const spots = cornersOf(path).flat()
          expect(spots.length).toBeLessThanOrEqual(2000)
          expect(spots.flat().every(Number.isFinite)).toBe(true)
        }
        for (const { x, y } of picture.marks) expect(Number.isFinite(x + y)).toBe(true)
        for (const { from, to, y } of picture.jumps) {
          expect(Number.isFinite(from + to + y)).toBe(true)
        }
        expect(characteristic).not.toBe('')
        expect(loadLine).not.toBe('')
      }
    },
  )

  it('holds no number that is none, for any design, however far one has zoomed in', () => {
    fc.assert(
      fc.property(anyStage, anyKind, fc.boolean(), (stage, kind, zoomed) => {
        const input = drawingOf(
          stage,
          kind,
          690,
          zoomed ? { current: [1.1e-6, 1.2e-6], voltage: [60, 60.01] } : {},
        )
        const picture = planePicture(input)
        expect(JSON.stringify(picture)).not.toMatch(/NaN|null|Infinity/)
      }),
      { seed: 807, numRuns: 150 },
    )
  })
})

describe('the handle for the slope', () => {
  it('stands on the load line, well down it, within the plot', () => {
    fc.assert(
      fc.property(stages(), anyKind, anyWidth, (stage, kind, width) => {
        const { x, y } = drawingOf(stage, kind, width)
        const line = loadLineOf(stage)
        const handle = slopeHandle(line, x, y)
        expect(handle.level).toBe(slopeHandleLevel(line, y))
        expect(handle.y).toBe(y.place(handle.level))
        expect(handle.x).toBeGreaterThanOrEqual(x.range[0])
        expect(handle.x).toBeLessThanOrEqual(x.range[1])
        const onLine = x.place(Math.max(0, loadCurrent(line, handle.level)))
        expect(handle.x).toBeCloseTo(Math.min(x.range[1], Math.max(x.range[0], onLine)), 6)
      }),
      { seed: 808 },
    )
  })

  it('stays in sight where one has zoomed to other voltages', () => {
    const stage = stageOf({ knots: knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-2, 90]) })
    const { x, y } = drawingOf(stage, 'logarithmic', 1040, { voltage: [70, 90] })
    const handle = slopeHandle(loadLineOf(stage), x, y)
    expect(handle.level).toBeGreaterThan(70)
    expect(handle.level).toBeLessThan(90)
  })
})
