/** One corner of a lamp's characteristic. */
export type Knot = {
  /** Lamp current, A. */
  readonly current: number
  /** Voltage across the lamp alone at that current, V. */
  readonly voltage: number
}

/** A glow lamp as its static characteristic and two times. */
export type Lamp = {
  /**
   * Straight lines between these knots are the characteristic. The first is (0, 0); currents
   * strictly increase; voltages are finite and not negative; there are two knots at least.
   * What lies beyond the last knot is unknown and treated as an arc.
   */
  readonly knots: readonly Knot[]
  /** Time constant with which the strike voltage returns after extinction, s; 0 = at once. */
  readonly recoveryTime: number
  /** Mean of the exponential random wait between reaching strike voltage and striking, s; 0 = none. */
  readonly strikeDelay: number
}

/** Says in plain words what makes knots no characteristic; null when they are one. */
export function faultInKnots(knots: readonly Knot[]): string | null {
  const first = knots[0]
  if (first === undefined || knots.length < 2) return 'A characteristic needs two knots at least.'
  if (first.current !== 0 || first.voltage !== 0) {
    return 'A characteristic starts at 0 A and 0 V.'
  }
  let before = -1
  for (const [index, knot] of knots.entries()) {
    if (!(Number.isFinite(knot.voltage) && knot.voltage >= 0)) {
      return `Knot ${index + 1}: the voltage must be a number of volts, 0 or more.`
    }
    if (!(Number.isFinite(knot.current) && knot.current > before)) {
      return `Knot ${index + 1}: the current must be greater than that of the knot before.`
    }
    before = knot.current
  }
  return null
}

/**
 * Index of the knee: the first knot after which the voltage across the lamp falls (the last one, where
 * several share that voltage); null when it never falls, so the lamp has no strike voltage.
 */
export function kneeIndexOf(knots: readonly Knot[]): number | null {
  for (let i = 0; i + 1 < knots.length; i++) {
    if ((knots[i + 1] as Knot).voltage < (knots[i] as Knot).voltage) return i
  }
  return null
}

/**
 * Voltage across the lamp alone, V, at a current in A between zero and the last knot's.
 * Outside that it is null: nothing is known there.
 */
export function lampVoltageAt(knots: readonly Knot[], current: number): number | null {
  for (let i = 0; i + 1 < knots.length; i++) {
    const left = knots[i] as Knot
    const right = knots[i + 1] as Knot
    if (current >= left.current && current <= right.current) {
      const part = (current - left.current) / (right.current - left.current)
      return left.voltage + part * (right.voltage - left.voltage)
    }
  }
  return null
}
