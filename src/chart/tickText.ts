import type { Unit } from '../core'
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

/** Chooses the prefix that keeps the numbers of an axis short. */
export function axisWriting(domain: Domain, unit: Unit): AxisWriting {
  const most = Math.max(Math.abs(domain[0]), Math.abs(domain[1]))
  const ideal = most > 0 ? Math.floor((Math.log10(most) - 0.2) / 3) * 3 : 0
  const exponent = Math.max(-15, Math.min(unit === 's' ? 0 : 6, ideal))
  const scale = 10 ** -exponent
  return {
    unit: `${prefixes[exponent] ?? ''}${unit}`,
    text: (value) => tickWriter(value * scale),
  }
}

/** A bare number at a tick of a voltage axis. */
export function tickWriter(value: number): string {
  const number = Number(value.toPrecision(8))
  return `${number < 0 ? '−' : ''}${Math.abs(number)}`
}
