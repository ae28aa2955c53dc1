import type { SweepReading } from '../core'
import { remarksOnSetup, type WrittenSetup } from './sweepSetupRemarks'

/**
 * A sweep as comma-separated text with decimal points, in volts, that `readSweep` reads back the
 * same but for the numbers of the rows: how it was taken as remarks, a header, then the readings.
 */
export function writeSweep(readings: readonly SweepReading[], setup?: WrittenSetup): string {
  const other = setup?.meterPlace === 'resistor' ? 'Resistor (V)' : 'Lamp (V)'
  const spoken = readings.some(({ direction }) => direction !== undefined)
  const lines = [
    ...(setup ? remarksOnSetup(setup) : []),
    ['Supply (V)', other, ...(spoken ? ['Direction'] : [])].join(','),
    ...readings.map(({ supply, lamp, direction = '' }) =>
      [supply, lamp, ...(spoken ? [direction] : [])].join(','),
    ),
  ]
  return `${lines.join('\n')}\n`
}
