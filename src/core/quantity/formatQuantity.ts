import { figuresOf, placePoint } from './decimal'
import { type DurationPart, splitDuration } from './duration'
import { prefixOf, type Unit, units } from './units'

/** How a quantity is written. */
export type FormatOptions = {
  /** Figures that count, 1 to 17; `'all'`: as many as read back as the same number. 3 if absent. */
  readonly figures?: number | 'all'
  /** Keeps 4.70 from becoming 4.7: for readings that change while one looks. False if absent. */
  readonly keepZeros?: boolean
  /** Stands for +∞, unit and all, e.g. "none" for a leakage; if absent "∞" and the unit. */
  readonly infinite?: string
}

/** A number and its unit apart. Durations above two minutes are all number ("3 min 20 s"). */
export type QuantityParts = { readonly number: string; readonly unit: string }

// No-break, and of full width: a narrow one closes up in bold figures.
const steadySpace = '\u00A0'
const minus = '\u2212'

/**
 * A value for people: "4.7 MΩ", "470 nF", "3 min 20 s", "5 %". Rounds before it chooses the prefix,
 * so 999.96 kΩ is 1 MΩ. NaN becomes "–". Times above 120 s go by minutes, hours, days and years
 * unless all figures are wanted. Between number and unit stands a no-break space.
 * @param value in the SI unit (percent for '%'), any number
 */
export function formatQuantity(
  value: number,
  unit: Unit,
  options: number | FormatOptions = 3,
): string {
  const parts = formatParts(value, unit, options)
  return parts.unit === '' ? parts.number : `${parts.number}${steadySpace}${parts.unit}`
}

/** As `formatQuantity`, with number and unit apart. */
export function formatParts(
  value: number,
  unit: Unit,
  options: number | FormatOptions = 3,
): QuantityParts {
  const chosen = typeof options === 'number' ? { figures: options } : options
  const figures = chosen.figures ?? 3
  if (Number.isNaN(value)) return { number: '–', unit: '' }
  if (value === Number.POSITIVE_INFINITY && chosen.infinite !== undefined) {
    return { number: chosen.infinite, unit: '' }
  }
  const sign = value < 0 ? minus : ''
  if (!Number.isFinite(value)) return { number: `${sign}∞`, unit }
  const duration = unit === 's' && figures !== 'all' ? splitDuration(Math.abs(value)) : null
  if (duration) return { number: sign + writeDuration(duration), unit: '' }

  const { number, exponent } = scaleQuantity(
    Math.abs(value),
    unit,
    figures,
    chosen.keepZeros ?? false,
  )
  return { number: sign + number, unit: prefixOf(exponent).symbol + unit }
}

/**
 * The number in front of the unit and the power of ten of its prefix.
 * @param size finite, not negative
 */
export function scaleQuantity(
  size: number,
  unit: Unit,
  figures: number | 'all',
  keepZeros: boolean,
): { readonly number: string; readonly exponent: number } {
  if (figures !== 'all' && !(Number.isInteger(figures) && figures >= 1 && figures <= 17)) {
    throw new RangeError('figures must be a whole number from 1 to 17')
  }
  const { printed, plainFrom } = units[unit]
  // Where no prefix can take them, whole digits are never rounded away: 12 345 % stays that.
  const whole = size >= 1 && printed[1] === 0 ? figuresOf(size, 'all').exponent + 1 : 1
  const counted = figures === 'all' ? figures : Math.min(17, Math.max(figures, whole))
  const cut = figuresOf(size, counted)
  const third = Math.floor(cut.exponent / 3) * 3
  const plain = size === 0 || (cut.exponent < 0 && cut.exponent >= plainFrom)
  const exponent = plain ? 0 : Math.min(printed[1], Math.max(printed[0], third))
  const first = cut.exponent - exponent
  if (first < -7 || first > 14) {
    const mantissa = placePoint({ digits: cut.digits, exponent: 0 }, keepZeros)
    return { number: `${mantissa}e${first < 0 ? minus : ''}${Math.abs(first)}`, exponent }
  }
  return { number: placePoint({ digits: cut.digits, exponent: first }, keepZeros), exponent }
}

function writeDuration(parts: readonly DurationPart[]): string {
  return parts
    .map(
      ({ count, of }) => `${count}${steadySpace}${of === 'day' || of === 'year' ? `${of}s` : of}`,
    )
    .join(steadySpace)
}
