import {
  type Design,
  detailsOf,
  faultInConditions,
  faultInKnots,
  type Knot,
  type Lamp,
  type LampDetails,
  type Stage,
} from '../core'
import { type DesignNumber, designLimits, knotCount, textLimits } from '../io/designLimits'

/**
 * A number moved into its range. Where it is no number, or not above a range that must be
 * exceeded, it is the one before. An infinite leakage stays: it means none.
 */
export function constrainNumber(field: DesignNumber, wanted: number, before: number): number {
  const { least, aboveLeast, most } = designLimits[field]
  if (Number.isNaN(wanted) || (aboveLeast && wanted <= least)) return before
  if (field === 'leakageResistance' && wanted === Number.POSITIVE_INFINITY) return wanted
  const inside = Math.min(most, Math.max(least, wanted))
  // A part has no negative zero.
  return inside === 0 ? 0 : inside
}

/** A stage with every number in its range; knots that are no characteristic stay as before. */
function constrainStage(wanted: Stage, before: Stage): Stage {
  const number = (field: Exclude<keyof Stage, 'lamp' | 'strayCapacitance'>) =>
    constrainNumber(field, wanted[field], before[field])
  const { strayCapacitance } = wanted
  const stray =
    strayCapacitance === undefined
      ? undefined
      : constrainNumber('strayCapacitance', strayCapacitance, before.strayCapacitance ?? Number.NaN)
  return {
    supplyVoltage: number('supplyVoltage'),
    sourceResistance: number('sourceResistance'),
    seriesResistance: number('seriesResistance'),
    capacitance: number('capacitance'),
    leakageResistance: number('leakageResistance'),
    leadResistance: number('leadResistance'),
    lamp: constrainLamp(wanted.lamp, before.lamp),
    ...(stray === undefined || Number.isNaN(stray) ? {} : { strayCapacitance: stray }),
  }
}

/** A design with its texts cut to length and its stage constrained. */
export function constrainDesign(wanted: Design, before: Design): Design {
  return {
    title: cut(wanted.title, textLimits.title.most),
    note: cut(wanted.note, textLimits.note.most),
    lampName: cut(wanted.lampName, textLimits.lampName.most),
    stage: constrainStage(wanted.stage, before.stage),
    ...(wanted.lampDetails === undefined
      ? {}
      : { lampDetails: constrainDetails(wanted.lampDetails, detailsOf(before)) }),
  }
}

/** Details of a lamp with its texts cut; what is impossible stays as before. */
function constrainDetails(wanted: LampDetails, before: LampDetails): LampDetails {
  const { otherWay, conditions } = wanted
  return {
    ...wanted,
    note: cut(wanted.note, textLimits.note.most),
    baseResistance: constrainNumber('baseResistance', wanted.baseResistance, before.baseResistance),
    otherWay: otherWay === null || problemWithKnots(otherWay) === null ? otherWay : before.otherWay,
    conditions: faultInConditions(conditions) === null ? conditions : before.conditions,
  }
}

/** Why these knots cannot be a lamp's in a design; null if they can. */
export function problemWithKnots(knots: readonly Knot[]): string | null {
  const fault = faultInKnots(knots)
  if (fault !== null) return fault
  if (knots.length > knotCount.most) {
    return `A characteristic has at most ${knotCount.most} knots; this one has ${knots.length}.`
  }
  const outside = knots.findIndex(
    ({ current, voltage }) =>
      current > designLimits.current.most || voltage > designLimits.voltage.most,
  )
  return outside < 0 ? null : `Knot ${outside + 1} lies beyond 100 A or 20 kV.`
}

function constrainLamp(wanted: Lamp, before: Lamp): Lamp {
  const time = (field: 'recoveryTime' | 'strikeDelay') =>
    constrainNumber(field, wanted[field], before[field])
  return {
    knots: problemWithKnots(wanted.knots) === null ? wanted.knots : before.knots,
    recoveryTime: time('recoveryTime'),
    strikeDelay: time('strikeDelay'),
  }
}

/** Cut to a length, never through the middle of a character beyond the basic plane. */
function cut(text: string, most: number): string {
  const short = text.slice(0, most)
  return text.length > most ? short.replace(/[\uD800-\uDBFF]$/, '') : short
}
