/**
 * Standard error of one reading, V, from how far each lies from the middle of its two neighbours in
 * the order taken: the median of those distances, so that jumps do not count. Where the readings
 * are too even for that it is the rounding of the last digit seen, and never less than one part in
 * a hundred thousand of the greatest. It is a first guess of the size: the fit scales it by its own
 * residuals.
 *
 * The distance of a reading from its neighbours' mean has 1.5 times a reading's variance; the
 * median of a normal error's size is 0.6745 of its standard deviation. NaN of no readings.
 */
export function readingScatter(voltages: readonly number[]): number {
  const apart: number[] = []
  let greatest = 0
  for (let i = 0; i < voltages.length; i++) {
    greatest = Math.max(greatest, Math.abs(voltages[i] as number))
    if (i === 0 || i + 1 === voltages.length) continue
    const middle = ((voltages[i - 1] as number) + (voltages[i + 1] as number)) / 2
    apart.push(Math.abs((voltages[i] as number) - middle))
  }
  apart.sort((a, b) => a - b)
  const typical = (apart[apart.length >> 1] ?? 0) / 0.6745 / Math.sqrt(1.5)
  return Math.max(typical, leastStep(voltages) / Math.sqrt(12), 1e-5 * greatest)
}

/** Rounding of the readings: the largest of 1, 0.1 … 0.0001 V that they are all whole multiples of; else 0. */
function leastStep(voltages: readonly number[]): number {
  for (const digits of [0, 1, 2, 3, 4]) {
    const scale = 10 ** digits
    if (voltages.every((value) => Math.abs(value * scale - Math.round(value * scale)) < 1e-6)) {
      return 1 / scale
    }
  }
  return 0
}
