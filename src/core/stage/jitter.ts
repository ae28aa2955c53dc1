import { type Branches, currentOn, pieceAt } from './branches'
import { landingAbove } from './landing'
import { type LoadLine, loadCurrent } from './loadLine'
import { levelIn, type Phase, timeBetween } from './phase'

/** What the random wait before each strike makes of the period. */
export type Jitter = {
  /** Standard deviation of the period, s. */
  readonly periodDeviation: number
  /** Mean of the period over the random waits, s; not quite the period at the mean wait. */
  readonly meanPeriod: number
  /** Chance, per cycle, that a long wait carries the strike off the end of the characteristic, 0 … 1. */
  readonly overRangeChance: number
}

/** The jitter of a lamp that strikes without delay: none. `period` in s. */
export function noJitter(period: number): Jitter {
  return { periodDeviation: 0, meanPeriod: period, overRangeChance: 0 }
}

// Abscissae and weights of Gauss–Legendre quadrature of order 8 [Abramowitz & Stegun, table 25.4].
const abscissae = [0.1834346424956498, 0.525532409916329, 0.7966664774136267, 0.9602898564975363]
const weights = [0.362683783378362, 0.31370664587788727, 0.22238103445337448, 0.10122853629037626]

/**
 * Time, s, from landing at `level` on `branch` to that branch's next fold; null where the motion comes to
 * rest before it.
 */
function timeToFold(
  path: Branches,
  line: LoadLine,
  capacitance: number,
  branch: number,
  level: number,
): number | null {
  const link = 1 / line.resistance + line.leakage
  const bottom = path.bottom[branch] as number
  const top = path.top[branch] as number
  let piece = pieceAt(path, branch, level)
  const down = loadCurrent(line, level) < currentOn(path, piece, level)
  const fold = down ? bottom : top
  const over = loadCurrent(line, path.level[fold] as number) - (path.current[fold] as number)
  if (down ? over >= 0 : over <= 0) return null
  let v = level
  let time = 0
  while (down ? piece >= bottom : piece < top) {
    const low = path.level[piece] as number
    const high = path.level[piece + 1] as number
    const to = down ? low : high
    if (high > low && to !== v) {
      const left = path.current[piece] as number
      const right = path.current[piece + 1] as number
      const slope = link + (right - left) / (high - low)
      const ahead = (loadCurrent(line, to) - (down ? left : right)) / slope
      time += timeBetween(capacitance / slope, ahead, v, to)
    }
    v = to
    piece += down ? -1 : 1
  }
  return time
}

/**
 * Mean and variance of one wait together with the time from the strike to the next fold. `usual` is that sum,
 * s, at the mean wait: the mean is reckoned from it, so that a delay far shorter than the flash still shows.
 */
function spreadOfStrike(
  path: Branches,
  line: LoadLine,
  capacitance: number,
  branch: number,
  waiting: Phase,
  meanWait: number,
  usual: number,
): { mean: number; variance: number; lost: number } {
  const marks = [0]
  const longest = 40 * meanWait
  // The time after the strike bends where the landing passes a knot: no interval straddles one.
  for (const level of path.level) {
    const part = (level - waiting.from) / (waiting.toward - waiting.from)
    if (part > 0 && part < 1) marks.push(-waiting.timeConstant * Math.log1p(-part))
  }
  for (let scale = 1 / 16; scale <= 32; scale *= 2) {
    marks.push(scale * meanWait, scale * waiting.timeConstant)
  }
  marks.push(longest)
  const inside = marks.filter((mark) => mark <= longest).sort((a, b) => a - b)
  let weight = 0
  let lost = 0
  let first = 0
  let second = 0
  const endless: Phase = { ...waiting, duration: Number.POSITIVE_INFINITY }
  const add = (wait: number, share: number) => {
    const level = levelIn(endless, wait)
    const lands = landingAbove(path, branch, level)
    const after = lands < 0 ? null : timeToFold(path, line, capacitance, lands, level)
    const chance = (share * Math.exp(-wait / meanWait)) / meanWait
    if (after === null) {
      lost += chance
      return
    }
    weight += chance
    const excess = wait + after - usual
    first += chance * excess
    second += chance * excess * excess
  }
  for (let k = 0; k + 1 < inside.length; k++) {
    const half = ((inside[k + 1] as number) - (inside[k] as number)) / 2
    const middle = (inside[k] as number) + half
    for (let n = 0; n < abscissae.length; n++) {
      const offset = half * (abscissae[n] as number)
      add(middle - offset, half * (weights[n] as number))
      add(middle + offset, half * (weights[n] as number))
    }
  }
  const mean = first / weight
  return { mean, variance: second / weight - mean * mean, lost }
}

/**
 * Jitter of a cycle from exponential waits of the given mean, s. Exact up to quadrature for a lamp with one
 * falling region; with more, each strike counts on its own and the order of branches is taken as fixed.
 *
 * @param phases of the cycle at the mean wait, in order.
 */
export function jitterOf(
  path: Branches,
  line: LoadLine,
  capacitance: number,
  phases: readonly Phase[],
  period: number,
  meanWait: number,
): Jitter {
  let variance = 0
  let meanPeriod = period
  let kept = 1
  for (const phase of phases) {
    if (phase.kind !== 'waiting') continue
    const branch = branchBelow(path, phase)
    const lands = landingAbove(path, branch, phase.to)
    const after = timeToFold(path, line, capacitance, lands, phase.to) ?? 0
    const usual = phase.duration + after
    const spread = spreadOfStrike(path, line, capacitance, branch, phase, meanWait, usual)
    variance += spread.variance
    meanPeriod += spread.mean
    kept *= 1 - spread.lost
  }
  return {
    periodDeviation: Math.sqrt(Math.max(0, variance)),
    meanPeriod,
    overRangeChance: 1 - kept,
  }
}

/** The branch a waiting lamp is about to leave: the one that holds its pre-strike current. */
function branchBelow(path: Branches, waiting: Phase): number {
  for (let k = path.top.length - 1; k > 0; k--) {
    if (waiting.anchorCurrent >= (path.current[path.bottom[k] as number] as number)) return k
  }
  return 0
}
