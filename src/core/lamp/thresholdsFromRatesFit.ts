import { inverseOf, normalMatrix, timesVector } from './thresholdsFromRatesMatrix'
import {
  gradient,
  misfit,
  type Problem,
  residuals,
  type Unknowns,
} from './thresholdsFromRatesProblem'

/** The best unknowns, and how badly they fit. */
export type BestFit = { readonly unknowns: Unknowns; readonly misfit: number }

const levels = 40
const startsTried = 4

/**
 * Least squares over all counts. The whole range of both thresholds is looked over first on a grid, close
 * together where strike comes near the lowest supply, and the best few places are each followed down by
 * damped Gauss–Newton steps, so that no start has to be guessed. Null where no pair of thresholds lets the
 * lamp flash at every supply.
 */
export function bestFit(problem: Problem): BestFit | null {
  let best: BestFit | null = null
  for (const start of startsOf(problem)) {
    const found = descend(problem, start)
    if (best === null || found.misfit < best.misfit) best = found
  }
  return best
}

/** The best places of the grid, no two next to each other. */
function startsOf(problem: Problem): BestFit[] {
  const lowest = Math.min(...problem.observations.map(({ supplyVoltage }) => supplyVoltage))
  const parts = new Array<number>(problem.uncertainParts).fill(0)
  const places: (BestFit & { readonly row: number; readonly column: number })[] = []
  for (let row = 0; row < levels; row++) {
    for (let column = 0; column < levels; column++) {
      const strike = lowest * spacing(row)
      const unknowns = [strike, strike * spacing(column), ...parts]
      const value = misfit(problem, unknowns)
      if (Number.isFinite(value)) places.push({ unknowns, misfit: value, row, column })
    }
  }
  places.sort((a, b) => a.misfit - b.misfit)
  const chosen: typeof places = []
  for (const place of places) {
    const isNew = chosen.every(
      ({ row, column }) => Math.abs(row - place.row) > 1 || Math.abs(column - place.column) > 1,
    )
    if (isNew) chosen.push(place)
    if (chosen.length === startsTried) break
  }
  return chosen
}

/** From near 0 to near 1, closer together towards both ends. */
function spacing(step: number): number {
  return 1 / (1 + Math.exp(-12 * ((step + 0.5) / levels - 0.5)))
}

/** Follows the misfit down: Gauss–Newton steps, damped after Levenberg and Marquardt. */
function descend(problem: Problem, start: BestFit): BestFit {
  let here = start
  let damping = 1e-3
  for (let step = 0; step < 200; step++) {
    const moved = stepFrom(problem, here, damping)
    if (moved === null) return here
    const gain = here.misfit - moved.fit.misfit
    here = moved.fit
    damping = Math.max(1e-14, moved.damping / 8)
    // Close by, each step gains squarely: what is left to gain is smaller still.
    if (gain <= 1e-10 * here.misfit || here.misfit < 1e-20) return here
  }
  return here
}

/** The first step down, damped harder until it is one; null where none is. */
function stepFrom(
  problem: Problem,
  here: BestFit,
  damping: number,
): { readonly fit: BestFit; readonly damping: number } | null {
  const { unknowns } = here
  const count = problem.observations.length
  const rows = weightedRows(problem, unknowns)
  const normal = normalMatrix(rows, priorOf(unknowns))
  const off = residuals(problem, unknowns)
  const pull = unknowns.map((_, k) =>
    rows.reduce(
      (sum, row, i) => sum + (row[k] as number) * (off[i] as number),
      k < 2 ? 0 : (off[count + k - 2] as number),
    ),
  )
  for (let factor = damping; factor < 1e8; factor *= 8) {
    const damped = normal.map((row, i) =>
      row.map((value, j) => (i === j ? value * (1 + factor) : value)),
    )
    const inverse = inverseOf(damped)
    if (inverse === null) continue
    const change = timesVector(inverse, pull)
    const next = unknowns.map((value, k) => value + (change[k] as number))
    const fit = { unknowns: next, misfit: misfit(problem, next) }
    if (fit.misfit < here.misfit) return { fit, damping: factor }
  }
  return null
}

/** What holds each unknown by itself: nothing the thresholds, their own deviations the parts. */
export function priorOf(unknowns: Unknowns): number[] {
  return unknowns.map((_, k) => (k < 2 ? 0 : 1))
}

/** Slopes of every count expected, in its standard deviations. */
export function weightedRows(problem: Problem, unknowns: Unknowns): number[][] {
  return problem.observations.map((seen) => {
    const deviation = problem.deviation(seen, seen.flashes)
    return gradient(problem, seen, unknowns).map((slope) => slope / deviation)
  })
}
