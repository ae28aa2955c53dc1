import {
  type Branches,
  equivalentSource,
  type Knot,
  kneeIndexOf,
  loadLineOf,
  nearestPreferred,
  nextPreferred,
  resistanceThrough,
  type Series,
  type Stage,
} from '../core'
import type { Axis } from './axes'
import { slopeHandle, slopeLevelThrough } from './planePicture'

/** What can be grabbed on the plane. */
export type HandleId = 'supply' | 'slope' | `knot-${number}`

/** One handle: where it is and what it is called. */
export type Handle = {
  readonly id: HandleId
  readonly name: string
  readonly tone: 'circuit' | 'lamp'
  readonly x: number
  readonly y: number
}

/** What a move of a handle changes. SI values. */
export type Edit =
  | { readonly kind: 'supply'; readonly voltage: number }
  | { readonly kind: 'series'; readonly resistance: number }
  | { readonly kind: 'knot'; readonly index: number; readonly knot: Knot }

/** Preferred values that resistor and capacitor keep to, or any value. */
export type PartChoice = 'any' | Series

/** The axes handles live on. */
export type HandleSetting = {
  readonly stage: Stage
  readonly path: Branches
  readonly x: Axis
  readonly y: Axis
  readonly choice: PartChoice
}

/** Index of a knot's handle; −1 for the load line's. */
export const knotOf = (id: HandleId): number => (id.startsWith('knot-') ? Number(id.slice(5)) : -1)

/** What a knot is called: knee and valley by name, the others by number. */
export function knotName(knots: readonly Knot[], index: number): string {
  const knee = kneeIndexOf(knots)
  if (index === knee) return 'Knee'
  if (knee !== null && index > knee) {
    const valley = knots.findIndex(
      (knot, k) => k > knee && (knots[k + 1]?.voltage ?? Number.POSITIVE_INFINITY) > knot.voltage,
    )
    if (index === valley) return 'Valley'
  }
  return `Knot ${index + 1}`
}

/**
 * All handles in sight: supply end, slope, and each knot but the first, which stays at nothing. One being
 * dragged stays in sight at the edge, wherever it has gone.
 */
export function handlesOf(
  { stage, path, x, y }: HandleSetting,
  dragged: HandleId | null = null,
): Handle[] {
  const line = loadLineOf(stage)
  const slope = slopeHandle(line, x, y)
  const handles: Handle[] = [
    {
      id: 'supply',
      name: 'Supply end of the load line',
      tone: 'circuit',
      x: x.range[0],
      y: y.place(equivalentSource(line).voltage),
    },
    { id: 'slope', name: 'Slope of the load line', tone: 'circuit', x: slope.x, y: slope.y },
  ]
  for (let k = 1; k < path.current.length; k++) {
    handles.push({
      id: `knot-${k}`,
      name: knotName(stage.lamp.knots, k),
      tone: 'lamp',
      x: x.place(path.current[k] ?? 0),
      y: y.place(path.level[k] ?? 0),
    })
  }
  const [left, right] = x.range
  const [floor, top] = y.range
  return handles.flatMap((handle) => {
    if (handle.id === dragged) {
      const held = (at: number, low: number, high: number) => Math.max(low, Math.min(high, at))
      return { ...handle, x: held(handle.x, left, right), y: held(handle.y, top, floor) }
    }
    const seen =
      handle.x >= left - 1 && handle.x <= right + 1 && handle.y <= floor + 1 && handle.y >= top - 1
    return seen ? handle : []
  })
}

/** Rounds to the nearest 1, 2 or 5 of a power of ten that is no more than `step`. */
export function tidy(value: number, step: number): number {
  const power = Math.floor(Math.log10(step))
  const lead = step / 10 ** power
  const unit = lead >= 5 ? 5 : lead >= 2 ? 2 : 1
  const count = Math.round(value / (unit * 10 ** power))
  // Finer than a number can say.
  if (!(Math.abs(count) < 1e15)) return value
  return Number(`${count * unit}e${power}`)
}

const toFigures = (value: number, figures: number) => Number(value.toPrecision(figures))

/** Three figures of a value above 0, or as many more as it takes to miss it by less than half of `step`. */
function toFiguresWithin(value: number, step: number): number {
  const needed = Math.floor(Math.log10(value)) + 1 - Math.floor(Math.log10(step))
  return toFigures(value, Math.min(15, Math.max(3, needed)))
}

/** What a handle means where it is put: `at` in px on the plane. Null where it cannot go. */
export function placeHandle(
  setting: HandleSetting,
  id: HandleId,
  at: { readonly x: number; readonly y: number },
): Edit | null {
  const { stage, x, y, choice } = setting
  const line = loadLineOf(stage)
  const pixel = Math.abs(y.value(0) - y.value(1))
  if (id === 'supply') {
    const open = Math.max(0, y.value(at.y))
    const voltage = tidy(open * (1 + line.resistance * line.leakage), pixel)
    return { kind: 'supply', voltage: Math.min(20e3, Math.max(0, voltage)) }
  }
  const current = x.value(Math.max(x.range[0] + 0.5, Math.min(x.range[1], at.x)))
  const besides = x.value(x.place(current) + 1)
  if (id === 'slope') {
    return seriesThrough(stage, slopeLevelThrough(line, y, current), current, choice, besides)
  }
  const index = knotOf(id)
  const tidyCurrent = toFiguresWithin(current, besides - current)
  const level = Math.max(0, y.value(at.y))
  const voltage = Math.max(0, tidy(level - stage.leadResistance * tidyCurrent, pixel))
  return { kind: 'knot', index, knot: { current: tidyCurrent, voltage } }
}

/**
 * The series resistance that takes the load line through a point of the plane, kept to preferred values or else
 * to three figures; to more, if `besides` is given, where three would miss the point by as much as that current.
 */
export function seriesThrough(
  stage: Stage,
  level: number,
  current: number,
  choice: PartChoice,
  besides?: number,
): Edit | null {
  const leakage = 1 / stage.leakageResistance
  const total = resistanceThrough(stage.supplyVoltage, leakage, level, current)
  const series = total - stage.sourceResistance
  if (!(series > 0 && Number.isFinite(series))) return null
  const kept = Math.min(1e13, Math.max(1, series))
  const step =
    besides === undefined
      ? kept
      : total - resistanceThrough(stage.supplyVoltage, leakage, level, besides)
  const resistance =
    choice === 'any' ? toFiguresWithin(kept, step) : (nearestPreferred(kept, choice) ?? kept)
  return { kind: 'series', resistance }
}

/** The series resistance that takes the load line through a place on the plane, px. */
export function lineThrough(
  { stage, x, y, choice }: HandleSetting,
  at: { readonly x: number; readonly y: number },
): Edit | null {
  const across = Math.max(x.range[0] + 0.5, Math.min(x.range[1], at.x))
  return seriesThrough(stage, y.value(at.y), x.value(across), choice, x.value(across + 1))
}

/** One key press: along the voltage axis or the current axis, a fine step or a coarse one. */
export type Step = {
  readonly along: 'voltage' | 'current'
  readonly direction: 'up' | 'down'
  readonly coarse: boolean
}

/** What a step of a handle changes. */
export function stepHandle(setting: HandleSetting, id: HandleId, step: Step): Edit | null {
  const { stage, choice } = setting
  const sign = step.direction === 'up' ? 1 : -1
  if (id === 'supply') {
    const voltage = Math.min(20e3, Math.max(0, stage.supplyVoltage + sign * (step.coarse ? 10 : 1)))
    return { kind: 'supply', voltage: Number(voltage.toFixed(6)) }
  }
  if (id === 'slope') {
    return {
      kind: 'series',
      resistance: steppedPart(stage.seriesResistance, choice, step, 1, 1e13),
    }
  }
  const index = knotOf(id)
  const knot = stage.lamp.knots[index]
  if (knot === undefined) return null
  if (step.along === 'voltage') {
    const voltage = Math.max(0, knot.voltage + sign * (step.coarse ? 5 : 0.5))
    return { kind: 'knot', index, knot: { ...knot, voltage: Number(voltage.toFixed(6)) } }
  }
  const factor = step.coarse ? 1.25 : 1.02
  const current = toFigures(sign > 0 ? knot.current * factor : knot.current / factor, 4)
  return { kind: 'knot', index, knot: { ...knot, current } }
}

/** The next value of a part: the neighbour in its series (a decade when coarse), else 1 or 10 per cent. */
export function steppedPart(
  value: number,
  choice: PartChoice,
  { direction, coarse }: Pick<Step, 'direction' | 'coarse'>,
  least: number,
  most: number,
): number {
  let next: number
  if (choice !== 'any' && !coarse) {
    next = nextPreferred(value, choice, direction) ?? value
  } else if (choice !== 'any') {
    next = toFigures(direction === 'up' ? value * 10 : value / 10, 4)
  } else {
    const factor = coarse ? 1.1 : 1.01
    next = toFigures(direction === 'up' ? value * factor : value / factor, 4)
  }
  return Math.min(most, Math.max(least, next))
}
