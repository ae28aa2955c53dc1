/** A number cut to a count of figures: its digits, and the power of ten of the first of them. */
type Figures = { readonly digits: string; readonly exponent: number }

/**
 * The decimal figures of a finite number's size, rounded half away from zero; `'all'` keeps the
 * shortest figures that read back as the very same number.
 */
export function figuresOf(value: number, figures: number | 'all'): Figures {
  const size = Math.abs(value)
  const text = figures === 'all' ? size.toExponential() : size.toExponential(figures - 1)
  const [mantissa = '0', exponent = '0'] = text.split('e')
  return { digits: mantissa.replace('.', ''), exponent: Number(exponent) }
}

/** Writes figures with the decimal point after ten to the `exponent` of `figures`. */
export function placePoint({ digits, exponent }: Figures, keepZeros: boolean): string {
  const whole = exponent >= 0 ? digits.slice(0, exponent + 1).padEnd(exponent + 1, '0') : '0'
  const rest = exponent >= 0 ? digits.slice(exponent + 1) : '0'.repeat(-exponent - 1) + digits
  const fraction = keepZeros ? rest : rest.replace(/0+$/, '')
  return fraction === '' ? whole : `${whole}.${fraction}`
}
