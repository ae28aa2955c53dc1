import * as v from 'valibot'
import { faultInKnots, type LampOrigin, lampOrigins } from '../../core'
import { designLimits, knotCount, type Limit, textLimits } from '../designLimits'
import { isPlainData } from './lampPlainData'

/** Longest texts of a lamp, in UTF-16 units, and most facts. The name is as long as in a design. */
export const lampLimits = {
  name: textLimits.lampName.most,
  note: textLimits.note.most,
  label: 80,
  value: 200,
  source: 400,
  facts: 60,
} as const

const text = (most: number) => v.pipe(v.string(), v.maxLength(most))

const number = ({ least, most }: Limit) =>
  v.pipe(
    v.number(),
    v.finite(),
    v.minValue(least),
    v.maxValue(most),
    // JSON can hold −0; a part cannot.
    v.transform((value) => (value === 0 ? 0 : value)),
  )

const volts = number(designLimits.voltage)

const knot = v.object({ current: number(designLimits.current), voltage: volts })

const knots = v.pipe(
  v.array(v.unknown()),
  // Counted before each is looked at, so that a huge list is refused at once.
  v.maxLength(knotCount.most),
  v.array(knot),
  v.check((list) => faultInKnots(list) === null),
)

const span = v.pipe(
  v.object({ low: volts, typical: volts, high: volts }),
  v.check(({ low, typical, high }) => low <= typical && typical <= high),
)

const fact = v.object({
  label: text(lampLimits.label),
  value: text(lampLimits.value),
  source: text(lampLimits.source),
  guessed: v.boolean(),
})

/** A lamp with named fields, as files and storage of format 1 hold it. Never changes. */
export const lampSchema1 = v.object({
  name: text(lampLimits.name),
  note: text(lampLimits.note),
  origin: v.picklist<LampOrigin[]>([...lampOrigins]),
  knots,
  reverseKnots: v.nullable(knots),
  baseResistance: number(designLimits.leadResistance),
  recoveryTime: number(designLimits.recoveryTime),
  strikeDelay: number(designLimits.strikeDelay),
  spread: v.nullable(v.object({ strike: span, extinction: span })),
  facts: v.pipe(v.array(v.unknown()), v.maxLength(lampLimits.facts), v.array(fact)),
  measured: v.custom(isPlainData),
})
