import { formatQuantity } from '../quantity/formatQuantity'

/** An ac rating as a dc peak, with the step written out. */
export type PeakOfRating = {
  /** V */
  readonly peak: number
  /** "65 V ac × √2 = 92 V", and what the sheet itself says of dc, where it says anything. */
  readonly step: string
}

/**
 * Highest voltage of a sine, V, that a rating in volts ac (root mean square) stands for: a lamp that strikes
 * on it has struck by the peak.
 *
 * @param ac rating, V root mean square; finite, not negative.
 * @param sheetDc what the same sheet gives for dc, V; null where it gives none.
 * @throws RangeError for a rating that is no voltage.
 */
export function peakOfAcRating(ac: number, sheetDc: number | null): PeakOfRating {
  if (!(Number.isFinite(ac) && ac >= 0)) throw new RangeError('an ac rating is 0 V or more')
  const peak = ac * Math.SQRT2
  const step = `${formatQuantity(ac, 'V')} ac × √2 = ${formatQuantity(Math.round(peak), 'V')}`
  return {
    peak,
    step: sheetDc === null ? step : `${step}; the sheet says ${formatQuantity(sheetDc, 'V')} dc`,
  }
}

/**
 * Life, s, at a mean current other than the one it is stated for: life goes about with current⁻³
 * [data page of a 3 W neon lamp, lamptech.co.uk]. Infinite at no current.
 *
 * @param statedLife s, at `statedCurrent`, A; both more than zero.
 */
export function lifeAtCurrent(statedLife: number, statedCurrent: number, current: number): number {
  return current > 0 ? statedLife * (statedCurrent / current) ** 3 : Number.POSITIVE_INFINITY
}
