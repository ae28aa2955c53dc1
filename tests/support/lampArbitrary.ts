import fc from 'fast-check'
import type { Knot, Stage } from '../../src/core/index'

const fine = 2 ** 30

// fc.double spreads over the patterns of bits, so that nearly all its numbers are next to nothing.
const share = fc.noBias(fc.integer({ min: 0, max: fine })).map((n) => n / fine)

/** A value spread evenly between two limits. */
export const evenly = (low: number, high: number): fc.Arbitrary<number> =>
  share.map((part) => low + (high - low) * part)

/** A value spread evenly by ratio between two limits. */
export const byRatio = (low: number, high: number): fc.Arbitrary<number> =>
  share.map((part) => Math.min(high, Math.max(low, low * (high / low) ** part)))

type Piece = { readonly run: 'rise' | 'fall' | 'flat'; readonly by: number; readonly wider: number }

/** How far apart the currents of a lamp may lie. */
export type Spread = {
  readonly knee: readonly [number, number]
  readonly step: readonly [number, number]
}

const anySpread: Spread = { knee: [1e-9, 1e-5], step: [1.2, 1000] }

/** Currents within a few decades, so that a simulation in small steps gets round a cycle. */
export const closeSpread: Spread = { knee: [1e-4, 1e-3], step: [1.4, 5] }

/**
 * A lamp's knots, 3 to 9 of them: up to a knee, down to a valley, then rising, falling and flat runs in any
 * order. Mostly the last knot lies above all others, as where the data reaches into the abnormal glow;
 * otherwise a strike may land beyond the data.
 */
export function knotRows(spread: Spread = anySpread): fc.Arbitrary<Knot[]> {
  const piece: fc.Arbitrary<Piece> = fc.record({
    run: fc.constantFrom('rise', 'rise', 'fall', 'fall', 'flat'),
    by: share,
    wider: byRatio(...spread.step),
  })
  return fc
    .record({
      knee: evenly(40, 110),
      current: byRatio(...spread.knee),
      start: fc.option(fc.record({ level: share, current: share }), { nil: null }),
      first: piece,
      rest: fc.array(piece, { maxLength: 5 }),
      reaches: fc.constantFrom(true, true, true, true, true, true, true, false),
    })
    .map(({ knee, current, start, first, rest, reaches }) => {
      const knots: Knot[] = [{ current: 0, voltage: 0 }]
      if (start !== null) {
        knots.push({
          current: current * (0.1 + 0.8 * start.current),
          voltage: knee * (0.3 + 0.6 * start.level),
        })
      }
      knots.push({ current, voltage: knee })
      let last = knots.at(-1) as Knot
      for (const { run, by, wider } of [{ ...first, run: 'fall' as const }, ...rest]) {
        const voltage =
          run === 'flat'
            ? last.voltage
            : run === 'fall'
              ? last.voltage * (0.4 + 0.58 * by)
              : last.voltage * (1.02 + 0.8 * by)
        last = { current: last.current * wider, voltage }
        knots.push(last)
      }
      if (reaches) {
        const highest = Math.max(...knots.map((knot) => knot.voltage))
        const tail = { current: last.current * first.wider, voltage: highest * (1.05 + first.by) }
        if (knots.length < 9) knots.push(tail)
        else knots[knots.length - 1] = { ...last, voltage: tail.voltage }
      }
      return knots
    })
}

/** Which of a stage's complications may occur; all of them unless told. */
export type Allowed = {
  readonly recovery?: boolean
  readonly delay?: boolean
  readonly leakage?: boolean
  readonly lead?: boolean
  readonly spread?: Spread
}

/**
 * A stage round such a lamp: supply a little under to well over the first knee, and a resistance that takes
 * the load line somewhere about the first falling region, so that all verdicts come up and flashing often.
 */
export function stages(allowed: Allowed = {}): fc.Arbitrary<Stage> {
  const { recovery = true, delay = true, leakage = true, lead = true } = allowed
  const sometimes = (wanted: boolean, values: fc.Arbitrary<number>, otherwise: number) =>
    wanted
      ? fc.oneof({ weight: 2, arbitrary: fc.constant(otherwise) }, { weight: 1, arbitrary: values })
      : fc.constant(otherwise)
  return knotRows(allowed.spread).chain((knots) => {
    const kneeIndex = knots.findIndex(
      (knot, index) => (knots[index + 1]?.voltage ?? knot.voltage) < knot.voltage,
    )
    const knee = knots[kneeIndex] as Knot
    const valley = knots[kneeIndex + 1] as Knot
    return fc
      .record({
        supplyVoltage: evenly(0.95, 2.5).map((ratio) => ratio * knee.voltage),
        part: evenly(-0.2, 1.2),
        sourceShare: sometimes(true, share, 0),
        capacitance: byRatio(1e-9, 1e-6),
        leakageRatio: sometimes(leakage, byRatio(2, 2000), Number.POSITIVE_INFINITY),
        leadShare: sometimes(lead, byRatio(1e-3, 0.7), 0),
        recoveryTime: sometimes(recovery, byRatio(1e-6, 1e-2), 0),
        strikeDelay: sometimes(delay, byRatio(1e-6, 1e-2), 0),
      })
      .map((drawn): Stage => {
        const current = knee.current * (valley.current / knee.current) ** drawn.part
        const resistance = Math.max(1, (drawn.supplyVoltage - 0.85 * knee.voltage) / current)
        const slope = (knee.voltage - valley.voltage) / (valley.current - knee.current)
        return {
          supplyVoltage: drawn.supplyVoltage,
          sourceResistance: 0.5 * resistance * drawn.sourceShare,
          seriesResistance: resistance * (1 - 0.5 * drawn.sourceShare),
          capacitance: drawn.capacitance,
          leakageResistance: drawn.leakageRatio * resistance,
          leadResistance: drawn.leadShare * slope,
          lamp: { knots, recoveryTime: drawn.recoveryTime, strikeDelay: drawn.strikeDelay },
        }
      })
  })
}
