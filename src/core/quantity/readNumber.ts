/** A number as typed, kept in decimal so that a prefix can be applied without rounding. */
type TypedNumber =
  | {
      readonly ok: true
      /** Digits with at most one decimal point. */
      readonly mantissa: string
      /** Power of ten typed with it. */
      readonly exponent: number
      /** Set where another reading was possible. */
      readonly note?: string
    }
  | { readonly ok: false; readonly message: string }

/**
 * Reads digits typed with a decimal point or comma, thousands set off by spaces, apostrophes,
 * commas or points, and an exponent. A lone mark is always the decimal mark: `1,000` is one; where
 * two kinds meet, the last is the decimal mark and the others must set off groups of three.
 */
export function readNumber(text: string): TypedNumber {
  const [spaced = '', power = '0'] = text.toLowerCase().split('e')
  const body = spaced.trim()
  // Far beyond any double either way; keeps the exponent a plain whole number.
  const exponent = Math.min(9999, Math.max(-9999, Number(power)))
  const marks = body.replace(/[^.,]/g, '')
  const last = Math.max(body.lastIndexOf('.'), body.lastIndexOf(','))
  const loneMark = marks.length === 1
  const endsInDecimals = loneMark || (marks.length > 1 && !marks.startsWith(marks.slice(-1)))
  const whole = endsInDecimals ? body.slice(0, last) : body
  const fraction = endsInDecimals ? body.slice(last + 1) : ''

  if (!/^\d*$/.test(fraction) || !(isGrouped(whole) || (whole === '' && fraction !== ''))) {
    return { ok: false, message: `“${text.trim()}” can be read in more than one way.` }
  }
  const digits = whole.replace(/\D/g, '') || '0'
  const read = {
    ok: true,
    mantissa: fraction === '' ? digits : `${digits}.${fraction}`,
    exponent,
  } as const
  return mayBeThousands(body)
    ? { ...read, note: `The mark in “${body}” was read as the decimal mark, not as thousands.` }
    : read
}

/** Plain digits, or digits in groups of three with one kind of mark between them. */
function isGrouped(whole: string): boolean {
  return /^\d+$/.test(whole) || /^\d{1,3}(?:([ '.,])\d{3})(?:\1\d{3})*$/.test(whole)
}

/** `1,234` and `1.000` look like thousands to half of the world; `1.234` is common as decimals. */
function mayBeThousands(body: string): boolean {
  return /^[1-9]\d{0,2}(?:,\d{3}|\.000)$/.test(body)
}
