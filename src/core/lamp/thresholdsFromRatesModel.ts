/** A count of flashes at one supply voltage. */
export type RateObservation = {
  /** V */
  readonly supplyVoltage: number
  /** Flashes counted; more than zero, not necessarily whole. */
  readonly flashes: number
  /** Time they were counted in, s. */
  readonly time: number
}

/** What the lamp was flashing with. Tolerances are limits, as ratios: 0.05 = 5 %; 0 = known exactly. */
export type RateParts = {
  /** Everything between supply and capacitor, Ω. */
  readonly seriesResistance: number
  readonly resistanceTolerance: number
  /** F */
  readonly capacitance: number
  readonly capacitanceTolerance: number
  /** Error of the supply's meter, in proportion and the same in every observation. */
  readonly supplyTolerance: number
  /** Across the capacitor, Ω; `Infinity` = none. */
  readonly leakageResistance: number
  /** Current the lamp takes at strike voltage before it strikes, A; 0 where it does not matter. */
  readonly preStrikeCurrent: number
  /** What the glowing lamp is like as a plain resistance, Ω; 0 = it discharges at once. */
  readonly glowResistance: number
  /** Length of a flash, s, where it is known; added to what the glow resistance gives. */
  readonly flashTime: number
}

/** Proportions by which resistance, capacitance and supply voltage are out. */
export type PartsOut = {
  readonly resistance: number
  readonly capacitance: number
  readonly supply: number
}

/** Parts exactly as they are marked. */
export const asMarked: PartsOut = { resistance: 0, capacitance: 0, supply: 0 }

/**
 * Period, s, of a lamp that is a plain switch: charging takes `τ ln((E − Ve)/(E − Vs))`, the flash, with a
 * glow resistance r, `(R∥r) C ln((Vs − Eg)/(Ve − Eg))` with `Eg = E r/(R + r)` [the textbook relaxation
 * oscillator]. Leakage and the lamp's own pre-strike current, which grows in proportion to the voltage, turn
 * supply and resistor into Thévenin's. NaN where such a lamp would not flash.
 */
export function periodOf(
  supplyVoltage: number,
  strike: number,
  extinction: number,
  parts: RateParts,
  out: PartsOut,
): number {
  if (!(extinction > 0 && strike > extinction)) return Number.NaN
  const supply = supplyVoltage * (1 + out.supply)
  const resistance = parts.seriesResistance * (1 + out.resistance)
  const capacitance = parts.capacitance * (1 + out.capacitance)
  const leakage = 1 / parts.leakageResistance
  const share = 1 / (1 + resistance * (leakage + parts.preStrikeCurrent / strike))
  const spare = supply * share - strike
  if (!(spare > 0)) return Number.NaN
  const charging = resistance * capacitance * share * Math.log1p((strike - extinction) / spare)
  if (parts.glowResistance === 0) return charging + parts.flashTime
  const link = 1 / resistance + leakage + 1 / parts.glowResistance
  const glowEnd = supply / resistance / link
  if (!(glowEnd < extinction)) return Number.NaN
  const fall = Math.log1p((strike - extinction) / (extinction - glowEnd))
  return charging + (capacitance / link) * fall + parts.flashTime
}

const notNegative = (value: number) => Number.isFinite(value) && value >= 0
const positive = (value: number) => Number.isFinite(value) && value > 0

/** Says in plain words what makes observations and parts impossible to reckon with; null when nothing does. */
export function faultInRates(
  observations: readonly RateObservation[],
  parts: RateParts,
): string | null {
  if (!positive(parts.seriesResistance)) return 'The series resistor must be more than 0 Ω.'
  if (!positive(parts.capacitance)) return 'The capacitor must be more than 0 F.'
  const tolerances = [parts.resistanceTolerance, parts.capacitanceTolerance, parts.supplyTolerance]
  if (!tolerances.every((tolerance) => tolerance >= 0 && tolerance < 0.9)) {
    return 'A tolerance must be from 0 to less than 90 %.'
  }
  if (!(parts.leakageResistance > 0)) return 'The leakage must be more than 0 Ω.'
  if (!notNegative(parts.preStrikeCurrent)) return 'The pre-strike current must be 0 A or more.'
  if (!notNegative(parts.glowResistance)) return 'The glow resistance must be 0 Ω or more.'
  if (!notNegative(parts.flashTime)) return 'The length of a flash must be 0 s or more.'
  for (const [i, { supplyVoltage, flashes, time }] of observations.entries()) {
    const which = `Count ${i + 1}`
    if (!positive(supplyVoltage)) return `${which}: the supply voltage must be more than 0 V.`
    if (!positive(time)) return `${which}: the time must be more than 0 s.`
    if (!positive(flashes)) {
      return `${which}: there must be flashes; a supply at which it does not flash says nothing here.`
    }
    if (parts.flashTime >= time / flashes) {
      return `${which}: the flash alone would last longer than from one flash to the next.`
    }
  }
  if (observations.length < 2) return 'It takes counts at two supply voltages at least.'
  const supplies = observations.map(({ supplyVoltage }) => supplyVoltage)
  const [least, most] = [Math.min(...supplies), Math.max(...supplies)]
  if (most - least < 1e-3 * most) {
    return 'All counts are at the same supply voltage: take another at a different one.'
  }
  return null
}
