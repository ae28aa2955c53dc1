import { formatQuantity } from '../quantity/formatQuantity'
import type { Knot, Lamp } from '../stage/lamp'
import { faultInConditions, type LampConditions } from './conditionsDefaults'
import { movedKnots, thresholdsOf } from './conditionsMove'

/** A lamp under conditions. */
export type LampUnder =
  | {
      readonly ok: true
      readonly lamp: Lamp
      /** Change of strike and extinction voltage, V, and of the strike delay, s. */
      readonly strikeShift: number
      readonly extinctionShift: number
      readonly delayGrowth: number
      /** What the conditions do, for the verdict; empty where they do nothing. */
      readonly sentences: readonly string[]
    }
  | { readonly ok: false; readonly reason: string }

/** Change that one condition makes. */
type Shift = {
  readonly strike: number
  readonly extinction: number
  readonly delay: number
  readonly sentence: string
}

/**
 * The lamp as it is in given surroundings, at a temperature and after some use. Every effect is a plain
 * shift of the two thresholds or of the delay, added up; ageing grows evenly with use, and no further past
 * the end of life. Effects and what they rest on: `defaultEffects`, `conditionSources`.
 */
export function lampUnder(lamp: Lamp, conditions: LampConditions): LampUnder {
  const fault = faultInConditions(conditions)
  if (fault !== null) return { ok: false, reason: fault }
  const shifts = conditions.on
    ? [ofSurroundings(conditions), ofTemperature(conditions), ofUse(conditions)].filter(
        (shift) => shift !== null,
      )
    : []
  const total = (of: 'strike' | 'extinction' | 'delay') =>
    shifts.reduce((sum, shift) => sum + shift[of], 0)
  const [strikeShift, extinctionShift] = [total('strike'), total('extinction')]
  const delayGrowth = total('delay')
  const sentences = shifts.map(({ sentence }) => sentence)
  const strikeDelay = lamp.strikeDelay + delayGrowth
  const changes = { strikeShift, extinctionShift, delayGrowth }
  if (strikeShift === 0 && extinctionShift === 0) {
    const same = delayGrowth === 0 ? lamp : { ...lamp, strikeDelay }
    return { ok: true, lamp: same, ...changes, sentences }
  }
  const before = thresholdsOf(lamp.knots)
  if (before === null) {
    return {
      ok: false,
      reason: 'This characteristic never falls, so it has no strike voltage that could shift.',
    }
  }
  const knots = movedKnots(lamp.knots, strikeShift, extinctionShift)
  if (knots === null) {
    const [strike, extinction] = [before.strike + strikeShift, before.extinction + extinctionShift]
    return {
      ok: false,
      reason: `Under these conditions strike would be ${volts(strike)} and extinction ${volts(extinction)}: that is no glow lamp any more. Look at the effects.`,
    }
  }
  const end = (knots.at(-1) as Knot).voltage
  if (before.strike + strikeShift > end) {
    sentences.push(
      `Strike then lies at ${volts(before.strike + strikeShift)}, above the ${volts(end)} at which the characteristic ends: measure further up, or limit the current in the lamp's lead.`,
    )
  }
  return { ok: true, lamp: { ...lamp, knots, strikeDelay }, ...changes, sentences }
}

const volts = (value: number) => formatQuantity(value, 'V')

/** "3 V later" or "3 V earlier". */
const late = (shift: number) =>
  `${formatQuantity(Math.abs(shift), 'V', 2)} ${shift > 0 ? 'later' : 'earlier'}`

function ofSurroundings({ surroundings, effects }: LampConditions): Shift | null {
  if (surroundings === 'lit') return null
  const { strikeRise, delayGrowth } = effects[surroundings]
  if (strikeRise === 0 && delayGrowth === 0) return null
  const where = surroundings === 'dark' ? 'In the dark' : 'In dim light'
  const parts: string[] = []
  if (strikeRise !== 0) parts.push(`strikes up to ${late(strikeRise)}`)
  if (delayGrowth > 0) {
    parts.push(`waits up to ${formatQuantity(delayGrowth, 's', 2)} longer on average`)
  }
  const sentence = `${where} it ${parts.join(' and ')}.`
  return { strike: strikeRise, extinction: 0, delay: delayGrowth, sentence }
}

function ofTemperature({ temperature, effects }: LampConditions): Shift | null {
  const shift = effects.perKelvin * (temperature - effects.referenceTemperature)
  if (shift === 0) return null
  const written = String(temperature).replace('-', '\u2212')
  const size = formatQuantity(Math.abs(shift), 'V', 2)
  const sentence = `At ${written}\u00A0°C strike and extinction lie ${size} ${shift > 0 ? 'higher' : 'lower'}.`
  return { strike: shift, extinction: shift, delay: 0, sentence }
}

function ofUse({ timeOfUse, effects }: LampConditions): Shift | null {
  const part = Math.min(1, timeOfUse / effects.life)
  const strike = part * effects.strikeAtEnd
  const extinction = part * effects.extinctionAtEnd
  if (strike === 0 && extinction === 0) return null
  const after = part === 1 ? 'At the end of its life' : `After ${formatQuantity(timeOfUse, 's', 2)}`
  const sentence = `${after} of glowing it strikes about ${late(strike)} and goes out ${formatQuantity(Math.abs(extinction), 'V', 2)} ${extinction > 0 ? 'higher' : 'lower'}.`
  return {
    strike,
    extinction,
    delay: 0,
    sentence: part === 1 ? sentence.replace(' of glowing', '') : sentence,
  }
}
