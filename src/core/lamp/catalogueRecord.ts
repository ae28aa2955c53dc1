import { formatQuantity } from '../quantity/formatQuantity'
import type { Unit } from '../quantity/units'
import type { CatalogueEntry } from './catalogue'
import type { Figure } from './catalogueFigure'
import type { LampFact, LampRecord, Span } from './lampRecord'
import { peakOfAcRating } from './ratings'

function fact(label: string, figure: Figure<unknown>, value: string): LampFact {
  return { label, value, source: figure.source, guessed: figure.basis === 'guessed' }
}

function amount(label: string, figure: Figure | null, unit: Unit): LampFact[] {
  return figure === null ? [] : [fact(label, figure, formatQuantity(figure.value, unit))]
}

function span(label: string, figure: Figure<Span>): LampFact {
  const { low, typical, high } = figure.value
  const [least, usual, most] = [low, typical, high].map((value) => formatQuantity(value, 'V'))
  return fact(label, figure, `${least} to ${most}, typically ${usual}`)
}

/** What the catalogue says of a kind of lamp, one fact after another, each with its source. */
export function factsOf(entry: CatalogueEntry): readonly LampFact[] {
  const { family, strikeAc, strikeDc, life } = entry
  const industry = entry.industryNumber
  const facts = [
    ...(industry === null ? [] : [fact('Industry number', industry, industry.value)]),
    fact('Brightness', entry.brightness, entry.brightness.value),
    fact('Filling', family.fill, family.fill.value),
  ]
  if (strikeAc !== null) {
    const { step } = peakOfAcRating(strikeAc.value, strikeDc?.value ?? null)
    facts.push(fact('Strike, at most', strikeAc, step))
  }
  if (life !== null) {
    const hours = Math.round(life.value / 3600)
      .toLocaleString('en')
      .replaceAll(',', '\u00A0')
    facts.push(fact('Life at design current', life, `${hours}\u00A0h`))
  }
  return [
    ...facts,
    ...amount('Design current', entry.designCurrent, 'A'),
    ...amount('Resistor on 105–125 V ac', entry.seriesResistor, 'Ω'),
    ...amount('Holding voltage', family.holding, 'V'),
    span('Strike of single lamps', family.spread.strike),
    span('Extinction of single lamps', family.spread.extinction),
    fact('Typical curve', family.knots, `${family.knots.value.length} knots`),
    {
      label: 'Recovery time and strike delay',
      value: 'not known; left at none',
      source: 'not stated for any of these lamps; deionisation of 50 µs to 1 ms is from memory',
      guessed: true,
    },
  ]
}

/** The typical lamp of a catalogue entry, with its spread and with every figure's source. */
export function recordOf(entry: CatalogueEntry): LampRecord {
  const { family } = entry
  return {
    name: entry.name,
    note: '',
    origin: 'catalogue',
    knots: family.knots.value,
    reverseKnots: null,
    baseResistance: 0,
    recoveryTime: 0,
    strikeDelay: 0,
    spread: { strike: family.spread.strike.value, extinction: family.spread.extinction.value },
    facts: factsOf(entry),
    measured: null,
  }
}
