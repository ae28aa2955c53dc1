/** What a quantity is measured in. `''` is a plain number, `'%'` counts hundredths: 5 is 5 %. */
export type Unit = 'V' | 'A' | 'Ω' | 'F' | 's' | 'Hz' | 'W' | 'J' | 'C' | 'Ah' | '%' | ''

/** How one unit is written, typed and spoken. */
type UnitFacts = {
  /** What it measures, for "Type a …". */
  readonly measures: string
  /** Spoken after exactly one, and after any other number. */
  readonly spoken: readonly [one: string, many: string]
  /** What people type for it, in lower case, the longest first. */
  readonly spellings: readonly string[]
  /** Powers of ten that can be typed in front of it; others are a slip of the finger. */
  readonly typed: readonly number[]
  /** Least and greatest power of ten it is printed with. */
  readonly printed: readonly [least: number, greatest: number]
  /** Values from this power of ten up to one are printed without a prefix: 0.47 Ω, 0.5 Hz. */
  readonly plainFrom: number
  readonly example: string
}

/** One decimal prefix of the SI. */
type Prefix = { readonly exponent: number; readonly symbol: string; readonly word: string }

const prefixes: readonly Prefix[] = [
  { exponent: -15, symbol: 'f', word: 'femto' },
  { exponent: -12, symbol: 'p', word: 'pico' },
  { exponent: -9, symbol: 'n', word: 'nano' },
  { exponent: -6, symbol: 'µ', word: 'micro' },
  { exponent: -3, symbol: 'm', word: 'milli' },
  { exponent: 0, symbol: '', word: '' },
  { exponent: 3, symbol: 'k', word: 'kilo' },
  { exponent: 6, symbol: 'M', word: 'mega' },
  { exponent: 9, symbol: 'G', word: 'giga' },
  { exponent: 12, symbol: 'T', word: 'tera' },
]

/** The prefix for a power of ten: every third from −15 to 12; throws for any other. */
export function prefixOf(exponent: number): Prefix {
  const found = prefixes.find((prefix) => prefix.exponent === exponent)
  if (!found) throw new RangeError(`There is no prefix for ten to the ${exponent}`)
  return found
}

/** The facts of every unit. */
export const units: Readonly<Record<Unit, UnitFacts>> = {
  V: {
    measures: 'voltage',
    spoken: ['volt', 'volts'],
    spellings: ['volts', 'volt', 'vdc', 'v'],
    typed: [-9, -6, -3, 3],
    printed: [-9, 3],
    plainFrom: 0,
    example: '90 V',
  },
  A: {
    measures: 'current',
    spoken: ['amp', 'amps'],
    spellings: ['amperes', 'ampere', 'amps', 'amp', 'a'],
    typed: [-15, -12, -9, -6, -3, 3],
    printed: [-15, 3],
    plainFrom: 0,
    example: '0.6 mA',
  },
  Ω: {
    measures: 'resistance',
    spoken: ['ohm', 'ohms'],
    spellings: ['ohms', 'ohm', 'ω', 'r'],
    typed: [-12, -9, -6, -3, 3, 6, 9, 12],
    printed: [-12, 12],
    plainFrom: -2,
    example: '4.7 MΩ',
  },
  F: {
    measures: 'capacitance',
    spoken: ['farad', 'farads'],
    spellings: ['farads', 'farad', 'f'],
    typed: [-15, -12, -9, -6, -3],
    printed: [-15, 0],
    plainFrom: 0,
    example: '470 nF',
  },
  s: {
    measures: 'time',
    spoken: ['second', 'seconds'],
    spellings: ['seconds', 'second', 'secs', 'sec', 's'],
    typed: [-15, -12, -9, -6, -3],
    printed: [-15, 0],
    plainFrom: 0,
    example: '1.5 s',
  },
  Hz: {
    measures: 'frequency',
    spoken: ['hertz', 'hertz'],
    spellings: ['hertz', 'hz'],
    typed: [-9, -6, -3, 3, 6, 9],
    printed: [-9, 9],
    plainFrom: -2,
    example: '1.5 Hz',
  },
  W: {
    measures: 'power',
    spoken: ['watt', 'watts'],
    spellings: ['watts', 'watt', 'w'],
    typed: [-15, -12, -9, -6, -3, 3],
    printed: [-15, 3],
    plainFrom: 0,
    example: '250 mW',
  },
  J: {
    measures: 'energy',
    spoken: ['joule', 'joules'],
    spellings: ['joules', 'joule', 'j'],
    typed: [-15, -12, -9, -6, -3, 3],
    printed: [-15, 3],
    plainFrom: 0,
    example: '2 mJ',
  },
  C: {
    measures: 'charge',
    spoken: ['coulomb', 'coulombs'],
    spellings: ['coulombs', 'coulomb', 'c'],
    typed: [-15, -12, -9, -6, -3],
    printed: [-15, 0],
    plainFrom: 0,
    example: '45 µC',
  },
  Ah: {
    measures: 'battery capacity',
    spoken: ['amp-hour', 'amp-hours'],
    spellings: ['amp-hours', 'amp-hour', 'ah'],
    typed: [-6, -3],
    printed: [-6, 0],
    plainFrom: 0,
    example: '550 mAh',
  },
  '%': {
    measures: 'percentage',
    spoken: ['percent', 'percent'],
    spellings: ['percent', '%'],
    typed: [],
    printed: [0, 0],
    plainFrom: 0,
    example: '5 %',
  },
  '': {
    measures: 'plain number',
    spoken: ['', ''],
    spellings: [],
    typed: [],
    printed: [0, 0],
    plainFrom: 0,
    example: '1.5',
  },
}

/** "a voltage", "an energy": what a unit measures, with its article. */
export function oneMeasure(unit: Unit): string {
  const { measures } = units[unit]
  return `${/^[aeiou]/.test(measures) ? 'an' : 'a'} ${measures}`
}
