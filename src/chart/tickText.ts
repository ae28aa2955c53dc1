import { formatQuantity, type Unit } from '../core'
import type { Domain } from './axes'

const prefixes: Readonly<Record<number, string>> = {
  [-15]: 'f',
  [-12]: 'p',
  [-9]: 'n',
  [-6]: 'µ',
  [-3]: 'm',
  0: '',
  3: 'k',
  6: 'M',
}

/** How an even axis is written: one unit for all of it, in its title, and bare numbers at its ticks. */
export type AxisWriting = { readonly unit: string; readonly text: (value: number) => string }

/** An axis this many times shorter than its numbers are large is written from a round number on. */
const farOff = 200

/**
 * Chooses the prefix that keeps the numbers of an axis short. A short stretch far from zero, a flash late in a
 * long cycle, is counted from a round number that the unit names: "µs beyond 1.234 s".
 */
export function axisWriting(domain: Domain, unit: Unit): AxisWriting {
  const [from, to] = domain
  const most = Math.max(Math.abs(from), Math.abs(to))
  const length = to - from
  if (!(from > 0 && length > 0 && most > farOff * length)) {
    const exponent = exponentFor(most, unit)
    const scale = 10 ** -exponent
    return {
      unit: `${prefixes[exponent] ?? ''}${unit}`,
      text: (value) => tickWriter(value * scale),
    }
  }
  const power = Math.ceil(Math.log10(length))
  const origin = Number(`${Math.floor(from / 10 ** power)}e${power}`)
  const exponent = exponentFor(to - origin, unit)
  const step = 10 ** (power - 5)
  const scale = 10 ** -exponent
  return {
    unit: `${prefixes[exponent] ?? ''}${unit} beyond ${formatQuantity(origin, unit, { figures: 'all' })}`,
    text: (value) => tickWriter(Math.round((value - origin) / step) * step * scale),
  }
}

/** Power of ten, a multiple of three, in which numbers up to `most` are short. */
function exponentFor(most: number, unit: Unit): number {
  const ideal = most > 0 ? Math.floor((Math.log10(most) - 0.2) / 3) * 3 : 0
  return Math.max(-15, Math.min(unit === 's' ? 0 : 6, ideal))
}

/** A bare number at a tick of a voltage axis. */
export function tickWriter(value: number): string {
  const number = Number(value.toPrecision(8))
  return `${number < 0 ? '−' : ''}${Math.abs(number)}`
}
