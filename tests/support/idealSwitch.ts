import type { Knot } from '../../src/core/index'
import { knotsOf } from './stages'

// A millionth of what any of the textbook circuits passes, and less.
const darkCurrent = 1e-15

/**
 * The textbook's neon lamp as a characteristic: open until `strike` V, then a battery of `extinction` V until
 * the current is all but gone. A dark branch that takes practically nothing stands for the open switch, a glow
 * branch that rises a nano-ohm's worth for the battery. The valley lies at 1 A, above anything that the
 * textbook's resistors pass, so that it always lets go: whether a real lamp would is not asked there.
 */
export function idealSwitch(strike: number, extinction: number): Knot[] {
  const slope = 1e-6
  return knotsOf(
    [0, 0],
    [darkCurrent, strike],
    [1, extinction],
    [1 + (1.1 * strike - extinction) / slope, 1.1 * strike],
  )
}

/**
 * The textbook's lamp with a glow resistance of `glow` Ω: open until `strike` V, then that resistance and
 * nothing else, a straight line through the origin, until the voltage is down to `extinction`.
 */
export function switchedResistance(strike: number, extinction: number, glow: number): Knot[] {
  return knotsOf(
    [0, 0],
    [darkCurrent, strike],
    [extinction / glow, extinction],
    [(1.1 * strike) / glow, 1.1 * strike],
  )
}
