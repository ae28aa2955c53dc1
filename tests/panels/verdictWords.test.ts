import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  type Change,
  formatQuantity,
  parseQuantity,
  type ReasonCode,
  type Stage,
  solveStage,
} from '../../src/core'
import { past, remedyWords, verdictWords } from '../../src/panels/words/verdictWords'
import { examples } from '../../src/state/examples'
import { anyStage, extremeStages } from '../chart/drawing'
import { byRatio, stages } from '../support/lampArbitrary'
import { knotsOf, stageOf } from '../support/stages'

const plain = (text: string) => text.replaceAll('\u00A0', ' ')

/** The words for a stage, with plain spaces, and the reason behind them. */
function wordsFor(stage: Stage) {
  const solution = solveStage(stage)
  const { verdict, sentence, advice } = verdictWords(stage, solution)
  return {
    solution,
    code: solution.reason.code,
    whole: plain(`${verdict}${sentence}`),
    advice: plain(advice),
  }
}

/** One stage for each reason there is, and what the sentence must say of it. */
const reasons: Readonly<Record<ReasonCode, readonly [Stage, RegExp]>> = {
  // 2.2 MΩ · 0.47 µF · ln((120 − 55)/(120 − 75)), nearly: 0.38 s.
  'between knee and valley': [
    stageOf(),
    /^Flashes 2\.\d+ times a second, every 3\d\d ms; the capacitor swings between 55 V and 75 V\.$/,
  ],
  'supply below strike': [
    stageOf({ supplyVoltage: 68 }),
    /^Stays dark: the supply’s 68 V does not reach the 75 V at which the lamp strikes\.$/,
  ],
  // 120 V halved by equal resistances, less the little that the lamp takes.
  'leakage holds it below strike': [
    stageOf({ leakageResistance: 2.2e6 }),
    /^Stays dark: with 2\.2 MΩ of leakage the capacitor gets no further than 59\.\d V; the lamp strikes at 75 V\.$/,
  ],
  // (120 V − 75 V)/1 GΩ.
  'too little current at the knee': [
    stageOf({ seriesResistance: 1e9 }),
    /^Stays dark: at 75 V only 45 nA is left for the lamp, which takes 200 nA there before it strikes\.$/,
  ],
  // (150 V − 55 V)/33 kΩ = 2.88 mA; crossing of the load line with 60 V + (I − 0.6 mA)·3243 Ω: 2.53 mA.
  'too much current at the valley': [
    stageOf({ supplyVoltage: 150, seriesResistance: 33e3 }),
    /^Stays lit at 2\.5\d mA: at 55 V it would go out, but 2\.88 mA flows there, more than the 90 µA below which it does\.$/,
  ],
  'cannot recover': [
    stageOf({ capacitance: 1e-9, recoveryTime: 10e-3 }),
    /^Stays lit at 29\.\d µA: it never lets go, because 1 nF charges faster than its strike voltage comes back \(recovery time 10 ms\)\.$/,
  ],
  'no falling region': [
    stageOf({ leadResistance: 1e6 }),
    /^Stays lit: with 1 MΩ in its lead the lamp has no falling region left, so it cannot flash\.$/,
  ],
  'two rests': [
    stageOf({ supplyVoltage: 74, seriesResistance: 100e3 }),
    /^Latches: it can rest dark at 7[34](\.\d)? V and lit at 1\d\d µA, and stays as it was put; from switch-on it stays dark\.$/,
  ],
  'strike beyond the data': [
    stageOf({ knots: knotsOf([0, 0], [0.2e-6, 75], [90e-6, 55], [0.6e-3, 60]) }),
    /^Over range: when it strikes at 75 V, more flows than the 600 µA where the characteristic ends\. Treat it as an arc: it destroys the lamp\.$/,
  ],
  'current beyond the data': [
    stageOf({ supplyVoltage: 300, seriesResistance: 10e3 }),
    /^Over range: through 10 kΩ, more flows than the 8 mA where the characteristic ends\. Treat it as an arc: it destroys the lamp\.$/,
  ],
}

const cases = Object.entries(reasons) as [ReasonCode, readonly [Stage, RegExp]][]

describe('the verdict in one sentence', () => {
  it.each(cases)('has the right numbers and units: %s', (code, [stage, words]) => {
    const said = wordsFor(stage)
    expect(said.code).toBe(code)
    expect(said.whole).toMatch(words)
  })

  it('agrees with the solution for any stage: its own numbers, to three figures', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const { solution, whole } = wordsFor(stage)
        const { cycle, reason, fromSwitchOn } = solution
        const holds = (value: number, unit: 'V' | 'A' | 's') =>
          expect(whole).toContain(plain(formatQuantity(value, unit)))
        if (cycle !== null) {
          holds(cycle.period, 's')
          holds(cycle.lowVoltage, 'V')
          holds(cycle.highVoltage, 'V')
        } else if (solution.verdict === 'stays lit' && reason.code !== 'no falling region') {
          // The current at which it comes to rest from switch-on, also where there are other rests.
          const end = fromSwitchOn.at(-1)!
          holds(end.anchorCurrent + end.conductance * (end.to - end.anchorLevel), 'A')
        } else if (solution.verdict === 'over range') {
          holds(stage.lamp.knots.at(-1)!.current, 'A')
        } else if (solution.verdict === 'latches') {
          const end = fromSwitchOn.at(-1)!
          holds(end.to, 'V')
        }
      }),
      { seed: 941, numRuns: 400 },
    )
  })

  it('never compares a number with one that reads the same', () => {
    fc.assert(
      fc.property(byRatio(1e-5, 0.01), (short) => {
        for (const stage of [
          stageOf({ supplyVoltage: 75 * (1 - short) }),
          stageOf({ seriesResistance: (45 / 0.2e-6) * (1 + short) }),
          stageOf({ supplyVoltage: 150, seriesResistance: (95 / 90e-6) * (1 - short) }),
        ]) {
          // The two that are compared stand last.
          const [first, second] = wordsFor(stage)
            .whole.match(/[\d.]+ (µA|nA|mA|V)/g)!
            .slice(-2)
          expect(first).not.toBe(second)
        }
      }),
      { seed: 942 },
    )
  })

  it('says when the supply reaches strike voltage and no further', () => {
    expect(wordsFor(stageOf({ supplyVoltage: 75 })).whole).toBe(
      'Stays dark: the supply’s 75 V only just reaches strike voltage.',
    )
  })

  it('counts slow flashes by their period and fast ones in hertz', () => {
    expect(wordsFor(stageOf({ capacitance: 10e-6 })).whole).toMatch(/^Flashes once every 8\.\d+ s;/)
    expect(wordsFor(stageOf({ capacitance: 100e-12 })).whole).toMatch(/^Flashes at 1\d(\.\d)? kHz,/)
  })

  it('blames a lead resistor only where there is one', () => {
    const rising = stageOf({ knots: knotsOf([0, 0], [1e-6, 60], [1e-3, 90]) })
    expect(wordsFor(rising).whole).toContain('this characteristic has no falling region')
  })

  it.each(examples.map((example) => [example.id, example] as const))(
    'is one sentence for the example %s',
    (_, example) => {
      const { whole } = wordsFor(example.design.stage)
      expect(whole).toMatch(/^[A-Z][^.]*(\.\d[^.]*)*\.$/)
      expect(whole.length).toBeLessThan(170)
    },
  )
})

describe('the advice', () => {
  it('tells a flasher how far its resistor is from either edge', () => {
    const { advice } = wordsFor(stageOf())
    // (120 − 55) V/90 µA = 722 kΩ, 3.0 times; (120 − 75) V/0.2 µA = 225 MΩ, 102 times.
    expect(advice).toBe(
      'Its series resistor, 2.2 MΩ, is 3 times the 722 kΩ below which it stays lit, and 1/102 of the 225 MΩ above which it stays dark.',
    )
  })

  it('warns of an edge that is near', () => {
    expect(wordsFor(stageOf({ seriesResistance: 800e3 })).advice).toContain('close to the edge')
    expect(wordsFor(stageOf({ seriesResistance: 200e6 })).advice).toContain('0.89 of the 225 MΩ')
    expect(wordsFor(stageOf({ seriesResistance: 200e6 })).advice).toContain('close to the edge')
  })

  it('tells of jitter, of flashes faster than any known, and of a missing capacitor', () => {
    expect(wordsFor(stageOf({ strikeDelay: 2e-3 })).advice).toContain('standard deviation')
    const fast = wordsFor(stageOf({ capacitance: 0 })).advice
    expect(fast).toContain('not known to go faster than about 20 kHz')
    expect(fast).toContain('10 pF of stray capacitance')
  })

  it('names the nearest change that would make it flash', () => {
    expect(wordsFor(stageOf({ supplyVoltage: 150, seriesResistance: 33e3 })).advice).toMatch(
      /^It would flash with a series resistor of 1\.06 MΩ or more/,
    )
    expect(wordsFor(stageOf({ supplyVoltage: 68 })).advice).toMatch(
      /^It would flash with a supply of 75\.5 V or more/,
    )
    // ((120 − 55) V/2.2 MΩ − 0.15 µA)·10 ms/(75 − 55) V = 14.7 nF.
    expect(wordsFor(stageOf({ capacitance: 1e-9, recoveryTime: 10e-3 })).advice).toMatch(
      /a capacitor of 14\.[78] nF or more/,
    )
    expect(wordsFor(stageOf({ leakageResistance: 2.2e6 })).advice).toMatch(
      /leakage of 3\.\d+ MΩ or more/,
    )
  })

  it('never tells a stage that flashes what would make it flash', () => {
    fc.assert(
      fc.property(stages(), (stage) => {
        const { solution, advice } = wordsFor(stage)
        if (solution.verdict === 'flashes') expect(advice).not.toMatch(/would flash|No single/)
        else expect(advice).not.toMatch(/below which it stays lit/)
      }),
      { seed: 943, numRuns: 200 },
    )
  })
})

describe('a remedy', () => {
  const apply = (
    stage: Stage,
    changes: readonly Change[],
    to: (change: Change) => number,
  ): Stage => ({
    ...stage,
    ...Object.fromEntries(changes.map((change) => [change.quantity, to(change)])),
  })

  /** The number that is printed, read back. */
  function printed({ quantity, value, sense }: Change): number {
    const text = remedyWords([[{ quantity, value, sense }]])
    const unit = quantity === 'supplyVoltage' ? 'V' : quantity === 'capacitance' ? 'F' : 'Ω'
    const read = parseQuantity(/(?:of) (?!leakage)(.*) or (?:more|less)$/.exec(text)![1]!, unit)
    return read.ok ? read.value : Number.NaN
  }

  it('really cures, with the number that is printed, wherever a hundredth more or less does not undo it', () => {
    let tried = 0
    fc.assert(
      fc.property(stages(), (stage) => {
        for (const changes of solveStage(stage).reason.remedies.slice(0, 3)) {
          const further = ({ value, sense }: Change) => value * (sense === 'at least' ? 1.01 : 0.99)
          if (solveStage(apply(stage, changes, further)).verdict !== 'flashes') continue
          tried++
          expect(solveStage(apply(stage, changes, printed)).verdict).toBe('flashes')
        }
      }),
      { seed: 944, numRuns: 400 },
    )
    expect(tried).toBeGreaterThan(100)
  })

  it('is needed: a hundredth short of its limit the stage does not flash yet', () => {
    fc.assert(
      fc.property(stages({ delay: false, recovery: false }), (stage) => {
        fc.pre(stage.lamp.knots.length <= 5)
        const [first] = solveStage(stage).reason.remedies
        fc.pre(first !== undefined && first.length === 1)
        const short = ({ value, sense }: Change) => value * (sense === 'at least' ? 0.99 : 1.01)
        expect(solveStage(apply(stage, first!, short)).verdict).not.toBe('flashes')
      }),
      { seed: 945, numRuns: 300 },
    )
  })

  it('reads as one phrase, changes that go together joined, others offered', () => {
    const supply: Change = { quantity: 'supplyVoltage', sense: 'at least', value: 80.01 }
    const series: Change = { quantity: 'seriesResistance', sense: 'at most', value: 999e3 }
    expect(plain(remedyWords([[supply, series], [series]]))).toBe(
      'with a supply of 80.1 V or more together with a series resistor of 998 kΩ or less, or with a series resistor of 998 kΩ or less',
    )
    expect(remedyWords([])).toBe('')
  })
})

describe('past', () => {
  it('rounds to three figures on the side that lies past the limit', () => {
    expect(past(1055555.6, 'at least')).toBe(1.06e6)
    expect(past(1055555.6, 'at most')).toBe(1.05e6)
    expect(past(99.97, 'at least')).toBe(100)
    expect(past(4.7e-7, 'at least')).toBe(4.71e-7)
    expect(past(4.7e-7, 'at most')).toBe(4.69e-7)
    expect(past(0, 'at least')).toBe(0)
  })

  it('always lies past the limit, by a hundredth at most', () => {
    fc.assert(
      fc.property(
        byRatio(1e-15, 1e15),
        fc.constantFrom('at least' as const, 'at most' as const),
        (value, sense) => {
          const rounded = past(value, sense)
          const ratio = sense === 'at least' ? rounded / value : value / rounded
          expect(ratio).toBeGreaterThan(1)
          expect(ratio).toBeLessThan(1.0102)
          expect(Number(rounded.toPrecision(3))).toBe(rounded)
        },
      ),
      { seed: 946, numRuns: 500 },
    )
  })
})

describe('all words', () => {
  const nonsense = /NaN|undefined|null|Infinity|∞|–| {2}|\bof 0 /

  it('hold numbers that are numbers, whatever the design', () => {
    fc.assert(
      fc.property(fc.oneof(stages(), anyStage), (stage) => {
        const { whole, advice } = wordsFor(stage)
        expect(whole).not.toMatch(nonsense)
        expect(advice).not.toMatch(nonsense)
        expect(whole).toMatch(/\.$/)
      }),
      { seed: 947, numRuns: 400 },
    )
  })

  it.each(extremeStages)('hold numbers that are numbers: %s', (_, stage) => {
    const { whole, advice } = wordsFor(stage)
    expect(whole).not.toMatch(nonsense)
    expect(advice).not.toMatch(nonsense)
  })
})
