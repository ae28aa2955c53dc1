import type { Knot, Stage } from '../../src/core/index'

/** What a simulation saw; `undecided` where it ran out of steps. */
export type Seen = 'flashes' | 'stays dark' | 'stays lit' | 'over range' | 'undecided'

/**
 * Slopes of the characteristic at the capacitor, lead resistor included, Ω: the steepest fall, and the
 * shallowest slope of all, rising or falling.
 */
export function slopesOf(stage: Stage): { steepestFall: number; shallowest: number } {
  const slopes = stage.lamp.knots.slice(1).map((right, n) => {
    const left = stage.lamp.knots[n] as Knot
    return (right.voltage - left.voltage) / (right.current - left.current) + stage.leadResistance
  })
  return {
    steepestFall: -Math.min(...slopes),
    shallowest: Math.min(...slopes.map((slope) => Math.abs(slope))),
  }
}

/**
 * Brute force: the smooth model `L·di/dt = v − V(i)`, `C·dv/dt = (E − v)/R − v/R_leak − i` in small steps of
 * the backward Euler rule. Nothing here knows of knees, branches or jumps. The inductance is 4 ‰ of what would
 * let the shallowest slope ring, and the step so short that L/step exceeds the steepest fall: then the
 * equation of a step is one rising broken line with one root.
 *
 * @param start capacitor voltage, V, and lamp current, A, to begin with.
 */
export function simulateSmooth(
  stage: Stage,
  start: { readonly voltage: number; readonly current: number } = { voltage: 0, current: 0 },
  maxSteps = 3e6,
): Seen {
  const { capacitance, leadResistance, supplyVoltage } = stage
  const feed = stage.sourceResistance + stage.seriesResistance
  const link = 1 / feed + 1 / stage.leakageResistance
  const { steepestFall, shallowest } = slopesOf(stage)
  const inductance = 4e-3 * shallowest * shallowest * capacitance
  const step = inductance / (1.5 * steepestFall)
  const { knots } = stage.lamp
  const inertia = inductance / step
  const charge = step / capacitance
  const shrink = 1 + charge * link
  const kneeIndex = knots.findIndex((knot, n) => (knots[n + 1]?.voltage ?? 1e99) < knot.voltage)
  const knee = (knots[kneeIndex] as Knot).current
  const end = (knots.at(-1) as Knot).current
  let { voltage: v, current: i } = start
  let piece = 0
  let rising = true
  let turn = v
  let swings = 0
  let quiet = 0
  for (let n = 0; n < maxSteps; n++) {
    const base = (v + charge * (supplyVoltage / feed)) / shrink
    const drop = charge / shrink
    // (L/h)(i' − i) + V(i') − (base − drop·i') = 0, rising in i'.
    for (;;) {
      const left = knots[piece] as Knot
      const right = knots[piece + 1] as Knot
      const slope = (right.voltage - left.voltage) / (right.current - left.current) + leadResistance
      const atLeft =
        inertia * (left.current - i) +
        left.voltage +
        leadResistance * left.current -
        base +
        drop * left.current
      const next = left.current - atLeft / (inertia + slope + drop)
      if (next > right.current) {
        if (right.current === end) return 'over range'
        piece++
      } else if (next < left.current && piece > 0) {
        piece--
      } else {
        const before = v
        const was = i
        i = next
        v = base - drop * i
        // What is left of the way to a rest is about the rate of change times the time constant.
        const leftOver = Math.abs(v - before) * ((feed * capacitance) / step)
        const still = leftOver < 1e-4 * supplyVoltage && Math.abs(i - was) <= 1e-6 * Math.abs(i)
        quiet = still ? quiet + 1 : 0
        break
      }
    }
    // A swing is a fall by a fifth of a per cent of the supply after a rise by as much.
    if (rising) {
      turn = Math.max(turn, v)
      if (v < turn - 2e-3 * supplyVoltage) {
        rising = false
        turn = v
        swings++
        if (swings === 6) return 'flashes'
      }
    } else {
      turn = Math.min(turn, v)
      if (v > turn + 2e-3 * supplyVoltage) {
        rising = true
        turn = v
      }
    }
    if (quiet > 50) return i > knee ? 'stays lit' : 'stays dark'
  }
  return 'undecided'
}
