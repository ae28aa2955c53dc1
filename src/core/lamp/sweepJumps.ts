import type { SweepPoint } from './sweepPoint'

/** Points on either side of a jump that bound it. */
const beside = 4

/** Jumps at most that are looked after; the greatest count. */
const mostJumps = 40

/**
 * Which points, by their index, stand beside a jump of the lamp: from one to the next, in the same
 * direction, the voltage went one way and the current the other, by far more than from point to
 * point elsewhere.
 */
export function besideJumps(points: readonly SweepPoint[]): ReadonlySet<number> {
  const moves: { readonly at: number; readonly size: number }[] = []
  let highest = 0
  for (let i = 1; i < points.length; i++) {
    const here = points[i] as SweepPoint
    const before = points[i - 1] as SweepPoint
    highest = Math.max(highest, here.voltage)
    if (here.direction !== before.direction) continue
    const volts = here.voltage - before.voltage
    const against = volts * (here.current - before.current) < 0
    moves.push({ at: i, size: against ? Math.abs(volts) : 0 })
  }
  const sizes = moves.map(({ size }) => size).sort((a, b) => a - b)
  const usual = sizes[Math.floor(0.9 * sizes.length)] ?? 0
  const least = Math.max(6 * usual, 0.03 * highest)
  const jumps = moves.filter(({ size }) => size > least).sort((a, b) => b.size - a.size)
  const found = new Set<number>()
  for (const { at } of jumps.slice(0, mostJumps)) {
    for (let i = at - beside; i < at + beside; i++) if (i >= 0 && i < points.length) found.add(i)
  }
  return found
}
