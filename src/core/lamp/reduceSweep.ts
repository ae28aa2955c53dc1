import { chooseShear } from './fit/sheared'
import { besideJumps } from './sweepJumps'
import type { Direction, SweepPoint } from './sweepPoint'

/** A sweep with its crowded points averaged. */
export type ReducedSweep = {
  readonly points: readonly SweepPoint[]
  /** How many of them stand for several points each; 0 where the sweep came back as it was. */
  readonly averaged: number
}

/** Points beyond which a sweep is reduced, and about how many are left then. */
const enough = 600

/** A bin closes where its voltage has moved by this part of the greatest. */
const widest = 0.02

/**
 * A sweep of very many points as some hundreds: neighbours on the curve that were taken in the same
 * direction become their mean, with the standard error of a mean of independent errors. Bins are
 * narrow where points are many, and otherwise even in the logarithm of the level, which for a lit
 * lamp is that of the current. Points beside a jump stay as they are: they bound strike and
 * extinction. A sweep of 600 points or fewer comes back unchanged.
 */
export function reduceSweep(points: readonly SweepPoint[]): ReducedSweep {
  const shear = points.length <= enough ? null : chooseShear(points)
  if (shear === null) return { points, averaged: 0 }
  const kept = besideJumps(points)
  const alone = points.filter((_, i) => kept.has(i))
  const others = points.filter((_, i) => !kept.has(i))
  const bins = (['up', 'down'] as const).flatMap((direction) => binned(others, direction, shear))
  const reduced = [...alone, ...bins.map(meanOf)].sort((a, b) => a.row - b.row)
  return { points: reduced, averaged: bins.filter((bin) => bin.length > 1).length }
}

/** The points of one direction in bins along the curve. */
function binned(
  points: readonly SweepPoint[],
  direction: Direction,
  shear: number,
): readonly (readonly SweepPoint[])[] {
  const own = points
    .filter((point) => point.direction === direction)
    .map((point) => ({ point, level: point.voltage + shear * point.current }))
    .sort((a, b) => a.level - b.level)
  const last = own.at(-1)
  if (!last) return []
  // An even share of the points, and an even share of the way, both from a twentieth of the end on.
  const first = own[0]?.level ?? 0
  const place = (level: number) => Math.log((level - first) / last.level + 0.05) / Math.log(21)
  const height = own.reduce((most, { point }) => Math.max(most, point.voltage), 0)
  const bins: SweepPoint[][] = []
  let share = 1
  let start = 0
  for (const [i, { point, level }] of own.entries()) {
    const before = own[i - 1]?.level ?? level
    share += (enough / 4) * (1 / own.length + place(level) - place(before))
    const bin = bins.at(-1)
    if (bin && share < 1 && Math.abs(point.voltage - start) < widest * height) {
      bin.push(point)
      continue
    }
    bins.push([point])
    share = 0
    start = point.voltage
  }
  return bins
}

/** The mean of some points, with the row of the middle one. */
function meanOf(bin: readonly SweepPoint[]): SweepPoint {
  const count = bin.length
  const mean = (value: (point: SweepPoint) => number) =>
    bin.reduce((sum, point) => sum + value(point), 0) / count
  const middle = bin[count >> 1] as SweepPoint
  return {
    current: mean(({ current }) => current),
    voltage: mean(({ voltage }) => voltage),
    sigmaCurrent: Math.sqrt(mean(({ sigmaCurrent }) => sigmaCurrent ** 2) / count),
    sigmaVoltage: Math.sqrt(mean(({ sigmaVoltage }) => sigmaVoltage ** 2) / count),
    covariance: mean(({ covariance = 0 }) => covariance) / count,
    direction: middle.direction,
    row: middle.row,
  }
}
