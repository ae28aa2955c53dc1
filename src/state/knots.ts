import type { Knot } from '../core'
import { designLimits, knotCount } from '../io/designLimits'
import { constrainNumber } from './constrain'

/** Least ratio between the currents of neighbouring knots that moving leaves. */
export const knotGap = 1.02

/** Least current that moving gives a knot, A: pre-strike currents begin at about a femtoamp. */
const leastCurrent = 1e-15

/** Knots after a change of their number, or why there is none. */
export type ChangedKnots =
  | { readonly ok: true; readonly knots: readonly Knot[] }
  | { readonly ok: false; readonly message: string }

/**
 * Where a knot can go that is wanted at some place: a factor of `knotGap` from its neighbours'
 * currents, 0 V … 20 kV. The first knot stays at the origin. Between neighbours closer than that,
 * and where a coordinate is no number, it keeps what it has.
 * @param index of a knot that exists; throws a RangeError otherwise
 */
export function constrainKnot(knots: readonly Knot[], index: number, wanted: Knot): Knot {
  const knot = knots[index]
  if (!knot) throw new RangeError(`There is no knot ${index}`)
  if (index === 0) return knot
  const below = Math.max(leastCurrent, (knots[index - 1]?.current ?? 0) * knotGap)
  const next = knots[index + 1]
  const above = next ? next.current / knotGap : designLimits.current.most
  const fits = !Number.isNaN(wanted.current) && below <= above
  return {
    current: fits ? Math.min(above, Math.max(below, wanted.current)) : knot.current,
    voltage: constrainNumber('voltage', wanted.voltage, knot.voltage),
  }
}

/** The knots with one of them moved as far as `constrainKnot` lets it. */
export function moveKnot(knots: readonly Knot[], index: number, wanted: Knot): readonly Knot[] {
  return knots.with(index, constrainKnot(knots, index, wanted))
}

/**
 * The knots with one more after `index`: on the line to the next, so that the characteristic stays
 * what it was, at the geometric middle of the two currents (half the next current after the
 * origin); after the last, at twice its current on the same slope.
 */
export function insertKnot(knots: readonly Knot[], index: number): ChangedKnots {
  const left = knots[index]
  if (!left) throw new RangeError(`There is no knot ${index}`)
  if (knots.length >= knotCount.most) {
    return refuse(`A characteristic has at most ${knotCount.most} knots.`)
  }
  const right = knots[index + 1]
  const added = right ? between(left, right) : beyond(knots)
  if (!added) {
    return refuse(
      right
        ? 'These two knots are too close together for another between them.'
        : 'The characteristic already ends at the greatest current there can be.',
    )
  }
  return { ok: true, knots: knots.toSpliced(index + 1, 0, added) }
}

/** The knots without one of them; the first must stay, and two at least. */
export function dropKnot(knots: readonly Knot[], index: number): ChangedKnots {
  if (!knots[index]) throw new RangeError(`There is no knot ${index}`)
  if (index === 0) return refuse('The first knot is the origin and stays.')
  if (knots.length <= knotCount.least) return refuse('A characteristic needs two knots at least.')
  return { ok: true, knots: knots.toSpliced(index, 1) }
}

function between(left: Knot, right: Knot): Knot | null {
  const current =
    left.current === 0 ? right.current / 2 : Math.sqrt(left.current) * Math.sqrt(right.current)
  const clear = current >= left.current * knotGap && current * knotGap <= right.current
  if (!(clear && current >= leastCurrent)) return null
  const part = (current - left.current) / (right.current - left.current)
  return { current, voltage: left.voltage + part * (right.voltage - left.voltage) }
}

function beyond(knots: readonly Knot[]): Knot | null {
  const last = knots.at(-1) as Knot
  const before = knots.at(-2) as Knot
  const current = Math.min(2 * last.current, designLimits.current.most)
  if (current < last.current * knotGap) return null
  const slope = (last.voltage - before.voltage) / (last.current - before.current)
  const voltage = last.voltage + slope * (current - last.current)
  return { current, voltage: constrainNumber('voltage', voltage, last.voltage) }
}

function refuse(message: string): ChangedKnots {
  return { ok: false, message }
}
