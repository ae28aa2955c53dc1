import { type Change, formatQuantity, type Solution, type Stage } from '../../core'

/** The verdict as a person reads it: one sentence with numbers, and what goes with it. */
export type VerdictWords = {
  /** The verdict's own words, e.g. "Flashes". */
  readonly verdict: string
  /** The rest of the sentence, with what joins it to the verdict: a space or a colon. */
  readonly sentence: string
  /** What to change, how far from the edge, or what to mind; may be empty. */
  readonly advice: string
}

const volts = (value: number) => formatQuantity(value, 'V')
const ohms = (value: number) => formatQuantity(value, 'Ω')
const amps = (value: number) => formatQuantity(value, 'A')

/** Two values to compare, with as many figures as it takes for them to read differently. */
function apart(first: number, second: number, unit: 'V' | 'A'): readonly [string, string] {
  for (let figures = 3; figures < 9; figures++) {
    const written = [first, second].map((value) => formatQuantity(value, unit, figures))
    const [one = '', other = ''] = written
    if (one !== other) return [one, other]
  }
  return [formatQuantity(first, unit), formatQuantity(second, unit)]
}

/** Fastest known single-lamp oscillators, Hz [Braga, institute article min375]. */
const fastestKnown = 20e3

/** Puts a solution into words. */
export function verdictWords(stage: Stage, solution: Solution): VerdictWords {
  const verdict = solution.verdict.charAt(0).toUpperCase() + solution.verdict.slice(1)
  return { verdict, sentence: sentenceFor(stage, solution), advice: adviceFor(stage, solution) }
}

function sentenceFor(stage: Stage, solution: Solution): string {
  const { reason, cycle, operatingPoints } = solution
  const { strike, extinction } = reason
  const strikeAt = strike === null ? '' : volts(strike.voltage)
  const outAt = extinction === null ? '' : volts(extinction.voltage)
  const lit = operatingPoints.find((point) => point.lit && point.stable)
  const dark = operatingPoints.find((point) => !point.lit && point.stable)
  const series = ohms(stage.seriesResistance)
  switch (reason.code) {
    case 'between knee and valley': {
      if (cycle === null) return ''
      const swing = `the capacitor swings between ${volts(cycle.lowVoltage)} and ${volts(cycle.highVoltage)}`
      return cycle.frequency >= 1
        ? ` ${rate(cycle.frequency)}, every ${formatQuantity(cycle.period, 's')}; ${swing}.`
        : ` once every ${formatQuantity(cycle.period, 's')}; ${swing}.`
    }
    case 'supply below strike': {
      const [supply, needed] = apart(stage.supplyVoltage, strike?.voltage ?? 0, 'V')
      return stage.supplyVoltage === strike?.voltage
        ? `: the supply’s ${supply} only just reaches strike voltage.`
        : `: the supply’s ${supply} does not reach the ${needed} at which the lamp strikes.`
    }
    case 'leakage holds it below strike': {
      const [reached, needed] = apart(dark?.capacitorVoltage ?? 0, strike?.voltage ?? 0, 'V')
      return `: with ${ohms(stage.leakageResistance)} of leakage the capacitor gets no further than ${reached}; the lamp strikes at ${needed}.`
    }
    case 'too little current at the knee': {
      const [left, taken] = apart(Math.max(0, reason.currentAtStrike), strike?.current ?? 0, 'A')
      return `: at ${strikeAt} only ${left} is left for the lamp, which takes ${taken} there before it strikes.`
    }
    case 'too much current at the valley': {
      const [flows, most] = apart(reason.currentAtExtinction, extinction?.current ?? 0, 'A')
      return ` at ${amps(lit?.current ?? 0)}: at ${outAt} it would go out, but ${flows} flows there, more than the ${most} below which it does.`
    }
    case 'cannot recover':
      return ` at ${amps(lit?.current ?? 0)}: it never lets go, because ${formatQuantity(solution.capacitance, 'F')} charges faster than its strike voltage comes back (recovery time ${formatQuantity(stage.lamp.recoveryTime, 's')}).`
    case 'no falling region':
      return stage.leadResistance > 0
        ? `: with ${ohms(stage.leadResistance)} in its lead the lamp has no falling region left, so it cannot flash.`
        : ': this characteristic has no falling region, so it cannot flash.'
    case 'two rests':
      return `: it can rest dark at ${volts(dark?.capacitorVoltage ?? 0)} and lit at ${amps(lit?.current ?? 0)}, and stays as it was put; from switch-on it stays dark.`
    case 'strike beyond the data':
    case 'current beyond the data': {
      const last = stage.lamp.knots.at(-1)
      return `: ${reason.code === 'strike beyond the data' ? `when it strikes at ${strikeAt},` : `through ${series},`} more flows than the ${amps(last?.current ?? 0)} where the characteristic ends. Treat it as an arc: it destroys the lamp.`
    }
  }
}

/** "2.52 times a second", "at 1.2 kHz". */
function rate(frequency: number): string {
  return frequency < 1000
    ? `${formatQuantity(frequency, '')} times a second`
    : `at ${formatQuantity(frequency, 'Hz')}`
}

function adviceFor(stage: Stage, solution: Solution): string {
  const { margin, window, reason, cycle, strayOnly } = solution
  const sentences: string[] = []
  if (cycle !== null && margin !== null && window !== null) {
    const low =
      window.min > 0
        ? `${ratio(margin.toLit)} the ${ohms(window.min)} below which it stays lit`
        : 'free to go down to nothing'
    sentences.push(
      `Its series resistor, ${ohms(stage.seriesResistance)}, is ${low}, and ${fraction(margin.toDark)} the ${ohms(window.max)} above which it stays dark.`,
    )
    if (margin.toLit < 1.2 || margin.toDark < 1.2) {
      sentences.push(
        'That is close to the edge: another lamp or a part at its tolerance may not flash.',
      )
    }
    if (cycle.periodDeviation > 0) {
      sentences.push(
        `The strike delay makes each period differ, by ${formatQuantity(cycle.periodDeviation, 's', 2)} (standard deviation).`,
      )
    }
    if (cycle.overRangeChance > 1e-6) {
      sentences.push('A long wait can carry a strike beyond the end of the characteristic.')
    }
    if (cycle.frequency > fastestKnown) {
      sentences.push(
        `Single lamps are not known to go faster than about ${formatQuantity(fastestKnown, 'Hz')}: expect a dim, steady glow instead.`,
      )
    }
  } else if (reason.remedies.length > 0) {
    sentences.push(
      strayOnly
        ? `To flash it needs a capacitor, ${remedyWords(reason.remedies)}.`
        : `It would flash ${remedyWords(reason.remedies)}.`,
    )
  } else if (reason.code !== 'no falling region') {
    sentences.push('No single change of supply or series resistor makes this one flash.')
  }
  if (strayOnly) {
    sentences.push(
      `No capacitor is fitted: ${formatQuantity(solution.capacitance, 'F')} of stray capacitance is reckoned with.`,
    )
  }
  return sentences.join(' ')
}

const ratio = (value: number) => `${formatQuantity(value, '', 2)} times`

/** "a hundredth of", "0.44 of": the present value against a limit `times` as large. */
function fraction(times: number): string {
  return times >= 2
    ? `1/${formatQuantity(times, '', 2)} of`
    : `${formatQuantity(1 / times, '', 2)} of`
}

/** "with a series resistor of 1.06 MΩ or more, or …": the remedies, the smallest change first. */
export function remedyWords(remedies: Solution['reason']['remedies']): string {
  return remedies
    .slice(0, 3)
    .map((changes) => `with ${changes.map(changeWords).join(' together with ')}`)
    .join(', or ')
}

const quantities: Readonly<Record<Change['quantity'], { name: string; unit: 'V' | 'Ω' | 'F' }>> = {
  supplyVoltage: { name: 'a supply of', unit: 'V' },
  seriesResistance: { name: 'a series resistor of', unit: 'Ω' },
  capacitance: { name: 'a capacitor of', unit: 'F' },
  leakageResistance: { name: 'leakage of', unit: 'Ω' },
  leadResistance: { name: 'a lead resistor of', unit: 'Ω' },
}

function changeWords({ quantity, sense, value }: Change): string {
  const { name, unit } = quantities[quantity]
  // Rounded to the safe side of the limit, so that the number printed is one that works.
  return `${name} ${formatQuantity(past(value, sense), unit)} or ${sense === 'at least' ? 'more' : 'less'}`
}

/** A limit rounded to three figures on the side that lies past it. */
export function past(value: number, sense: Change['sense']): number {
  if (!(value > 0)) return value
  const step = 10 ** (Math.floor(Math.log10(value)) - 2)
  const count =
    sense === 'at least' ? Math.ceil(value / step + 1e-9) : Math.floor(value / step - 1e-9)
  return Number((count * step).toPrecision(3))
}
