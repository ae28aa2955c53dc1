import * as v from 'valibot'
import { faultInKnots } from '../../core'
import { designLimits, knotCount, type Limit, textLimits } from '../designLimits'

const number = ({ least, aboveLeast, most }: Limit) =>
  v.pipe(
    v.number(),
    v.finite(),
    aboveLeast ? v.gtValue(least) : v.minValue(least),
    v.maxValue(most),
    // JSON can hold −0; a part cannot.
    v.transform((value) => (value === 0 ? 0 : value)),
  )

const text = ({ most }: { readonly most: number }) => v.pipe(v.string(), v.maxLength(most))

const knot = v.object({
  current: number(designLimits.current),
  voltage: number(designLimits.voltage),
})

const lamp = v.object({
  knots: v.pipe(
    v.array(v.unknown()),
    // Counted before each is looked at, so that a huge list is refused at once.
    v.maxLength(knotCount.most),
    v.array(knot),
    v.check((knots) => faultInKnots(knots) === null),
  ),
  recoveryTime: number(designLimits.recoveryTime),
  strikeDelay: number(designLimits.strikeDelay),
})

const stage = v.object({
  supplyVoltage: number(designLimits.supplyVoltage),
  sourceResistance: number(designLimits.sourceResistance),
  seriesResistance: number(designLimits.seriesResistance),
  capacitance: number(designLimits.capacitance),
  leakageResistance: v.nullable(number(designLimits.leakageResistance)),
  leadResistance: number(designLimits.leadResistance),
  lamp,
  strayCapacitance: v.optional(number(designLimits.strayCapacitance)),
})

/** A design with named fields, as files of format 1 hold it. */
export const namedFormat1 = v.object({
  title: text(textLimits.title),
  note: text(textLimits.note),
  lampName: text(textLimits.lampName),
  stage,
})

/** The outer shape of a packed design: texts, numbers in order, currents and voltages in turn. */
export const packedFormat1 = v.strictTuple([
  v.string(),
  v.string(),
  v.string(),
  v.pipe(v.array(v.nullable(v.number())), v.minLength(8), v.maxLength(9)),
  v.pipe(v.array(v.number()), v.maxLength(2 * knotCount.most)),
])
