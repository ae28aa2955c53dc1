import type { Knot } from '../stage/lamp'

/**
 * A characteristic carried straight on past its last knot, on the slope of its last piece, until it reaches
 * `voltage` V: a guess, for a sweep that ended below strike voltage, where a flash begins. The same knots
 * where they reach that far already; null where the last piece does not rise, so that it never would.
 */
export function extendGlow(knots: readonly Knot[], voltage: number): readonly Knot[] | null {
  const last = knots.at(-1)
  const before = knots.at(-2)
  if (last === undefined || before === undefined) return null
  if (last.voltage >= voltage) return knots
  const slope = (last.voltage - before.voltage) / (last.current - before.current)
  if (!(slope > 0)) return null
  return [...knots, { current: last.current + (voltage - last.voltage) / slope, voltage }]
}
