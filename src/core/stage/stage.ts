import { faultInKnots, type Lamp } from './lamp'

/** What a stage without a capacitor still has across the lamp, F (own estimate for leads and holder). */
export const defaultStrayCapacitance = 10e-12

/** One lamp with its supply, series resistor, capacitor, leakage and lead resistor. SI throughout. */
export type Stage = {
  /** Open-circuit voltage of the supply, V; not negative. */
  readonly supplyVoltage: number
  /** The supply's own resistance, Ω; not negative. */
  readonly sourceResistance: number
  /** The part that sets the load line, Ω; not negative. */
  readonly seriesResistance: number
  /** Capacitor across lamp and lead resistor, F; 0 = none fitted, then the stray capacitance counts. */
  readonly capacitance: number
  /** Resistance across the capacitor, Ω; positive; `Infinity` = none. */
  readonly leakageResistance: number
  /** Resistor in the lamp's own lead, Ω; not negative. */
  readonly leadResistance: number
  readonly lamp: Lamp
  /** Capacitance that stands in where no capacitor is fitted, F; `defaultStrayCapacitance` if absent. */
  readonly strayCapacitance?: number
}

/**
 * Least resistance between supply and capacitor that is reckoned with, Ω. Below it the supply would hold
 * the capacitor's voltage outright; a real lead has more.
 */
export const leastResistance = 1e-6

/** Capacitance in force, F: the capacitor fitted, or the stray one where none is. */
export function effectiveCapacitance(stage: Stage): number {
  return stage.capacitance > 0
    ? stage.capacitance
    : (stage.strayCapacitance ?? defaultStrayCapacitance)
}

/** Resistance between the supply and the capacitor, Ω: source and series together. */
export function feedResistance(stage: Stage): number {
  return Math.max(leastResistance, stage.sourceResistance + stage.seriesResistance)
}

const notNegative = (value: number) => Number.isFinite(value) && value >= 0

/** Says in plain words what makes a stage impossible to reckon with; null when nothing does. */
export function faultInStage(stage: Stage): string | null {
  const stray = stage.strayCapacitance
  if (!notNegative(stage.supplyVoltage)) return 'The supply voltage must be 0 V or more.'
  if (!notNegative(stage.sourceResistance)) return 'The source resistance must be 0 Ω or more.'
  if (!notNegative(stage.seriesResistance)) return 'The series resistor must be 0 Ω or more.'
  if (!notNegative(stage.capacitance)) return 'The capacitor must be 0 F or more.'
  if (stray !== undefined && !(notNegative(stray) && stray > 0)) {
    return 'The stray capacitance must be more than 0 F.'
  }
  if (!(stage.leakageResistance > 0 && Number.isFinite(1 / stage.leakageResistance))) {
    return 'The leakage must be more than 0 Ω.'
  }
  if (!notNegative(stage.leadResistance)) return 'The lead resistor must be 0 Ω or more.'
  if (!notNegative(stage.lamp.recoveryTime)) return 'The recovery time must be 0 s or more.'
  if (!notNegative(stage.lamp.strikeDelay)) return 'The strike delay must be 0 s or more.'
  return faultInKnots(stage.lamp.knots)
}
