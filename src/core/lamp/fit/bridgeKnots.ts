import type { Knot } from '../../stage/lamp'
import type { SweepPoint } from '../sweepPoint'
import { type BranchEnd, kneeEnd, valleyEnd } from './bridgeEnds'
import type { Shape } from './shape'

/** Knots with their standard errors, and what is known of where knee and valley end. */
export type Bridged = {
  readonly knots: readonly Knot[]
  readonly sigma: readonly Knot[]
  /** Least and greatest the strike voltage may be, V. */
  readonly kneeVoltage: readonly [number, number]
  /** Least and greatest the valley's current may be, A. */
  readonly valleyCurrent: readonly [number, number]
  readonly notes: readonly string[]
}

/** The fit of the two sides. */
export type Sides = {
  readonly knots: readonly Knot[]
  readonly sigma: readonly Knot[]
  readonly shape: Shape
  /** Ω; the level of a point is its voltage and this times its current. */
  readonly shear: number
  /** How many points the straight piece passes over. */
  readonly bridged: number
}

/** An end moved to where it most likely is, with its error and the range it lies in. */
type End = {
  readonly knot: Knot
  readonly sigma: Knot
  readonly range: readonly [number, number]
  readonly note: string | null
}

/**
 * Puts the ends of dark and glow branch where the sweep's steps leave them: in the middle of the
 * step in which the lamp struck, and of the one in which it went out, each on its branch drawn on
 * straight. A place anywhere in a range as likely as any other has a standard error of the range
 * over √12, or over √3 when counted from the range's end; the last reading's own error and that of
 * the fit are added in quadrature.
 */
export function bridgeKnots(points: readonly SweepPoint[], sides: Sides): Bridged {
  const { knots, sigma, shape, shear, bridged } = sides
  const { knee } = shape
  const level = ({ current, voltage }: SweepPoint) => voltage + shear * current
  const isDark = (point: SweepPoint) => level(point) <= (shape.levels[knee] as number)
  const isLit = (point: SweepPoint) => level(point) >= (shape.levels[knee + 1] as number)
  const top = endOfDark(knots, sigma, knee, kneeEnd(points, isDark))
  const foot = endOfGlow(knots, sigma, knee + 1, top.knot, valleyEnd(points, isLit))
  const passedOver =
    bridged === 0
      ? 'No reading lies in the falling region, so it is drawn straight from knee to valley: the steps of the sweep passed over it, or the series resistor was too small to hold the lamp there.'
      : 'The readings in the falling region are of one setting only and do not show its slope, so it is drawn straight from knee to valley without them: smaller steps there would show it.'
  return {
    knots: knots.with(knee, top.knot).with(knee + 1, foot.knot),
    sigma: sigma.with(knee, top.sigma).with(knee + 1, foot.sigma),
    kneeVoltage: top.range,
    valleyCurrent: foot.range,
    notes: [passedOver, top.note, foot.note].filter((note) => note !== null),
  }
}

/** The knee: half a step above the highest dark reading before a strike. */
function endOfDark(
  knots: readonly Knot[],
  sigmas: readonly Knot[],
  knee: number,
  strike: BranchEnd | null,
): End {
  const knot = knots[knee] as Knot
  const sigma = sigmas[knee] as Knot
  if (!strike || strike.reach === null) {
    return {
      knot,
      sigma: { current: sigma.current, voltage: Number.POSITIVE_INFINITY },
      range: [knot.voltage, Number.POSITIVE_INFINITY],
      note: 'The lamp is not seen striking in steps upwards, so the strike voltage is only known to be above the highest dark reading.',
    }
  }
  const { last, reach } = strike
  const before = knots[knee - 1] as Knot
  const after = knots[knee + 1] as Knot
  // A last piece that is nearly flat says nothing of how far the branch goes on.
  const slope = Math.max(slopeOf(before, knot), (0.1 * knot.voltage) / knot.current)
  const far = within(
    last.voltage + reach / 2 - knot.voltage,
    (before.voltage - knot.voltage) / 2,
    (slope * (after.current - knot.current)) / 2,
  )
  const spread = Math.hypot(reach / Math.sqrt(12), last.sigmaVoltage)
  return {
    knot: { current: knot.current + far / slope, voltage: knot.voltage + far },
    sigma: widened(sigma, spread / slope, slope),
    range: [last.voltage, last.voltage + reach],
    note: null,
  }
}

/** The valley: half a step below the least lit current before the lamp went out. */
function endOfGlow(
  knots: readonly Knot[],
  sigmas: readonly Knot[],
  valley: number,
  knee: Knot,
  out: BranchEnd | null,
): End {
  const knot = knots[valley] as Knot
  const sigma = sigmas[valley] as Knot
  const after = knots[valley + 1] as Knot
  const slope = slopeOf(knot, after)
  const room = knot.current - knee.current
  if (!out || out.reach === null) {
    return {
      knot,
      sigma: widened(sigma, room / Math.sqrt(3), slope),
      range: [knee.current, knot.current],
      note: 'The lamp is not seen going out in steps downwards, so the valley may lie at any lower current than the least lit reading.',
    }
  }
  const { last, reach } = out
  const far = within(
    last.current - reach / 2 - knot.current,
    -room / 2,
    (after.current - knot.current) / 2,
  )
  const spread = Math.hypot(reach / Math.sqrt(12), last.sigmaCurrent)
  return {
    knot: { current: knot.current + far, voltage: Math.max(0, knot.voltage + slope * far) },
    sigma: widened(sigma, spread, slope),
    range: [Math.max(knee.current, last.current - reach), last.current],
    note: null,
  }
}

function within(value: number, low: number, high: number): number {
  return Math.min(high, Math.max(low, value))
}

/** Ω. */
function slopeOf(from: Knot, to: Knot): number {
  return (to.voltage - from.voltage) / (to.current - from.current)
}

/** A standard error with a spread in current along a piece of that slope added. */
function widened(sigma: Knot, spread: number, slope: number): Knot {
  return {
    current: Math.hypot(sigma.current, spread),
    voltage: Math.hypot(sigma.voltage, spread * slope),
  }
}
