/** Series of preferred values by the count of values in a decade. */
export type Series = 'E6' | 'E12' | 'E24' | 'E48' | 'E96' | 'E192'

type SeriesFacts = {
  readonly count: number
  /** Figures a value is marked with. */
  readonly figures: number
  readonly tolerance: number
}

// Tolerances of E6, E12, E24 and E96 as IEC 60063 pairs them; those of E48 and E192 from memory.
const seriesFacts: Readonly<Record<Series, SeriesFacts>> = {
  E6: { count: 6, figures: 2, tolerance: 0.2 },
  E12: { count: 12, figures: 2, tolerance: 0.1 },
  E24: { count: 24, figures: 2, tolerance: 0.05 },
  E48: { count: 48, figures: 3, tolerance: 0.02 },
  E96: { count: 96, figures: 3, tolerance: 0.01 },
  E192: { count: 192, figures: 3, tolerance: 0.005 },
}

// Where IEC 60063 departs from round(10^(i/N)): eight values of E24 (and so of E12 and E6), and
// one of E192 (that one from memory).
const departures: ReadonlyMap<number, number> = new Map([
  [26, 27],
  [29, 30],
  [32, 33],
  [35, 36],
  [38, 39],
  [42, 43],
  [46, 47],
  [83, 82],
  [919, 920],
])

/** Two values closer than this ratio are the same part: sums in floating point miss by less. */
const same = 1 + 1e-9

const decades: ReadonlyMap<Series, readonly number[]> = new Map(
  (Object.keys(seriesFacts) as Series[]).map((series) => {
    const { count, figures } = seriesFacts[series]
    const ideal = Array.from({ length: count }, (_, i) =>
      Math.round(10 ** (figures - 1 + i / count)),
    )
    return [series, ideal.map((value) => departures.get(value) ?? value)]
  }),
)

/** The values of one decade, 1 up to but not 10, rising: E6 is 1, 1.5, 2.2, 3.3, 4.7, 6.8. */
export function preferredValues(series: Series): readonly number[] {
  return decadeOf(series).map((_, position) => valueAt(position, series))
}

/** Tolerance a series is made for, as a fraction: E12 is 0.1. */
export function tolerance(series: Series): number {
  return seriesFacts[series].tolerance
}

/**
 * The preferred value nearest by ratio (the lower of two equally near); null unless
 * `value` and the answer lie in 1e-300 … 1e300.
 */
export function nearestPreferred(value: number, series: Series): number | null {
  const position = positionBelow(value, series)
  if (position === null) return null
  const below = valueAt(position, series)
  const above = valueAt(position + 1, series)
  return usable(value / below <= above / value ? below : above)
}

/**
 * The next preferred value strictly above or below, also from between two of them, across decades;
 * null as for `nearestPreferred`. Values are round: the one below 500 nF in E12 is 4.7e-7 exactly.
 */
export function nextPreferred(
  value: number,
  series: Series,
  direction: 'up' | 'down',
): number | null {
  const position = positionBelow(value, series)
  if (position === null) return null
  if (direction === 'up') return usable(valueAt(position + 1, series))
  const below = valueAt(position, series)
  return usable(value > below * same ? below : valueAt(position - 1, series))
}

/** Whether a value stands in the series, to one part in 10⁹; false outside 1e-300 … 1e300. */
export function isPreferred(value: number, series: Series): boolean {
  const position = positionBelow(value, series)
  return position !== null && value <= valueAt(position, series) * same
}

/** Place of the greatest preferred value not above `value`; places run on through all decades. */
function positionBelow(value: number, series: Series): number | null {
  if (!inRange(value)) return null
  const [mantissa = '1', exponent = '0'] = value.toExponential().split('e')
  const digits = Number(mantissa) * 10 ** (seriesFacts[series].figures - 1) * same
  const decade = decadeOf(series)
  const above = decade.findIndex((preferred) => preferred > digits)
  if (above >= 0) return Number(exponent) * decade.length + above - 1
  const intoNextDecade = digits >= 10 ** seriesFacts[series].figures
  return (Number(exponent) + 1) * decade.length - (intoNextDecade ? 0 : 1)
}

/** Read from decimal digits, so that it is the number a person would type. */
function valueAt(position: number, series: Series): number {
  const decade = decadeOf(series)
  const exponent = Math.floor(position / decade.length)
  const digits = decade[position - exponent * decade.length]
  return Number(`${digits}e${exponent - seriesFacts[series].figures + 1}`)
}

function decadeOf(series: Series): readonly number[] {
  const decade = decades.get(series)
  if (!decade) throw new RangeError(`There is no series ${series}`)
  return decade
}

function usable(value: number): number | null {
  return inRange(value) ? value : null
}

/** Where doubles hold every preferred value to full precision. */
function inRange(value: number): boolean {
  return value >= 1e-300 && value <= 1e300
}
