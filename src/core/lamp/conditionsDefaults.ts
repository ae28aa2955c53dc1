import type { Surroundings } from './strikeTests'

/** What a lamp's surroundings and age do to it; every figure may be changed. */
export type ConditionEffects = {
  /** Rise of the strike voltage, V, and growth of the strike delay, s. */
  readonly dim: { readonly strikeRise: number; readonly delayGrowth: number }
  readonly dark: { readonly strikeRise: number; readonly delayGrowth: number }
  /** Change of strike and extinction voltage with temperature, V/K. */
  readonly perKelvin: number
  /** Temperature at which the characteristic was taken, °C. */
  readonly referenceTemperature: number
  /** Change of each voltage at the end of life, V; either sign. */
  readonly strikeAtEnd: number
  readonly extinctionAtEnd: number
  /** Life, s. */
  readonly life: number
}

/** The conditions a lamp works in. */
export type LampConditions = {
  /** Off: the lamp is left as it is. */
  readonly on: boolean
  readonly surroundings: Surroundings
  /** °C */
  readonly temperature: number
  /** Time it has glowed so far, s. */
  readonly timeOfUse: number
  readonly effects: ConditionEffects
}

/** Effects to start from; what each rests on is in `conditionSources`. */
export const defaultEffects: ConditionEffects = {
  dim: { strikeRise: 5, delayGrowth: 0.02 },
  dark: { strikeRise: 20, delayGrowth: 1 },
  perKelvin: -3.5e-3,
  referenceTemperature: 25,
  strikeAtEnd: 5,
  extinctionAtEnd: 5,
  life: 25_000 * 3600,
}

/** What each effect to start from rests on, to show beside it. */
export const conditionSources: Readonly<Record<keyof ConditionEffects, string>> = {
  dim: 'guessed: a quarter of the rise in the dark, a fiftieth of its delay',
  dark:
    'later and higher in the dark unless the filling is slightly radioactive (vcclite.com, neon ' +
    'application notes); the size, tens of volts and up to seconds, from memory',
  perKelvin: 'from memory: −2 to −5 mV/°C; the middle, taken for both voltages',
  referenceTemperature: 'own choice: an ordinary room',
  strikeAtEnd: 'from memory: ±5 V at the end of life; upwards, the way that stops a flasher',
  extinctionAtEnd: 'from memory: ±5 V at the end of life; taken to go the way of the strike',
  life: 'SPC Technology data sheet for A1A/A1B/A1C/C2A/A9A: 25 000 h at the design current',
}

/** No conditions: off, and such that they change nothing when switched on. */
export const noConditions: LampConditions = {
  on: false,
  surroundings: 'lit',
  temperature: defaultEffects.referenceTemperature,
  timeOfUse: 0,
  effects: defaultEffects,
}

/** Says in plain words what makes conditions impossible to reckon with; null when nothing does. */
export function faultInConditions(conditions: LampConditions): string | null {
  const { temperature, timeOfUse, effects } = conditions
  if (!(temperature >= -90 && temperature <= 300)) {
    return 'The temperature must lie between −90 °C and 300 °C.'
  }
  if (!(timeOfUse >= 0 && Number.isFinite(timeOfUse))) return 'The time of use must be 0 or more.'
  if (!(effects.life > 0)) return 'The life must be more than nothing.'
  const { dim, dark, perKelvin, referenceTemperature, strikeAtEnd, extinctionAtEnd } = effects
  const all = [dim.strikeRise, dark.strikeRise, perKelvin, referenceTemperature, strikeAtEnd]
  if (![...all, extinctionAtEnd].every(Number.isFinite)) return 'An effect is not a number.'
  if (![dim.delayGrowth, dark.delayGrowth].every((value) => value >= 0 && Number.isFinite(value))) {
    return 'The growth of the strike delay must be 0 s or more.'
  }
  return null
}
