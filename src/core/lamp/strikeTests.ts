import { formatQuantity } from '../quantity/formatQuantity'
import { type DelayFromRamp, delayFromRamp } from './strikeTestsDelay'
import { type Difference, differenceOf, type Sample, sampleOf } from './strikeTestsSample'

/** What light falls on the lamp. */
export type Surroundings = 'lit' | 'dim' | 'dark'

/** One try, in the order they were made. */
export type StrikeReading = {
  /** Voltage across the lamp at which it struck, V; null = not read. */
  readonly strike: number | null
  /** Lowest voltage across the lamp at which it still glowed, V; null = not read. */
  readonly dropOut: number | null
  /** Null = not noted. */
  readonly surroundings: Surroundings | null
}

/** How the tries were made. */
export type StrikeTestSetup = {
  /** Rate at which the voltage was raised, V/s; null = by hand, no rate known. */
  readonly rampRate: number | null
}

/** What repeated strike and drop-out readings say. */
export type StrikeTests =
  | {
      readonly ok: true
      readonly strike: Sample | null
      readonly dropOut: Sample | null
      /** Strike voltages by surroundings; only those read in. */
      readonly strikeIn: Readonly<Partial<Record<Surroundings, Sample>>>
      /** How much higher it strikes in the dark than in the light; null where either is missing. */
      readonly darkEffect: Difference | null
      /** From all strikes, or from those in the light alone where the dark ones differ; null without a ramp. */
      readonly delay: DelayFromRamp | null
      /** Sentences about what stands out. */
      readonly remarks: readonly string[]
    }
  | { readonly ok: false; readonly reason: string }

/** Reads mean, spread, drift, the effect of darkness and the strike delay out of repeated tries. */
export function strikeTests(
  readings: readonly StrikeReading[],
  setup: StrikeTestSetup,
): StrikeTests {
  const fault = faultIn(readings, setup)
  if (fault !== null) return { ok: false, reason: fault }
  const strikesIn = (place: Surroundings) =>
    numbers(readings.filter(({ surroundings }) => surroundings === place).map((r) => r.strike))
  const all = numbers(readings.map((reading) => reading.strike))
  const strike = sampleOf(all)
  const dropOut = sampleOf(numbers(readings.map((reading) => reading.dropOut)))
  const darkEffect = differenceOf(strikesIn('lit'), strikesIn('dark'))
  const apart = darkEffect?.significant === true
  const strikeIn: Partial<Record<Surroundings, Sample>> = {}
  for (const place of ['lit', 'dim', 'dark'] as const) {
    const sample = sampleOf(strikesIn(place))
    if (sample !== null) strikeIn[place] = sample
  }
  const { rampRate } = setup
  const delay = rampRate === null ? null : delayFromRamp(apart ? strikesIn('lit') : all, rampRate)
  return {
    ok: true,
    strike,
    dropOut,
    strikeIn,
    darkEffect,
    delay,
    remarks: [
      ...remarksOnDrift('strike', strike),
      ...remarksOnDrift('drop-out', dropOut),
      ...remarksOnDark(darkEffect),
      ...remarksOnDelay(delay, strike, apart),
    ],
  }
}

function numbers(values: readonly (number | null)[]): number[] {
  return values.filter((value) => value !== null)
}

function faultIn(readings: readonly StrikeReading[], { rampRate }: StrikeTestSetup): string | null {
  if (rampRate !== null && !(rampRate > 0 && Number.isFinite(rampRate))) {
    return 'The rate at which the voltage was raised must be more than 0 V a second, or left out.'
  }
  for (const [i, { strike, dropOut }] of readings.entries()) {
    for (const value of [strike, dropOut]) {
      if (value !== null && !(Number.isFinite(value) && value > 0)) {
        return `Try ${i + 1}: a voltage must be more than 0 V, or left out.`
      }
    }
    if (strike !== null && dropOut !== null && dropOut >= strike) {
      return `Try ${i + 1}: the lamp cannot drop out at or above the voltage at which it struck.`
    }
  }
  return readings.some(({ strike, dropOut }) => strike !== null || dropOut !== null)
    ? null
    : 'There is no reading yet.'
}

function remarksOnDrift(name: string, sample: Sample | null): string[] {
  const drift = sample?.drift
  if (!drift?.significant || sample === null) return []
  const whole = formatQuantity(Math.abs(drift.slope) * (sample.count - 1), 'V', 2)
  const way = drift.slope > 0 ? 'rises' : 'falls'
  return [
    `The ${name} voltage ${way} by about ${whole} along the run: let the lamp settle, and wait longer between tries.`,
  ]
}

function remarksOnDark(effect: Difference | null): string[] {
  if (effect === null) return []
  const { difference, interval, significant } = effect
  if (!significant) return ['Between light and dark these readings show no sure difference.']
  const [size, low, high] = [difference, interval.low, interval.high].map((value) =>
    formatQuantity(Math.abs(value), 'V', 2),
  )
  return difference > 0
    ? [`In the dark it strikes ${size} later (${low} to ${high}).`]
    : [`In the dark it strikes ${size} earlier, which is unusual: look for another cause.`]
}

function remarksOnDelay(
  delay: DelayFromRamp | null,
  strike: Sample | null,
  litOnly: boolean,
): string[] {
  if (delay === null) return []
  const remarks: string[] = []
  if (litOnly) remarks.push('The delay is that of the tries in the light alone.')
  if (strike?.drift?.significant) {
    remarks.push('The drift along the run is in the delay too, which is therefore too large.')
  }
  // From eight readings on, fewer than one series in thirty of a random wait alone reaches so far down
  // (by trial, 20 000 series each).
  if (delay.count >= 8 && delay.reachBelow > 1.55) {
    remarks.push(
      'The readings scatter alike both ways, which a random wait alone does not do: part of the delay is reading error.',
    )
  }
  return remarks
}
