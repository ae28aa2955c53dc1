import { line as pathMaker } from 'd3'
import {
  type Branches,
  equivalentSource,
  type LoadLine,
  loadCurrent,
  loadLineOf,
  type Phase,
  type Solution,
  type Stage,
} from '../core'
import type { Axis, CurrentAxis } from './axes'
import { characteristicPoints, loadLinePoints, type PlanePoint, stretchPoints } from './curves'

/** One rest or crossing to mark. */
export type Mark = {
  readonly x: number
  readonly y: number
  readonly current: number
  readonly stable: boolean
  readonly lit: boolean
}

/** A jump of the loop at one voltage, from x to x, px. */
export type Jump = {
  readonly from: number
  readonly to: number
  readonly y: number
  /** Which phase of the cycle it ends. */
  readonly phase: number
}

/** Everything drawn on the plane, as SVG paths and places in px. */
export type PlanePicture = {
  readonly characteristic: string
  /** The lamp alone, where a lead resistor makes it differ; empty otherwise. */
  readonly lampAlone: string
  readonly loadLine: string
  /** Shaded: where the load line may lie for the stage to flash. Empty without a window. */
  readonly region: string
  /** Its two edges; empty where there is none on that side. */
  readonly litEdge: string
  readonly darkEdge: string
  /** The dwelling stretches of the loop, and its jumps. */
  readonly loop: string
  readonly jumps: readonly Jump[]
  readonly marks: readonly Mark[]
}

/** What the plane is drawn from. */
export type PlaneInput = {
  readonly stage: Stage
  readonly solution: Solution
  readonly path: Branches
  readonly kind: CurrentAxis
  readonly x: Axis
  readonly y: Axis
}

/** Draws the plane. Points beyond the axes are left to the clip path. */
export function planePicture(input: PlaneInput): PlanePicture {
  const { stage, solution, path, kind, x, y } = input
  const draw = pathMaker<PlanePoint>(
    ([current]) => clampPixel(x.place(current)),
    ([, voltage]) => clampPixel(y.place(voltage)),
  ).digits(2)
  const text = (points: PlanePoint[]) => draw(points) ?? ''
  const own = loadLineOf(stage)
  const edges = edgeLines(stage, solution, own)
  const lit = edges.lit === null ? [] : loadLinePoints(edges.lit, kind, x.domain)
  const dark = edges.dark === null ? [] : loadLinePoints(edges.dark, kind, x.domain)
  return {
    characteristic: text(characteristicPoints(path, kind, x.domain)),
    lampAlone:
      stage.leadResistance > 0
        ? text(
            characteristicPoints(
              { ...path, level: stage.lamp.knots.map((knot) => knot.voltage) },
              kind,
              x.domain,
            ),
          )
        : '',
    loadLine: text(loadLinePoints(own, kind, x.domain)),
    region: dark.length > 0 ? `${text(regionPoints(dark, lit, x, own.voltage))}Z` : '',
    litEdge: text(lit),
    darkEdge: text(dark),
    ...loopOf(solution, input, text),
    marks: solution.operatingPoints.map((point) => ({
      x: x.place(point.current),
      y: y.place(point.capacitorVoltage),
      current: point.current,
      stable: point.stable,
      lit: point.lit,
    })),
  }
}

/** Keeps coordinates within what a browser draws; far beyond any plate. */
const clampPixel = (value: number) => Math.max(-1e5, Math.min(1e5, value))

/** The load lines at both ends of the window, as its resistances make them. */
export function edgeLines(
  stage: Stage,
  solution: Solution,
  own: LoadLine,
): { lit: LoadLine | null; dark: LoadLine | null } {
  const { window } = solution
  if (window === null) return { lit: null, dark: null }
  const at = (series: number): LoadLine => ({
    ...own,
    resistance: Math.max(1e-6, stage.sourceResistance + series),
  })
  return { lit: window.min > 0 ? at(window.min) : null, dark: at(window.max) }
}

/**
 * The band between two load lines: down one, and back up the other. Without the other it ends where load lines
 * of less and less resistance do: at the right end of the axis, and at the supply voltage.
 */
function regionPoints(
  dark: readonly PlanePoint[],
  lit: readonly PlanePoint[],
  x: Axis,
  supply: number,
): PlanePoint[] {
  const back = [...lit].reverse()
  if (back.length > 0) return [...dark, ...back]
  const [left, right] = x.domain
  return [...dark, [right, 0], [right, supply], [left, supply]]
}

/** The loop: along the branches in time, across them in no time. */
function loopOf(
  solution: Solution,
  { path, kind, x, y }: PlaneInput,
  text: (points: PlanePoint[]) => string,
): { loop: string; jumps: Jump[] } {
  const phases = solution.cycle?.phases ?? []
  const pieces: string[] = []
  const jumps: Jump[] = []
  phases.forEach((phase, index) => {
    pieces.push(text(phasePoints(phase, path, kind, x)))
    const next = phases[(index + 1) % phases.length]
    if (next === undefined) return
    const from = currentAtEnd(phase, phase.to)
    const to = currentAtEnd(next, next.from)
    if (Math.abs(to - from) > 1e-9 * Math.max(to, from)) {
      jumps.push({ from: x.place(from), to: x.place(to), y: y.place(phase.to), phase: index })
    }
  })
  return { loop: pieces.join(''), jumps }
}

const currentAtEnd = (phase: Phase, level: number) =>
  phase.anchorCurrent + phase.conductance * (level - phase.anchorLevel)

function phasePoints(phase: Phase, path: Branches, kind: CurrentAxis, x: Axis): PlanePoint[] {
  const piece = path.current.findIndex(
    (current, k) =>
      phase.kind !== 'waiting' &&
      current === phase.anchorCurrent &&
      path.level[k] === phase.anchorLevel,
  )
  if (piece < 0) {
    return [
      [currentAtEnd(phase, phase.from), phase.from],
      [currentAtEnd(phase, phase.to), phase.to],
    ]
  }
  return stretchPoints(path, piece, kind, x.domain, phase.from, phase.to)
}

/** Where the handle for the load line's slope stands, in parts of what the source gives with no current. */
const slopeShare = 0.3

/** Level at which the handle for the load line's slope stands, V: well down it, and in sight. */
export function slopeHandleLevel(line: LoadLine, voltage: Axis): number {
  const { voltage: open } = equivalentSource(line)
  const [low, high] = voltage.domain
  const room = high - low
  return Math.max(low + 0.06 * room, Math.min(slopeShare * open, high - 0.1 * room))
}

/**
 * That level once the load line is turned to pass `current` A there. Leakage makes it move with the resistance:
 * at its share of the open voltage a load line passes the rest of what the supply gives through that resistance.
 */
export function slopeLevelThrough(line: LoadLine, voltage: Axis, current: number): number {
  const resistance = ((1 - slopeShare) * line.voltage) / current
  return slopeHandleLevel({ ...line, resistance }, voltage)
}

/** Place of that handle, px, held within the plot. */
export function slopeHandle(
  line: LoadLine,
  x: Axis,
  y: Axis,
): { x: number; y: number; level: number } {
  const level = slopeHandleLevel(line, y)
  const at = x.place(Math.max(loadCurrent(line, level), 0))
  return { x: Math.max(x.range[0], Math.min(x.range[1], at)), y: y.place(level), level }
}
