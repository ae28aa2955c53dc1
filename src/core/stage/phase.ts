/**
 * A stretch of time in which the circuit is linear: the capacitor's voltage is one exponential and the lamp
 * current a straight function of it.
 */
export type Phase = {
  /** `waiting`: above strike voltage, not yet struck. `held`: cannot recover, stays at the valley. */
  readonly kind: 'dark' | 'waiting' | 'glow' | 'held'
  /** s; `Infinity` for the last approach to a rest. */
  readonly duration: number
  /** Capacitor voltage at the start, V. */
  readonly from: number
  /** Capacitor voltage at the end, V. */
  readonly to: number
  /** Voltage the exponential tends to, V. */
  readonly toward: number
  /** Time constant, s. */
  readonly timeConstant: number
  /** Lamp current is `anchorCurrent + conductance·(v − anchorLevel)`: A, S, V. */
  readonly anchorCurrent: number
  readonly anchorLevel: number
  readonly conductance: number
}

/** Capacitor voltage, V, at `time` s into a phase. */
export function levelIn(phase: Phase, time: number): number {
  if (time >= phase.duration) return phase.to
  // From the start, so that a slow approach keeps its figures near time zero.
  const gone = -Math.expm1(-time / phase.timeConstant)
  return phase.from + (phase.toward - phase.from) * gone
}

/** Lamp current, A, at capacitor voltage `level` V in a phase. */
export function lampCurrentIn(phase: Phase, level: number): number {
  return phase.anchorCurrent + phase.conductance * (level - phase.anchorLevel)
}

/**
 * Time, s, for an exponential toward `toward` with `timeConstant` to go from `from` to `to`
 * (`to` lies between). The logarithm is taken of one plus a difference, which loses no figures.
 */
export function timeBetween(
  timeConstant: number,
  toward: number,
  from: number,
  to: number,
): number {
  return timeConstant * Math.log1p((to - from) / (toward - to))
}

/** Integrals over time of what a phase does, in closed form. */
export type Sums = {
  /** s */ time: number
  /** ∫v dt, V·s */ level: number
  /** ∫v² dt, V²·s */ levelSquared: number
  /** ∫i dt, C */ charge: number
  /** ∫i² dt, A²·s */ currentSquared: number
  /** ∫v·i dt, J: taken by lamp and lead resistor together */ energy: number
}

/** Sums of nothing. */
export function noSums(): Sums {
  return { time: 0, level: 0, levelSquared: 0, charge: 0, currentSquared: 0, energy: 0 }
}

/** Adds a phase of finite duration to `sums`. */
export function addPhase(sums: Sums, phase: Phase): void {
  const { duration, from, to, timeConstant, conductance } = phase
  // Measured from the anchor, so that a steep glow branch does not cancel away.
  const toward = phase.toward - phase.anchorLevel
  const start = from - phase.toward
  const end = to - phase.toward
  const first = toward * duration + timeConstant * (from - to)
  const second =
    toward * toward * duration +
    2 * toward * timeConstant * (from - to) +
    (timeConstant / 2) * (start - end) * (start + end)
  const anchor = phase.anchorLevel
  const base = phase.anchorCurrent
  const charge = base * duration + conductance * first
  const mixed = base * first + conductance * second
  sums.time += duration
  sums.level += anchor * duration + first
  sums.levelSquared += anchor * anchor * duration + 2 * anchor * first + second
  sums.charge += charge
  sums.currentSquared += base * base * duration + 2 * base * conductance * first + conductance * conductance * second
  sums.energy += anchor * charge + mixed
}

/** Time the phases from index `first` up to, not including, `end` take together, s. */
export function durationOf(phases: readonly Phase[], first: number, end: number): number {
  let time = 0
  for (let k = first; k < end; k++) time += (phases[k] as Phase).duration
  return time
}
