import type fc from 'fast-check'
import { type CurrentAxis, currentAxis, type Domain, linearAxis } from '../../src/chart/axes'
import { planeDomain, voltageDomain } from '../../src/chart/domains'
import { bottomOf, plateLayout, rightOf } from '../../src/chart/plateLayout'
import { branchesOf, type Knot, type Stage, solveStage } from '../../src/core'
import { anyDesign } from '../io/any-design'
import { stageOf } from '../support/stages'

/** A place on the plate, px. */
export type Spot = readonly [x: number, y: number]

/** Widths in px that the plate has on pages 1440, 1024 and 390 px wide, about, and the narrowest. */
export const plateWidths = [1040, 690, 360, 280] as const

/** Both ways the current axis runs. */
export const kinds: readonly CurrentAxis[] = ['logarithmic', 'linear']

/** A plane laid out for a stage as the page lays it out. */
export function planeOf(
  stage: Stage,
  kind: CurrentAxis,
  width: number = plateWidths[0],
  zoom: { readonly current?: Domain; readonly voltage?: Domain } = {},
) {
  const layout = plateLayout(width)
  const path = branchesOf(stage.lamp.knots, stage.leadResistance)
  const { plane } = layout
  const x = currentAxis(kind, zoom.current ?? planeDomain(kind, stage, path), [
    plane.x,
    rightOf(plane),
  ])
  const y = linearAxis(zoom.voltage ?? voltageDomain(stage, path), [bottomOf(plane), plane.y], 44)
  return { stage, path, kind, x, y, layout }
}

/** The same, and the stage solved. */
export const drawingOf = (...asked: Parameters<typeof planeOf>) => ({
  ...planeOf(...asked),
  solution: solveStage(asked[0]),
})

/** Corner points of an SVG path made of moves and straight lines, one list for each move. */
export function cornersOf(path: string): Spot[][] {
  const runs: Spot[][] = []
  for (const [, letter, x, y] of path.matchAll(/([A-Z])(?:([^,A-Z]*),([^,A-Z]*))?/g)) {
    if (letter === 'Z') continue
    if (letter !== 'M' && letter !== 'L') throw new Error(`not a straight line: ${letter}`)
    if (letter === 'M') runs.push([])
    runs.at(-1)?.push([Number(x), Number(y)])
  }
  return runs
}

/** Distance in px of a spot from a broken line. */
export function distanceTo(line: readonly Spot[], [x, y]: Spot): number {
  let least = Number.POSITIVE_INFINITY
  line.forEach(([fromX, fromY], index) => {
    const [toX, toY] = line[index + 1] ?? [fromX, fromY]
    const length = (toX - fromX) ** 2 + (toY - fromY) ** 2
    const along =
      length > 0 ? ((x - fromX) * (toX - fromX) + (y - fromY) * (toY - fromY)) / length : 0
    const part = Math.max(0, Math.min(1, along))
    least = Math.min(
      least,
      Math.hypot(x - fromX - part * (toX - fromX), y - fromY - part * (toY - fromY)),
    )
  })
  return least
}

/** 64 knots from a femtoamp to 100 A, rising and falling in turn. */
const manyKnots: readonly Knot[] = Array.from({ length: 64 }, (_, k) => ({
  current: k === 0 ? 0 : 1e-15 * 10 ** ((17 * (k - 1)) / 62),
  voltage: k === 0 ? 0 : 60 + (k % 2 ? 20 : 0) + k / 4,
}))

/** Stages at the ends of what a design allows. */
export const extremeStages: readonly (readonly [name: string, stage: Stage])[] = [
  ['0 V', stageOf({ supplyVoltage: 0 })],
  ['20 kV', stageOf({ supplyVoltage: 20e3 })],
  ['20 kV through 10 TΩ', stageOf({ supplyVoltage: 20e3, seriesResistance: 1e13 })],
  ['no series resistor at all', stageOf({ seriesResistance: 0 })],
  ['1 Ω', stageOf({ seriesResistance: 1 })],
  ['10 TΩ', stageOf({ seriesResistance: 1e13 })],
  ['no capacitor', stageOf({ capacitance: 0 })],
  ['1 F', stageOf({ capacitance: 1 })],
  ['lead resistor of 10 MΩ', stageOf({ leadResistance: 10e6 })],
  ['leakage of 1 Ω', stageOf({ leakageResistance: 1 })],
  ['leakage of 1 Ω behind 10 TΩ', stageOf({ leakageResistance: 1, seriesResistance: 1e13 })],
  ['recovery time of 1000 s', stageOf({ recoveryTime: 1000 })],
  ['strike delay of 1000 s', stageOf({ strikeDelay: 1000 })],
  ['64 knots from a femtoamp', stageOf({ knots: manyKnots })],
  [
    '64 knots and a load line between knee and valley',
    stageOf({ knots: manyKnots, seriesResistance: 1e10 }),
  ],
  [
    'long way round 64 knots',
    stageOf({
      supplyVoltage: 150,
      seriesResistance: 3e6,
      knots: longWayRound(),
    }),
  ],
  [
    'two knots',
    stageOf({
      knots: [
        { current: 0, voltage: 0 },
        { current: 1e-15, voltage: 20e3 },
      ],
    }),
  ],
  [
    'a lamp of no voltage',
    stageOf({
      knots: [
        { current: 0, voltage: 0 },
        { current: 1, voltage: 0 },
      ],
    }),
  ],
]

/** One knee, one valley, and 60 knots up the glow branch, so that one flash passes most of them. */
function longWayRound(): Knot[] {
  const glow = Array.from({ length: 61 }, (_, k) => ({
    current: 90e-6 * 10 ** (k / 30),
    voltage: 55 + 0.6 * k,
  }))
  return [{ current: 0, voltage: 0 }, { current: 1e-15, voltage: 75 }, ...glow]
}

/** Any stage a design allows, less what is next to nothing: under a nanovolt, a nano-ohm, a hundredth of a femtofarad. */
export const anyStage: fc.Arbitrary<Stage> = anyDesign.map(({ stage }) => {
  const whole = (value: number) => (value < 1e-9 ? 0 : value)
  const stray = stage.strayCapacitance
  return {
    ...stage,
    supplyVoltage: whole(stage.supplyVoltage),
    sourceResistance: whole(stage.sourceResistance),
    seriesResistance: whole(stage.seriesResistance),
    leadResistance: whole(stage.leadResistance),
    capacitance: stage.capacitance < 1e-17 ? 0 : stage.capacitance,
    ...(stray === undefined ? {} : { strayCapacitance: Math.max(1e-17, stray) }),
    lamp: {
      ...stage.lamp,
      knots: stage.lamp.knots.map((knot) => ({ ...knot, voltage: whole(knot.voltage) })),
    },
  }
})
