import { type Knot, kneeIndexOf } from '../stage/lamp'

/** Index of the valley: the last knot of the first falling region, a level foot included at its start. */
function valleyIndexOf(knots: readonly Knot[], knee: number): number {
  let valley = knee
  for (let i = knee + 1; i < knots.length; i++) {
    const { voltage } = knots[i] as Knot
    if (voltage > (knots[i - 1] as Knot).voltage) break
    if (voltage < (knots[valley] as Knot).voltage) valley = i
  }
  return valley
}

/** Strike and first extinction voltage of a characteristic, V; null where it never falls. */
export function thresholdsOf(
  knots: readonly Knot[],
): { readonly strike: number; readonly extinction: number } | null {
  const knee = kneeIndexOf(knots)
  if (knee === null) return null
  const valley = valleyIndexOf(knots, knee)
  return {
    strike: (knots[knee] as Knot).voltage,
    extinction: (knots[valley] as Knot).voltage,
  }
}

/**
 * Moves a characteristic so that its strike and extinction voltages change by the given volts: the dark
 * branch stretches with the knee, the falling region between knee and valley stretches with both, and all
 * from the valley on is lifted with it. Currents stay. Null where the thresholds would meet or fall to
 * nothing, or where there are none.
 */
export function movedKnots(
  knots: readonly Knot[],
  strikeShift: number,
  extinctionShift: number,
): readonly Knot[] | null {
  const knee = kneeIndexOf(knots)
  if (knee === null) return null
  const valley = valleyIndexOf(knots, knee)
  const strike = (knots[knee] as Knot).voltage
  const extinction = (knots[valley] as Knot).voltage
  const newStrike = strike + strikeShift
  const newExtinction = extinction + extinctionShift
  if (!(newStrike > newExtinction && newExtinction > 0)) return null
  const stretch = (newStrike - newExtinction) / (strike - extinction)
  const moved = knots.map(({ current, voltage }, i) => {
    // A level top stays level: no rounding between its knots.
    if (i <= knee && voltage === strike) return { current, voltage: newStrike }
    if (i < knee) return { current, voltage: (voltage * newStrike) / strike }
    if (i >= valley) return { current, voltage: voltage + extinctionShift }
    return { current, voltage: newExtinction + (voltage - extinction) * stretch }
  })
  return moved.every(({ voltage }) => voltage >= 0) ? moved : null
}
