import type { Knot } from '../stage/lamp'
import { rmsOf } from './fit/alongShape'
import { bridgeKnots } from './fit/bridgeKnots'
import { chooseShape } from './fit/chooseShape'
import { knotErrors, knotsOf } from './fit/knotErrors'
import { chooseShear, shearPoints } from './fit/sheared'
import type { CommonError, SweepPoint } from './sweepPoint'

/** What a fit may be told. */
export type FitOptions = {
  /** Knots at least, the origin counted; 4 if absent and never fewer. */
  readonly leastKnots?: number
  /** Knots at most, the origin counted; 8 if absent and never more. */
  readonly mostKnots?: number
  /** Whether the points' errors are known, or only how they compare with each other (if absent). */
  readonly errors?: 'given' | 'estimated'
  /** Errors all points share. */
  readonly common?: CommonError
}

/** A characteristic drawn through the points of a sweep, or why there is none. */
export type CharacteristicFit =
  | {
      readonly ok: true
      /** The characteristic; the first knot is (0, 0), the last at the greatest reading. */
      readonly knots: readonly Knot[]
      /**
       * Standard error of each knot's current, A, and voltage, V; 0 for the first. Infinite where
       * the sweep sets no bound.
       */
      readonly sigma: readonly Knot[]
      /** Which knot is the knee, and which the valley. */
      readonly knee: number
      readonly valley: number
      /** Root mean square distance of the points from the fit, V, along load lines of `shear`. */
      readonly rms: number
      /** Squares of the distances over the points' errors, summed, and points less free numbers. */
      readonly chiSquare: number
      readonly freedom: number
      /** What the points' errors were multiplied by to agree with their scatter; 1: as given. */
      readonly errorScale: number
      /** How the number of knots was chosen: the least value won. */
      readonly criterion: {
        readonly name: 'Bayesian information criterion'
        readonly values: readonly { readonly knots: number; readonly value: number }[]
      }
      /**
       * Whether it is sure that no knots at the places tried do better; false where the readings
       * scatter so much that the search was cut short and what it had found by then stands.
       */
      readonly proven: boolean
      /** Whether readings lie in the falling region, or it is a straight line between its ends. */
      readonly fallingRegion: 'measured' | 'bridged'
      /** Least and greatest the strike voltage may be, V; only where the region is bridged. */
      readonly kneeVoltage: readonly [number, number] | null
      /** Least and greatest the valley's current may be, A; only where the region is bridged. */
      readonly valleyCurrent: readonly [number, number] | null
      /** The load lines along which distances were taken, Ω. */
      readonly shear: number
      /** Sentences about what the sweep could not show; often empty. */
      readonly notes: readonly string[]
    }
  | { readonly ok: false; readonly message: string }

/** Readings at least: fewer cannot fix the three straight pieces of a lamp. */
export const leastPoints = 8

/**
 * Fits a characteristic of straight lines to the points of a sweep: rising, falling, rising. For
 * each number of knots it is the best of all those with knots among up to some forty places along
 * the sweep, found by dynamic programming and then moved off those places to where the squares are
 * least; the number is that with the least Bayesian information criterion (Schwarz, Annals of
 * Statistics 6 (1978) 461 [from memory]). Errors of voltage and current both count.
 */
export function fitCharacteristic(
  points: readonly SweepPoint[],
  options: FitOptions = {},
): CharacteristicFit {
  const steps = fittingCharacteristic(points, options)
  for (;;) {
    const step = steps.next()
    if (step.done) return step.value
  }
}

/** The same in steps, for one who wants to stop between: gives the part done, 0 … 1. */
export function* fittingCharacteristic(
  points: readonly SweepPoint[],
  options: FitOptions = {},
): Generator<number, CharacteristicFit> {
  const fault = faultInPoints(points)
  if (fault !== null) return { ok: false, message: fault }
  const shear = chooseShear(points)
  if (shear === null) return { ok: false, message: 'No reading has a lamp current above zero.' }
  const least = Math.max(4, options.leastKnots ?? 4)
  const most = Math.min(8, Math.max(least, options.mostKnots ?? 8))
  const chosen = yield* chooseShape(shearPoints(points, shear), {
    leastKnots: least,
    mostKnots: most,
    errors: options.errors ?? 'estimated',
  })
  if (!chosen.ok) return chosen
  const { sheared, shape, free, bridged, errorScale } = chosen
  const sigma = knotErrors(sheared, shape, free, errorScale, options.common)
  if (!sigma) {
    return { ok: false, message: 'The readings are too few or too alike to fix the knots.' }
  }
  const knots = knotsOf(shape, shear)
  const ends =
    bridged === null ? null : bridgeKnots(points, { knots, sigma, shape, shear, bridged })
  const final = ends ?? { knots, sigma, notes: [] }
  return {
    ok: true,
    knots: final.knots,
    sigma: final.sigma,
    knee: shape.knee,
    valley: shape.valley,
    rms: rmsOf(sheared, shape),
    chiSquare: chosen.cost,
    freedom: sheared.level.length - free.length,
    errorScale,
    criterion: { name: 'Bayesian information criterion', values: chosen.values },
    proven: chosen.proven,
    fallingRegion: ends ? 'bridged' : 'measured',
    kneeVoltage: ends?.kneeVoltage ?? null,
    valleyCurrent: ends?.valleyCurrent ?? null,
    shear,
    notes: [...final.notes, ...notesOn(final, shape.knee, errorScale, options)],
  }
}

/** Why no fit can be tried; null if it can. */
function faultInPoints(points: readonly SweepPoint[]): string | null {
  if (points.length < leastPoints) {
    const found = points.length === 1 ? 'there is 1' : `there are ${points.length}`
    return `A fit needs ${leastPoints} usable readings at least; ${found}.`
  }
  const first = points[0] as SweepPoint
  if (points.every((p) => p.current === first.current && p.voltage === first.voltage)) {
    return 'All the readings are the same: turn the supply up and down while taking them.'
  }
  for (const { current, voltage, sigmaCurrent, sigmaVoltage, row } of points) {
    if (![current, voltage, sigmaCurrent].every(Number.isFinite) || !(sigmaVoltage > 0)) {
      return `Row ${row} is no point of a sweep: it lacks a number, or an error of its voltage.`
    }
  }
  return null
}

function notesOn(
  { knots, sigma }: { readonly knots: readonly Knot[]; readonly sigma: readonly Knot[] },
  knee: number,
  errorScale: number,
  options: FitOptions,
): readonly string[] {
  const notes: string[] = []
  if ((knots[knee]?.current ?? 0) < 2 * (sigma[knee]?.current ?? 0)) {
    notes.push('The dark current is too small for this sweep to tell it from none.')
  }
  if (options.errors === 'given' && errorScale > 1) {
    notes.push(
      `The readings scatter ${errorScale.toPrecision(2)} times as much as the errors given; the uncertainties were widened to match.`,
    )
  }
  return notes
}
