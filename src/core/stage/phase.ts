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
 * Time, s, for an exponential with `timeConstant` to go from `from` to `to`, V, when at `to` it would still
 * have `ahead` V to go, in the same direction. What lies ahead is asked for rather than what it tends to,
 * because near the edge of a window the two voltages are equal to rounding and their difference is not
 * known any more. The logarithm is taken of one plus a difference, which loses no figures.
 */
export function timeBetween(timeConstant: number, ahead: number, from: number, to: number): number {
  return timeConstant * Math.log1p((to - from) / ahead)
}

/** Integrals over time of what a phase does, in closed form. */
export type Sums = {
  /** s */ time: number
  /** ∫v dt, V·s */ level: number
  /** ∫v² dt, V²·s */ levelSquared: number
  /** ∫(E − v) dt, V·s, and ∫(E − v)² dt, V²·s: what drives the supply current */ drive: number
  driveSquared: number
  /** ∫i dt, C */ charge: number
  /** ∫i² dt, A²·s */ currentSquared: number
  /** ∫v·i dt, J: taken by lamp and lead resistor together */ energy: number
}

/** Sums of nothing. */
export function noSums(): Sums {
  return {
    time: 0,
    level: 0,
    levelSquared: 0,
    drive: 0,
    driveSquared: 0,
    charge: 0,
    currentSquared: 0,
    energy: 0,
  }
}

/**
 * How far, less one half, an exponential has come on its way on average, its duration being `x` time
 * constants: `coth(x/2)/2 − 1/x`. Below one half its Taylor series is used, above it the difference has
 * figures enough.
 */
function beyondHalfway(x: number): number {
  if (x >= 0.5) return -1 / Math.expm1(-x) - 1 / x - 0.5
  const y = x * x
  const tail = 1 / 47900160 + y * (-691 / 1307674368000 + y / 74724249600)
  return x * (1 / 12 + y * (-1 / 720 + y * (1 / 30240 + y * (-1 / 1209600 + y * tail))))
}

/**
 * Adds a phase of finite duration to `sums`. Every quantity runs straight with the voltage, so the mean of one,
 * or of a product of two, follows from its values at both ends and the mean and mean square of the way come:
 * nothing large is taken from anything large.
 *
 * @param supply open-circuit voltage of the supply, V.
 */
export function addPhase(sums: Sums, phase: Phase, supply: number): void {
  const { duration, from, to } = phase
  if (!(duration > 0)) return
  const periods = duration / phase.timeConstant
  const beyond = beyondHalfway(periods)
  const way = 0.5 + beyond
  const waySquared = way / 2 - beyond / Math.expm1(-periods)
  const current = lampCurrentIn(phase, from)
  const rise = to - from
  const growth = phase.conductance * rise
  const mean = (start: number, change: number) => duration * (start + change * way)
  const product = (a: number, da: number, b: number, db: number) =>
    duration * (a * b + (a * db + b * da) * way + da * db * waySquared)
  sums.time += duration
  sums.level += mean(from, rise)
  sums.levelSquared += product(from, rise, from, rise)
  sums.drive += mean(supply - from, -rise)
  sums.driveSquared += product(supply - from, -rise, supply - from, -rise)
  sums.charge += mean(current, growth)
  sums.currentSquared += product(current, growth, current, growth)
  sums.energy += product(from, rise, current, growth)
}

/** Adds one set of sums to another. */
export function addSums(sums: Sums, more: Sums): void {
  for (const key of Object.keys(sums) as (keyof Sums)[]) sums[key] += more[key]
}

/** Time the phases from index `first` up to, not including, `end` take together, s. */
export function durationOf(phases: readonly Phase[], first: number, end: number): number {
  let time = 0
  for (let k = first; k < end; k++) time += (phases[k] as Phase).duration
  return time
}
