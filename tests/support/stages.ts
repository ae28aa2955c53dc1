import type { Knot, Stage } from '../../src/core/index'

/** Knots from pairs of current, A, and voltage, V. */
export function knotsOf(...pairs: readonly (readonly [number, number])[]): Knot[] {
  return pairs.map(([current, voltage]) => ({ current, voltage }))
}

/** What a test says about a stage; the rest is a plain flasher's. */
export type Wanted = Partial<Omit<Stage, 'lamp'>> & {
  readonly knots?: readonly Knot[]
  readonly recoveryTime?: number
  readonly strikeDelay?: number
}

/**
 * A stage to test with: 120 V, 2.2 MΩ, 0.47 µF and a small lamp of our own making (knee 75 V at 0.2 µA,
 * valley 55 V at 90 µA), no leakage, no lead resistor, no recovery, no delay, unless told otherwise.
 */
export function stageOf(wanted: Wanted = {}): Stage {
  const { knots, recoveryTime = 0, strikeDelay = 0, ...parts } = wanted
  return {
    supplyVoltage: 120,
    sourceResistance: 0,
    seriesResistance: 2.2e6,
    capacitance: 0.47e-6,
    leakageResistance: Number.POSITIVE_INFINITY,
    leadResistance: 0,
    ...parts,
    lamp: {
      knots:
        knots ?? knotsOf([0, 0], [0.2e-6, 75], [10e-6, 68], [90e-6, 55], [0.6e-3, 60], [8e-3, 84]),
      recoveryTime,
      strikeDelay,
    },
  }
}
