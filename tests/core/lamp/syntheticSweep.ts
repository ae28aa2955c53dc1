import type { SweepReading } from '../../../src/core/lamp/currentsFromSweep'
import type { SweepSetup } from '../../../src/core/lamp/sweepSetup'
import type { Knot } from '../../../src/core/stage/lamp'

/** Numbers from 0 to 1, the same for the same seed (mulberry32, in the public domain). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0
  return () => {
    state = (state + 0x6d2b79f5) >>> 0
    let t = Math.imul(state ^ (state >>> 15), 1 | state)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}

/** A normal number of mean 0 and standard deviation 1, by Box and Muller. */
export function normal(random: () => number): number {
  return Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random())
}

/** A lamp of our own making, about the generic small one. */
export function randomLamp(random: () => number): readonly Knot[] {
  const between = (low: number, high: number) => low + (high - low) * random()
  const knee = between(62, 90)
  const valley = knee - between(12, 22)
  const bend = between(0.3e-3, 0.9e-3)
  const atBend = valley + between(2, 5)
  return [
    { current: 0, voltage: 0 },
    { current: between(0.1e-6, 3e-6), voltage: knee },
    { current: between(40e-6, 120e-6), voltage: valley },
    { current: bend, voltage: atBend },
    { current: 8e-3, voltage: atBend + (8e-3 - bend) * between(9e3, 14e3) },
  ]
}

/** Where a load line of open voltage `open` and resistance `load` rests on a characteristic. */
function restOn(knots: readonly Knot[], open: number, load: number, near: number): Knot {
  const rests: Knot[] = []
  for (let i = 0; i + 1 < knots.length; i++) {
    const left = knots[i]!
    const right = knots[i + 1]!
    const slope = (right.voltage - left.voltage) / (right.current - left.current)
    // A rest where the lamp falls faster than the load line does not hold.
    if (slope + load <= 0) continue
    const current = (open - left.voltage + slope * left.current) / (slope + load)
    if (current >= left.current && current <= right.current) {
      rests.push({ current, voltage: left.voltage + slope * (current - left.current) })
    }
  }
  // The lamp stays on its side of a fold until there is no rest on it.
  rests.sort((a, b) => Math.abs(a.current - near) - Math.abs(b.current - near))
  return rests[0] ?? { current: 0, voltage: 0 }
}

/** A sweep up and down again, in `count` readings, with normal errors of `error` V. */
export function sweepOf(
  knots: readonly Knot[],
  setup: SweepSetup,
  range: { readonly to: number; readonly count: number; readonly error: number },
  random: () => number,
): readonly SweepReading[] {
  const half = Math.floor(range.count / 2)
  const parallel = 1 / (1 / setup.seriesResistance + 1 / setup.meterResistance)
  const load = setup.meterPlace === 'supply' ? setup.seriesResistance : parallel
  // The meter across the lamp and the series resistor are one source of a lower open voltage.
  const share = setup.meterPlace === 'lamp' ? parallel / setup.seriesResistance : 1
  let near = 0
  return Array.from({ length: range.count }, (_, i): SweepReading => {
    const step = i < half ? i + 1 : range.count - i
    const supply = (range.to * step) / half
    const rest = restOn(knots, supply * share, load, near)
    near = rest.current
    const read = setup.meterPlace === 'resistor' ? supply - rest.voltage : rest.voltage
    return {
      supply: supply + range.error * normal(random),
      lamp: read + range.error * normal(random),
      direction: i < half ? 'up' : 'down',
    }
  })
}
