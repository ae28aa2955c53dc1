import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { branchesOf, type Stage, solveStage, type Window } from '../../../src/core/index'
import { meanWait, paceOf } from '../../../src/core/stage/solveStage'
import {
  capacitanceWindows,
  generalResistanceWindows,
  nearestWindow,
  resistanceWindows,
  supplyWindows,
} from '../../../src/core/stage/windows'
import { evenly, stages } from '../../support/lampArbitrary'
import { knotsOf, stageOf } from '../../support/stages'

const flashes = (stage: Stage) => solveStage(stage).verdict === 'flashes'

const parts = (stage: Stage) =>
  [
    branchesOf(stage.lamp.knots, stage.leadResistance),
    paceOf(stage, meanWait(stage.lamp.strikeDelay)),
  ] as const

const holds = (windows: readonly Window[], value: number) =>
  windows.some((window) => window.min < value && value < window.max)

/** Windows of series and source resistance together, so that none is cut off at nothing. */
const totals = (stage: Stage) =>
  solveStage({ ...stage, sourceResistance: 0 }).windows.filter((window) => window.min > 1e-3)

/**
 * Solves a millionth inside and outside both edges of every window. Outside, another window may begin there;
 * a window not two millionths wide has no inside.
 */
function checkEdges(windows: readonly Window[], flashesAt: (value: number) => boolean): number {
  let edges = 0
  for (const { min, max } of windows) {
    if (max < min * (1 + 4e-6)) continue
    const ends: [inside: number, outside: number][] = []
    if (min > 0) ends.push([min * (1 + 1e-6), min * (1 - 1e-6)])
    if (Number.isFinite(max)) ends.push([max * (1 - 1e-6), max * (1 + 1e-6)])
    for (const [inside, outside] of ends) {
      edges++
      expect(flashesAt(inside)).toBe(true)
      if (!holds(windows, outside)) expect(flashesAt(outside)).toBe(false)
    }
  }
  return edges
}

describe('the windows of the series resistor', () => {
  it('end where the verdict flips, to a millionth, whatever complicates the stage', () => {
    let edges = 0
    let several = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        const bare = { ...stage, sourceResistance: 0 }
        const windows = totals(stage)
        if (windows.length > 1) several++
        edges += checkEdges(windows, (seriesResistance) => flashes({ ...bare, seriesResistance }))
      }),
      { seed: 141, numRuns: 800 },
    )
    expect(edges).toBeGreaterThan(800)
    expect(several).toBeGreaterThan(15)
  })

  it('end there too with recovery and strike delay both present', () => {
    let edges = 0
    fc.assert(
      fc.property(stages(), evenly(-5, -3), evenly(-6, -3), (drawn, recovery, delay) => {
        const stage = {
          ...drawn,
          sourceResistance: 0,
          lamp: { ...drawn.lamp, recoveryTime: 10 ** recovery, strikeDelay: 10 ** delay },
        }
        edges += checkEdges(totals(stage), (seriesResistance) =>
          flashes({ ...stage, seriesResistance }),
        )
      }),
      { seed: 142, numRuns: 500 },
    )
    expect(edges).toBeGreaterThan(300)
  })

  it('hold every flashing resistance and no other', () => {
    let inside = 0
    fc.assert(
      fc.property(stages(), evenly(-2.5, 2.5), (stage, decades) => {
        const bare = { ...stage, sourceResistance: 0 }
        const seriesResistance = stage.seriesResistance * 10 ** decades
        const { windows } = solveStage(bare)
        const edge = windows.some(
          ({ min, max }) =>
            Math.abs(seriesResistance / min - 1) < 1e-9 ||
            Math.abs(seriesResistance / max - 1) < 1e-9,
        )
        fc.pre(!edge)
        const held = holds(windows, seriesResistance)
        if (held) inside++
        expect(flashes({ ...bare, seriesResistance })).toBe(held)
      }),
      { seed: 143, numRuns: 3000 },
    )
    expect(inside).toBeGreaterThan(400)
  })

  it('leave the source its part, and begin at nothing where the source does enough alone', () => {
    const whole = solveStage(stageOf()).window
    const part = solveStage(stageOf({ sourceResistance: 0.5e6, seriesResistance: 1.7e6 })).window
    expect(part?.min).toBeCloseTo((whole?.min ?? 0) - 0.5e6, 3)
    expect(part?.max).toBeCloseTo((whole?.max ?? 0) - 0.5e6, 3)
    const weak = solveStage(stageOf({ sourceResistance: 2.2e6, seriesResistance: 0 }))
    expect(weak.verdict).toBe('flashes')
    expect(weak.window?.min).toBe(0)
    expect(weak.margin).toEqual({
      toLit: Number.POSITIVE_INFINITY,
      toDark: Number.POSITIVE_INFINITY,
    })
  })

  it('are the same by the plain formula and by the general method', () => {
    let compared = 0
    fc.assert(
      fc.property(stages({ delay: false }), (stage) => {
        const [path, pace] = parts(stage)
        fc.pre(path.top.length === 2)
        const plain = resistanceWindows(path, pace)
        const general = generalResistanceWindows(path, pace)
        // A window closing to nothing may be seen by one and not by the other.
        fc.pre(plain.every(({ min, max }) => max > min * (1 + 1e-9)))
        expect(general.length).toBe(plain.length)
        plain.forEach((window, n) => {
          compared++
          expect(Math.abs((general[n]?.min ?? 0) / window.min - 1)).toBeLessThan(1e-12)
          expect(Math.abs((general[n]?.max ?? 0) / window.max - 1)).toBeLessThan(1e-12)
        })
      }),
      { seed: 144, numRuns: 1500 },
    )
    expect(compared).toBeGreaterThan(300)
  })

  it('leave out a gap between two turns, where an early strike passes a branch by or not', () => {
    const stage = stageOf({
      supplyVoltage: 71.5,
      capacitance: 6e-9,
      recoveryTime: 1e-3,
      strikeDelay: 7e-5,
      knots: knotsOf(
        [0, 0],
        [0.18e-6, 52],
        [6e-6, 37],
        [380e-6, 37.5],
        [2.3e-3, 47],
        [15.6e-3, 28],
        [180e-3, 37],
        [2.7, 62],
      ),
    })
    const { windows } = solveStage(stage)
    expect(windows).toHaveLength(2)
    for (let n = 0; n <= 300; n++) {
      const seriesResistance = 10 ** (3 + n / 50)
      expect(flashes({ ...stage, seriesResistance })).toBe(holds(windows, seriesResistance))
    }
  })

  it('are two for a lamp with two falls whose load lines cross between', () => {
    const knots = knotsOf([0, 0], [4e-3, 90], [12e-3, 45], [20e-3, 70], [30e-3, 50], [80e-3, 120])
    const { windows } = solveStage(stageOf({ supplyVoltage: 180, seriesResistance: 8e3, knots }))
    // (180 − 45)/12 mA, (180 − 90)/4 mA; (180 − 50)/30 mA, (180 − 70)/20 mA: by hand from the knots.
    expect(windows).toHaveLength(2)
    expect(windows[0]?.min).toBeCloseTo(130 / 30e-3, 6)
    expect(windows[0]?.max).toBeCloseTo(110 / 20e-3, 6)
    expect(windows[1]?.min).toBeCloseTo(135 / 12e-3, 6)
    expect(windows[1]?.max).toBeCloseTo(90 / 4e-3, 6)
  })

  it('are none for a lamp that never falls, a supply that never strikes, or a strike off the data', () => {
    expect(solveStage(stageOf({ knots: knotsOf([0, 0], [1, 70]) })).windows).toEqual([])
    expect(solveStage(stageOf({ supplyVoltage: 70 })).windows).toEqual([])
    const short = knotsOf([0, 0], [1e-6, 80], [1e-4, 60], [1e-3, 79])
    expect(solveStage(stageOf({ knots: short })).windows).toEqual([])
  })
})

describe('the windows of the supply voltage', () => {
  it('end where the verdict flips, to a millionth', () => {
    let edges = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        edges += checkEdges(supplyWindows(...parts(stage)), (supplyVoltage) =>
          flashes({ ...stage, supplyVoltage }),
        )
      }),
      { seed: 145, numRuns: 800 },
    )
    expect(edges).toBeGreaterThan(600)
  })

  it('are those of two conditions on the load line for a plain lamp', () => {
    const [window] = supplyWindows(...parts(stageOf()))
    expect(window?.min).toBeCloseTo(75 + 2.2e6 * 0.2e-6, 9)
    expect(window?.max).toBeCloseTo(55 + 2.2e6 * 90e-6, 9)
  })
})

describe('the windows of the capacitance', () => {
  it('end where the verdict flips, to a millionth', () => {
    let edges = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        edges += checkEdges(capacitanceWindows(...parts(stage)), (capacitance) =>
          flashes({ ...stage, capacitance }),
        )
      }),
      { seed: 146, numRuns: 800 },
    )
    expect(edges).toBeGreaterThan(80)
  })

  it('are all there is where the lamp neither recovers nor waits', () => {
    expect(capacitanceWindows(...parts(stageOf()))).toEqual([
      { min: 0, max: Number.POSITIVE_INFINITY },
    ])
    expect(capacitanceWindows(...parts(stageOf({ seriesResistance: 33e3 })))).toEqual([])
  })
})

describe('the nearest window', () => {
  const windows = [
    { min: 10, max: 20 },
    { min: 100, max: 200 },
  ]

  it('is the one that holds the value, else the nearest by ratio', () => {
    expect(nearestWindow(windows, 15)).toEqual(windows[0])
    expect(nearestWindow(windows, 20)).toEqual(windows[0])
    expect(nearestWindow(windows, 44)).toEqual(windows[0])
    expect(nearestWindow(windows, 46)).toEqual(windows[1])
    expect(nearestWindow(windows, 0)).toEqual(windows[0])
    expect(nearestWindow(windows, 1e9)).toEqual(windows[1])
    expect(nearestWindow([], 15)).toBeNull()
  })
})

describe('the margin', () => {
  it('is how far the resistor is from either edge, above one inside', () => {
    const { margin, window } = solveStage(stageOf())
    expect(margin?.toLit).toBe(2.2e6 / (window?.min ?? 0))
    expect(margin?.toDark).toBe((window?.max ?? 0) / 2.2e6)
    expect(solveStage(stageOf({ seriesResistance: 33e3 })).margin?.toLit).toBeLessThan(1)
    expect(solveStage(stageOf({ supplyVoltage: 60 })).margin).toBeNull()
  })

  it('is a number on every stage that has a window', () => {
    fc.assert(
      fc.property(stages(), (drawn) => {
        for (const seriesResistance of [0, drawn.seriesResistance]) {
          const { margin, window } = solveStage({ ...drawn, seriesResistance })
          expect(margin === null).toBe(window === null)
          if (margin === null) continue
          expect(margin.toLit).toBeGreaterThanOrEqual(0)
          expect(margin.toDark).toBeGreaterThanOrEqual(0)
        }
      }),
      { seed: 147, numRuns: 300 },
    )
  })
})

describe('on the very edge of a window', () => {
  it('no figure is lost, whichever verdict rounding gives', () => {
    let solved = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        const { windows, leastCapacitance } = solveStage(stage)
        const near = (value: number) =>
          [-8, -2, -1, 0, 1, 2, 8, 1000].map((steps) => value * (1 + steps * 2 ** -52))
        const tries: Stage[] = windows
          .flatMap(({ min, max }) => [min, max])
          .flatMap(near)
          .map((seriesResistance) => ({ ...stage, seriesResistance }))
        if (leastCapacitance !== null) {
          tries.push(...near(leastCapacitance).map((capacitance) => ({ ...stage, capacitance })))
        }
        for (const tried of tries) {
          const solution = solveStage(tried)
          solved++
          const times = solution.fromSwitchOn.map((phase) => phase.duration)
          const ending = solution.cycle === null ? times.slice(0, -1) : times
          expect(times.every((time) => time >= 0)).toBe(true)
          expect(ending.every(Number.isFinite)).toBe(true)
          if (solution.cycle === null) continue
          const lost = Object.entries(solution.cycle).filter(
            ([, value]) => typeof value === 'number' && !Number.isFinite(value),
          )
          expect(lost).toEqual([])
          expect(solution.cycle.period).toBeGreaterThan(0)
        }
      }),
      { seed: 148, numRuns: 250 },
    )
    expect(solved).toBeGreaterThan(1500)
  })
})
