import { formatQuantity } from './formatQuantity'
import { oneMeasure, prefixOf, type Unit, units } from './units'

const times: Readonly<Record<number, string>> = {
  3: 'a thousand',
  6: 'a million',
  9: 'a thousand million',
  12: 'a million million',
}

const write: Readonly<Partial<Record<Unit, string>>> = {
  F: 'write µ or u for microfarads, n for nanofarads, p for picofarads',
  A: 'write m for milliamps, µ or u for microamps, n for nanoamps',
  s: 'write m for milliseconds, min for minutes, h for hours',
  V: 'write k for kilovolts, m for millivolts',
}

/** Why a prefix makes no sense before this unit, and what to write instead. */
export function refusePrefix(exponent: number, unit: Unit): string {
  const { measures, example } = units[unit]
  const { symbol, word } = prefixOf(exponent)
  const advice = write[unit] ?? `type for example ${example}`
  return exponent > 0
    ? `${symbol} means ${word}, ${times[exponent]} times, which no ${measures} here reaches: ${advice}.`
    : `${symbol} means ${word}, which does not go with ${oneMeasure(unit)} here: ${advice}.`
}

/**
 * A remark where a prefix is allowed, but people often mean its neighbour; undefined elsewhere.
 * @param bare whether the prefix stood alone, without a unit
 */
export function noteOnPrefix(
  value: number,
  exponent: number,
  unit: Unit,
  bare: boolean,
): string | undefined {
  if (unit === 'Ω' && exponent < -3) {
    return `Read as ${spelled(value, exponent, unit)}: very little for a resistance.`
  }
  if (exponent !== -3) return undefined
  const read = `Read as ${spelled(value, exponent, unit)}`
  if (unit === 'Ω') return `${read}; for megohms write M: ${formatQuantity(value * 1e9, unit)}.`
  if (unit === 'Hz') return `${read}; for megahertz write M.`
  if (unit === 'F') return `${read}; for microfarads write µ or u.`
  return unit === 's' && bare ? `${read}; for minutes write min.` : undefined
}

/** "4.7 milliohms", whatever prefix the value would be printed with. */
function spelled(value: number, exponent: number, unit: Unit): string {
  const number = Number((value * 10 ** -exponent).toPrecision(15))
  return `${number} ${prefixOf(exponent).word}${units[unit].spoken[1]}`
}
