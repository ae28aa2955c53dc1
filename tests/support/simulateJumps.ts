import type { Knot, Stage } from '../../src/core/index'

/** What a simulation with jumps saw: how it ended, and the last period if it flashed, s. */
export type JumpRun = {
  readonly seen: 'flashes' | 'rests' | 'over range' | 'undecided'
  readonly period: number
  readonly highVoltage: number
  readonly lowVoltage: number
}

/**
 * Brute force with recovery and a fixed strike delay, for a lamp with one falling region: the voltage goes by
 * Heun's rule in steps of a few millivolts, the strike and extinction are looked for at every step, and the
 * lamp current is read off a dark table and a glow table. Good to about one step a corner.
 *
 * @param finest step in V.
 */
export function simulateJumps(stage: Stage, finest: number, maxSteps = 4e6): JumpRun {
  const { capacitance, leadResistance, supplyVoltage, lamp } = stage
  const feed = stage.sourceResistance + stage.seriesResistance
  const level = (knot: Knot) => knot.voltage + leadResistance * knot.current
  const top = lamp.knots.findIndex((knot, n) => {
    const next = lamp.knots[n + 1]
    return next !== undefined && level(next) < level(knot)
  })
  let bottom = top
  while (level(lamp.knots[bottom + 1] as Knot) < level(lamp.knots[bottom] as Knot)) bottom++
  let end = bottom
  while (
    end + 1 < lamp.knots.length &&
    level(lamp.knots[end + 1] as Knot) > level(lamp.knots[end] as Knot)
  )
    end++
  const tables = { dark: lamp.knots.slice(0, top + 1), glow: lamp.knots.slice(bottom, end + 1) }
  const last = lamp.knots[end] as Knot
  const strike = level(lamp.knots[top] as Knot)
  const extinction = level(lamp.knots[bottom] as Knot)
  const highest = level(last)
  const read = (table: readonly Knot[], v: number): { current: number; conductance: number } => {
    let n = 0
    while (n + 2 < table.length && level(table[n + 1] as Knot) < v) n++
    const left = table[n] as Knot
    const right = table[n + 1] as Knot
    const conductance = (right.current - left.current) / (level(right) - level(left))
    return { current: left.current + conductance * (v - level(left)), conductance }
  }
  const spare = (v: number) => (supplyVoltage - v) / feed - v / stage.leakageResistance
  let v = 0
  let time = 0
  let lit = false
  let out = Number.NEGATIVE_INFINITY
  let struck = Number.POSITIVE_INFINITY
  let held = 0
  let high = 0
  let period = Number.NaN
  let flashes = 0
  for (let n = 0; n < maxSteps; n++) {
    const waiting = Number.isFinite(struck)
    const lamp1 = waiting
      ? { current: held, conductance: 0 }
      : read(lit ? tables.glow : tables.dark, v)
    const rate = (spare(v) - lamp1.current) / capacitance
    const pace =
      capacitance / (1 / feed + 1 / stage.leakageResistance + Math.max(0, lamp1.conductance))
    let step = Math.min(finest / Math.abs(rate), 0.02 * pace)
    const since = time - out
    if (!lit && since < 30 * lamp.recoveryTime) step = Math.min(step, 0.002 * lamp.recoveryTime)
    if (waiting) step = Math.min(step, Math.max(struck - time, 0) + 1e-15)
    if (Math.abs(rate) * pace < 1e-7 * supplyVoltage && !waiting) {
      return { seen: 'rests', period: Number.NaN, highVoltage: v, lowVoltage: v }
    }
    const there = v + rate * step
    const lamp2 = waiting ? lamp1 : read(lit ? tables.glow : tables.dark, there)
    v += (step / 2) * (rate + (spare(there) - lamp2.current) / capacitance)
    time += step
    high = Math.max(high, v)
    if (lit) {
      if (read(tables.glow, v).current > last.current) {
        return { seen: 'over range', period, highVoltage: high, lowVoltage: v }
      }
      if (v <= extinction) {
        v = extinction
        lit = false
        flashes++
        period = time - out
        out = time
        if (flashes === 4) return { seen: 'flashes', period, highVoltage: high, lowVoltage: v }
        high = 0
      }
      continue
    }
    const back =
      lamp.recoveryTime > 0 && time > out
        ? extinction + (strike - extinction) * (1 - Math.exp(-(time - out) / lamp.recoveryTime))
        : strike
    if (!waiting && v >= Math.min(back, strike)) {
      if (time - out < 0.01 * lamp.recoveryTime && v - extinction < 2 * finest) {
        return { seen: 'rests', period: Number.NaN, highVoltage: v, lowVoltage: v }
      }
      struck = time + lamp.strikeDelay
      held = read(tables.dark, v).current
    }
    if (time >= struck) {
      if (v > highest) return { seen: 'over range', period, highVoltage: high, lowVoltage: v }
      lit = true
      struck = Number.POSITIVE_INFINITY
    }
  }
  return { seen: 'undecided', period, highVoltage: high, lowVoltage: v }
}
