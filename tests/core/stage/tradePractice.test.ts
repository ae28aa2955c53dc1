import { describe, expect, it } from 'vitest'
import { type Knot, type Solution, solveStage } from '../../../src/core/index'
import { genericSmallLamp } from '../../../src/core/stage/genericLamp'
import { knotsOf, stageOf } from '../../support/stages'

/*
 * Facts of the trade: common practice, no source.
 *
 * The lamps are the corners of the two brightness classes. Strike voltages: 60 to 90 V and 105 to 135 V
 * [the upper limits S: SPC Technology data sheet for A1A/A1B/A1C/C2A/A9A; the lower ones and the valleys of
 * 55 and 65 V from memory]. Assumed besides, from memory: 0.2 µA at the knee, the falling region ending at
 * 0.1 to 0.3 mA, 30 V more at 8 mA and beyond.
 */
function lamp(strike: number, extinction: number, valleyCurrent: number): Knot[] {
  return knotsOf(
    [0, 0],
    [0.2e-6, strike],
    [valleyCurrent, extinction],
    [8e-3, extinction + 30],
    [80e-3, extinction + 90],
  )
}

const standard = [60, 75, 90].flatMap((knee) => [0.1e-3, 0.3e-3].map((i) => lamp(knee, 55, i)))
const bright = [105, 120, 135].flatMap((knee) => [0.1e-3, 0.3e-3].map((i) => lamp(knee, 65, i)))

describe('an indicator with 33 kΩ on 150 V', () => {
  it.each([...standard, ...bright, genericSmallLamp].map((knots) => [knots] as const))(
    'stays lit and never flashes, whatever is across it (%j)',
    (knots) => {
      for (const capacitance of [0, 1e-9, 0.47e-6, 10e-6]) {
        const solution = solveStage(
          stageOf({ supplyVoltage: 150, seriesResistance: 33e3, capacitance, knots }),
        )
        expect(solution.verdict).toBe('stays lit')
        expect(solution.reason.code).toBe('too much current at the valley')
        const rest = solution.operatingPoints.find((point) => point.stable)
        // A small lamp's working current: 0.3 to 1.9 mA by design, up to twice that on such a supply.
        expect(rest?.current).toBeGreaterThan(0.3e-3)
        expect(rest?.current).toBeLessThan(4e-3)
      }
    },
  )
})

describe('a flasher with 1 MΩ and 0.47 µF on 150 V', () => {
  const flasher = (knots: readonly Knot[]): Solution =>
    solveStage(stageOf({ supplyVoltage: 150, seriesResistance: 1e6, capacitance: 0.47e-6, knots }))
  const rates = [...standard, ...bright].map((knots) => flasher(knots).cycle?.frequency ?? 0)

  it('flashes with every one of these lamps', () => {
    expect(Math.min(...rates)).toBeGreaterThan(0)
  })

  it('may run at 10 Hz with one lamp and at 2 Hz with another', () => {
    expect(Math.max(...rates)).toBeGreaterThan(10)
    expect(Math.min(...rates)).toBeLessThan(2)
    // Ten from the standard class, two from the bright one.
    expect(Math.min(...rates.slice(0, standard.length))).toBeLessThan(10)
    expect(Math.max(...rates.slice(standard.length))).toBeGreaterThan(2)
  })

  it('takes some tens of microamps from the supply', () => {
    for (const knots of [...standard, ...bright]) {
      const current = flasher(knots).cycle?.meanSupplyCurrent
      expect(current).toBeGreaterThan(10e-6)
      expect(current).toBeLessThan(100e-6)
    }
  })

  it('would stay lit with a lamp that holds down to 90 µA, since 95 µA flow at its valley', () => {
    // (150 − 55) V / 1 MΩ: hence the valleys above are assumed at 0.1 mA and more.
    const solution = flasher(genericSmallLamp)
    expect(solution.verdict).toBe('stays lit')
    expect(solution.reason.currentAtExtinction).toBeCloseTo(95e-6, 12)
    expect(solution.window?.min).toBeCloseTo(95 / 90e-6, 6)
  })
})
