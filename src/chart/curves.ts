import { type Branches, type LoadLine, loadCurrent } from '../core'
import type { CurrentAxis, Domain } from './axes'

/** A point of the plane: lamp current, A, and voltage across the capacitor, V. */
export type PlanePoint = readonly [current: number, voltage: number]

const stepsPerPiece = 28

/** Currents between two, even on a logarithmic axis. Both above 0. */
function between(from: number, to: number, steps: number): number[] {
  const ratio = to / from
  return Array.from({ length: steps + 1 }, (_, k) => from * ratio ** (k / steps))
}

/**
 * The characteristic as points to join. On a linear axis its knots; on a logarithmic one, where a straight
 * line is a curve, points along each piece from the left end of the domain.
 */
export function characteristicPoints(
  path: Branches,
  kind: CurrentAxis,
  domain: Domain,
): PlanePoint[] {
  const points: PlanePoint[] = []
  for (let k = 0; k + 1 < path.current.length; k++) {
    points.push(...piecePoints(path, k, kind, domain))
  }
  return points
}

/** The same for one piece: from knot `index` to the next. */
export function piecePoints(
  path: Branches,
  index: number,
  kind: CurrentAxis,
  domain: Domain,
): PlanePoint[] {
  const left = path.current[index] ?? 0
  const right = path.current[index + 1] ?? 0
  const low = path.level[index] ?? 0
  const slope = ((path.level[index + 1] ?? 0) - low) / (right - left)
  const at = (current: number): PlanePoint => [current, low + slope * (current - left)]
  if (kind === 'linear') return [at(left), at(right)]
  const from = Math.max(left, domain[0])
  return from < right ? between(from, right, stepsPerPiece).map(at) : []
}

/** The stretch of one piece between two levels, for the loop. */
export function stretchPoints(
  path: Branches,
  index: number,
  kind: CurrentAxis,
  domain: Domain,
  from: number,
  to: number,
): PlanePoint[] {
  const left = path.current[index] ?? 0
  const right = path.current[index + 1] ?? 0
  const low = path.level[index] ?? 0
  const high = path.level[index + 1] ?? 0
  const current = (level: number) => left + ((level - low) / (high - low)) * (right - left)
  if (kind === 'linear') {
    return [
      [current(from), from],
      [current(to), to],
    ]
  }
  const ends = [Math.max(current(from), domain[0]), Math.max(current(to), domain[0])] as const
  if (ends[0] === ends[1]) return [[ends[0], to]]
  return between(ends[0], ends[1], stepsPerPiece).map((value) => [
    value,
    low + ((high - low) * (value - left)) / (right - left),
  ])
}

/**
 * A load line as points to join, from the left end of the domain down to 0 V or the right end. Points are
 * taken evenly in voltage *and* in current, since on a logarithmic axis it lies flat first and then plunges.
 */
export function loadLinePoints(line: LoadLine, kind: CurrentAxis, domain: Domain): PlanePoint[] {
  const open = line.voltage / (1 + line.resistance * line.leakage)
  const level = (current: number) => open - (current * open) / short
  const short = loadCurrent(line, 0)
  if (!(short > 0)) return [[domain[0], 0]]
  if (kind === 'linear') {
    return [
      [0, open],
      [short, 0],
    ]
  }
  const steps = 64
  const currents = new Set<number>()
  if (short > domain[0]) for (const value of between(domain[0], short, steps)) currents.add(value)
  for (let k = 0; k < steps; k++) {
    const current = loadCurrent(line, (open * k) / steps)
    if (current > domain[0]) currents.add(current)
  }
  return [...currents]
    .sort((a, b) => a - b)
    .map((current) => [current, Math.max(0, level(current))])
}
