import type { Design } from '../../core'

/** A design with named fields; no leakage is null, as JSON has no infinity. */
export function nameFormat1(design: Design): unknown {
  const { leakageResistance, lamp: ownLamp, strayCapacitance, ...rest } = design.stage
  return {
    title: design.title,
    note: design.note,
    lampName: design.lampName,
    stage: {
      supplyVoltage: rest.supplyVoltage,
      sourceResistance: rest.sourceResistance,
      seriesResistance: rest.seriesResistance,
      capacitance: rest.capacitance,
      leakageResistance: leakageResistance === Number.POSITIVE_INFINITY ? null : leakageResistance,
      leadResistance: rest.leadResistance,
      ...(strayCapacitance === undefined ? {} : { strayCapacitance }),
      lamp: {
        recoveryTime: ownLamp.recoveryTime,
        strikeDelay: ownLamp.strikeDelay,
        knots: ownLamp.knots.map(({ current, voltage }) => ({ current, voltage })),
      },
    },
  }
}

/** The same as lists: texts, numbers in a fixed order, then current and voltage knot by knot. */
export function packFormat1(design: Design): unknown {
  const { stage: own } = design
  const numbers = [
    own.supplyVoltage,
    own.sourceResistance,
    own.seriesResistance,
    own.capacitance,
    own.leakageResistance === Number.POSITIVE_INFINITY ? null : own.leakageResistance,
    own.leadResistance,
    own.lamp.recoveryTime,
    own.lamp.strikeDelay,
  ]
  // The first knot is (0, 0) in every design and need not travel.
  const knots = own.lamp.knots.slice(1).flatMap(({ current, voltage }) => [current, voltage])
  const stray = own.strayCapacitance === undefined ? [] : [own.strayCapacitance]
  return [design.title, design.note, design.lampName, [...numbers, ...stray], knots]
}
