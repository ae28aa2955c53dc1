/**
 * The strike voltage coming back after extinction: `low + (high − low)(1 − exp(−t/time))`, reckoned at the
 * capacitor, from the level at which the lamp went out to the level of its rested knee.
 */
export type Recovery = {
  /** Strike level at the moment of extinction, V. */
  readonly low: number
  /** Rested strike level, V. */
  readonly high: number
  /** Time constant, s; more than zero. */
  readonly time: number
}

/** A stretch of charging on one straight piece: one exponential from `from` toward `toward`. */
export type Charge = {
  /** Time since extinction at which the stretch begins, s. */
  readonly start: number
  /** Time it lasts, s; `Infinity` when it ends in a rest. */
  readonly duration: number
  readonly from: number
  readonly toward: number
  readonly timeConstant: number
}

/** Root of a function with a change of sign between `low` and `high`, halved down to rounding. */
export function bisect(low: number, high: number, below: (x: number) => boolean): number {
  let a = low
  let b = high
  for (let i = 0; i < 1100; i++) {
    const middle = a + (b - a) / 2
    if (middle <= a || middle >= b) break
    if (below(middle)) a = middle
    else b = middle
  }
  return b
}

/**
 * First time since extinction, s, within a stretch of charging at which the capacitor meets the returning
 * strike voltage; null when it does not. The difference of the two is a constant and two exponentials, so
 * it turns at most once: each side of the turn holds one crossing at most, which is bracketed and converged
 * to rounding.
 */
export function meetingTime(recovery: Recovery, charge: Charge): number | null {
  const { start, duration, from, toward, timeConstant } = charge
  const span = recovery.high - recovery.low
  const pull = toward - from
  // Neither level is formed: just after extinction both are the same to rounding.
  const lead = from - recovery.low
  const short = (time: number): number =>
    lead -
    pull * Math.expm1(-(time - start) / timeConstant) +
    span * Math.expm1(-time / recovery.time)
  // Met at the very knot between two pieces: rounding may put it on either.
  if (start > 0 && short(start) >= 0) return start
  const end = start + duration
  const marks: number[] = [start]
  // The slopes agree where (pull/τ)·exp(−(t−start)/τ) = (span/T)·exp(−t/T).
  const rates = 1 / timeConstant - 1 / recovery.time
  if (pull > 0 && rates !== 0) {
    const turn =
      (Math.log((pull * recovery.time) / (span * timeConstant)) + start / timeConstant) / rates
    if (turn > start && turn < end) marks.push(turn)
  }
  // A rest below the rested strike voltage is met, if at all, before the turn.
  if (Number.isFinite(end)) marks.push(end)
  for (let i = 0; i + 1 < marks.length; i++) {
    const a = marks[i] as number
    const b = marks[i + 1] as number
    if (short(b) >= 0 && (i > 0 || short(a) <= 0)) return bisect(a, b, (t) => short(t) < 0)
  }
  return null
}
