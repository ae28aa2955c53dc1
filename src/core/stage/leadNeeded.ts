import { branchesOf } from './branches'
import type { Knot } from './lamp'
import { follow, type Pace } from './motion'
import { bisect } from './recovery'

/**
 * Lead resistance, Ω, that must not be reached if the stage is to flash, where more of it fitted has
 * straightened the falling region out; null where no smaller one makes it flash, or only within a hundredth,
 * which no part can be chosen to.
 *
 * As the lead resistor shrinks, the fate can change only where a fold opens, where two knots come to the same
 * voltage at the capacitor, or where the load line passes a knot: all of them a quotient. Between two of these
 * a look in the middle settles it, taken from the present resistance downwards. A recovery or a strike delay
 * moves the limit in between, so then there are more looks and the change found is halved down to rounding.
 */
export function leadNeeded(knots: readonly Knot[], pace: Pace, fitted: number): number | null {
  const { voltage, resistance, leakage } = pace.line
  const shrink = 1 + resistance * leakage
  const turns = new Set([0, fitted])
  const add = (lead: number) => {
    if (lead > 0 && lead < fitted) turns.add(lead)
  }
  for (const [index, knot] of knots.entries()) {
    if (index === 0) continue
    add(((voltage - knot.current * resistance) / shrink - knot.voltage) / knot.current)
    for (const other of knots.slice(index + 1)) {
      add((knot.voltage - other.voltage) / (other.current - knot.current))
    }
  }
  const flashes = (lead: number) => {
    const path = branchesOf(knots, lead)
    return path.top.length > 1 && follow(path, pace, null).kind === 'cycle'
  }
  const marks = [...turns].sort((a, b) => b - a)
  const looks = pace.recoveryTime > 0 || pace.wait !== null ? 16 : 1
  for (let k = 0; k + 1 < marks.length; k++) {
    const high = marks[k] as number
    const span = high - (marks[k + 1] as number)
    let short = flashes(high - span * 1e-9) ? null : high
    for (let n = 0; n < looks; n++) {
      const place = high - (span * (n + 0.5)) / looks
      if (!flashes(place)) {
        short = place
        continue
      }
      const limit = short === null ? high : bisect(place, short, flashes)
      if (flashes(limit * 0.99)) return limit
    }
  }
  return null
}
