import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  type Cycle,
  lampVoltageAt,
  type Moment,
  momentAt,
  type Stage,
  solveStage,
} from '../../../src/core/index'
import { stages } from '../../support/lampArbitrary'
import { integrate } from '../../support/quadrature'
import { knotsOf, stageOf } from '../../support/stages'

/** Calls `look` with every flashing stage among those drawn, and says how many there were. */
function eachFlashing(
  seed: number,
  numRuns: number,
  look: (cycle: Cycle, stage: Stage) => void,
  drawn = stages(),
): number {
  let count = 0
  fc.assert(
    fc.property(drawn, (stage) => {
      const { cycle } = solveStage(stage)
      if (cycle === null) return
      count++
      look(cycle, stage)
    }),
    { seed, numRuns },
  )
  return count
}

const agree = (found: number, expected: number, tolerance: number, scale = Math.abs(expected)) =>
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(tolerance * scale)

describe('a closed cycle', () => {
  it('never lets the capacitor’s voltage jump, and ends where it began', () => {
    const count = eachFlashing(121, 1500, ({ phases }) => {
      phases.forEach((phase, n) => {
        const before = phases.at(n - 1)
        expect(phase.from).toBe(before?.to)
      })
    })
    expect(count).toBeGreaterThan(300)
  })

  it('follows each phase’s exponential to where the phase ends', () => {
    eachFlashing(122, 800, ({ phases, highVoltage }) => {
      for (const { from, to, toward, duration, timeConstant } of phases) {
        expect(duration).toBeGreaterThanOrEqual(0)
        const end = toward + (from - toward) * Math.exp(-duration / timeConstant)
        agree(end, to, 1e-12, highVoltage + Math.abs(toward))
      }
    })
  })

  it('takes from the supply what lamp, resistors and leakage use', () => {
    const count = eachFlashing(123, 2000, (cycle) => {
      const used =
        cycle.meanLampPower +
        cycle.meanLeadPower +
        cycle.meanSeriesPower +
        cycle.meanSourcePower +
        cycle.meanLeakagePower
      agree(used, cycle.meanSupplyPower, 1e-9)
    })
    expect(count).toBeGreaterThan(400)
  })

  it('leaves the capacitor’s charge as it was', () => {
    eachFlashing(124, 2000, (cycle, stage) => {
      const leaked = cycle.meanVoltage / stage.leakageResistance
      agree(cycle.meanLampCurrent + leaked, cycle.meanSupplyCurrent, 1e-9)
    })
  })

  it('keeps these balances with a supply a thousand times the swing and with one just above strike', () => {
    const knots = knotsOf([0, 0], [1e-13, 6], [1e-3, 5], [1e-1, 9])
    for (const supply of [6.000001, 6.1, 60, 2e4]) {
      const { cycle } = solveStage(
        stageOf({
          supplyVoltage: supply,
          seriesResistance: supply / 1e-5,
          leakageResistance: 1e17,
          knots,
        }),
      )
      if (cycle === null) throw new Error('It should flash.')
      const used = cycle.meanLampPower + cycle.meanSeriesPower + cycle.meanLeakagePower
      agree(used, cycle.meanSupplyPower, 1e-12)
      agree(cycle.meanLampCurrent + cycle.meanVoltage / 1e17, cycle.meanSupplyCurrent, 1e-12)
      // The mean square lies between the squares of what it is the mean of, to the last figures.
      const square = cycle.meanLeakagePower * 1e17
      expect(square).toBeGreaterThan(cycle.meanVoltage ** 2)
      expect(square).toBeLessThan(36)
    }
  })

  it('is made of times and powers that are none of them negative', () => {
    eachFlashing(125, 1500, (cycle) => {
      for (const [name, value] of Object.entries(cycle)) {
        if (typeof value !== 'number') continue
        expect(Number.isFinite(value), name).toBe(true)
        expect(value, name).toBeGreaterThanOrEqual(0)
      }
      expect(cycle.glowTime).toBeLessThanOrEqual(cycle.period)
      expect(cycle.frequency).toBe(1 / cycle.period)
      expect(cycle.rmsLampCurrent).toBeGreaterThanOrEqual(cycle.meanLampCurrent * (1 - 1e-12))
    })
  })

  it('never passes its highest and lowest voltage or its peak current, and reaches them', () => {
    eachFlashing(126, 400, (cycle) => {
      let [high, low, peak] = [0, Number.POSITIVE_INFINITY, 0]
      let start = 0
      for (const { duration } of cycle.phases) {
        for (let n = 0; n <= 40; n++) {
          const time = n === 40 ? start + duration * (1 - 1e-12) : start + (duration * n) / 40
          const moment = momentAt(cycle.phases, cycle, time) as Moment
          high = Math.max(high, moment.voltage)
          low = Math.min(low, moment.voltage)
          peak = Math.max(peak, moment.lampCurrent)
        }
        start += duration
      }
      agree(high, cycle.highVoltage, 1e-9)
      agree(low, cycle.lowVoltage, 1e-9, cycle.highVoltage)
      agree(peak, cycle.peakLampCurrent, 1e-6)
      expect(peak).toBeLessThanOrEqual(cycle.peakLampCurrent * (1 + 1e-12))
    })
  })

  it('keeps the lamp on its characteristic except while it waits to strike', () => {
    eachFlashing(127, 400, (cycle, stage) => {
      let start = 0
      for (const phase of cycle.phases) {
        const moment = momentAt(cycle.phases, cycle, start + phase.duration / 3) as Moment
        start += phase.duration
        if (phase.kind === 'waiting') continue
        const across = lampVoltageAt(stage.lamp.knots, moment.lampCurrent)
        agree(moment.lampVoltage, across ?? Number.NaN, 1e-7, moment.voltage)
      }
    })
  })
})

describe('the figures of a cycle', () => {
  const cases: readonly (readonly [string, Stage])[] = [
    ['a plain flasher', stageOf()],
    [
      'one with leakage and a lead resistor',
      stageOf({ leakageResistance: 20e6, leadResistance: 2e3 }),
    ],
    ['one with a source resistance', stageOf({ sourceResistance: 0.5e6 })],
    ['one that must recover', stageOf({ recoveryTime: 0.2 })],
    ['one that strikes late', stageOf({ strikeDelay: 0.05 })],
    [
      'one with three branches',
      stageOf({
        supplyVoltage: 180,
        seriesResistance: 15e3,
        leadResistance: 50,
        knots: knotsOf([0, 0], [4e-3, 90], [12e-3, 45], [20e-3, 70], [30e-3, 50], [80e-3, 120]),
      }),
    ],
  ]

  it.each(cases)('are the integrals over time of what it goes through: %s', (_, stage) => {
    const { cycle } = solveStage(stage)
    if (cycle === null) throw new Error('It should flash.')
    const { phases, period } = cycle
    // Each phase on its own, since the current jumps between them.
    const mean = (quantity: (moment: Moment) => number, scale: number, lit?: boolean) => {
      let start = 0
      let sum = 0
      for (const phase of phases) {
        const from = start
        start += phase.duration
        if (lit === true && phase.kind !== 'glow') continue
        const at = (time: number) =>
          quantity(
            momentAt([phase], cycle, Math.min(time - from, phase.duration * (1 - 1e-15))) as Moment,
          )
        sum += integrate(at, from, start, 1e-12 * scale * period)
      }
      return sum / period
    }
    const leak = 1 / stage.leakageResistance
    const supplyScale = cycle.meanSupplyPower
    agree(
      mean((m) => m.voltage, cycle.meanVoltage),
      cycle.meanVoltage,
      1e-9,
    )
    agree(
      mean((m) => m.lampCurrent, cycle.meanLampCurrent),
      cycle.meanLampCurrent,
      1e-9,
    )
    agree(
      mean((m) => m.lampCurrent ** 2, cycle.rmsLampCurrent ** 2),
      cycle.rmsLampCurrent ** 2,
      1e-9,
    )
    agree(
      mean((m) => m.supplyCurrent, cycle.meanSupplyCurrent),
      cycle.meanSupplyCurrent,
      1e-9,
    )
    agree(
      mean((m) => m.supplyCurrent * stage.supplyVoltage, supplyScale),
      cycle.meanSupplyPower,
      1e-9,
    )
    agree(
      mean((m) => m.supplyCurrent ** 2 * stage.seriesResistance, supplyScale),
      cycle.meanSeriesPower,
      1e-9,
    )
    agree(
      mean((m) => m.supplyCurrent ** 2 * stage.sourceResistance, supplyScale),
      cycle.meanSourcePower,
      1e-9,
      supplyScale,
    )
    agree(
      mean((m) => m.lampVoltage * m.lampCurrent, supplyScale),
      cycle.meanLampPower,
      1e-9,
    )
    agree(
      mean((m) => m.lampCurrent ** 2 * stage.leadResistance, supplyScale),
      cycle.meanLeadPower,
      1e-9,
      supplyScale,
    )
    agree(
      mean((m) => m.voltage ** 2 * leak, supplyScale),
      cycle.meanLeakagePower,
      1e-9,
      supplyScale,
    )
    agree(
      mean((m) => m.lampCurrent, cycle.flashCharge / period, true),
      cycle.flashCharge / period,
      1e-9,
    )
    agree(
      mean((m) => m.lampVoltage * m.lampCurrent, cycle.flashEnergy / period, true),
      cycle.flashEnergy / period,
      1e-9,
    )
  })

  it('say when the first strike comes: once from an empty capacitor, any delay included', () => {
    const { cycle, fromSwitchOn } = solveStage(stageOf({ strikeDelay: 0.02 }))
    const first = fromSwitchOn.slice(
      0,
      fromSwitchOn.findIndex((phase) => phase.kind === 'glow'),
    )
    expect(first[0]?.from).toBe(0)
    expect(first.at(-1)).toMatchObject({ kind: 'waiting', duration: 0.02 })
    const sum = first.reduce((time, phase) => time + phase.duration, 0)
    expect(cycle?.firstStrike).toBeCloseTo(sum, 14)
    expect(sum).toBeGreaterThan(cycle?.period ?? 0)
  })

  it('count only the glow branch as flash', () => {
    const { cycle } = solveStage(stageOf())
    const lit = cycle?.phases.filter((phase) => phase.kind === 'glow') ?? []
    expect(cycle?.glowTime).toBeCloseTo(
      lit.reduce((time, phase) => time + phase.duration, 0),
      15,
    )
    expect(cycle?.flashCharge).toBeLessThan((cycle?.meanLampCurrent ?? 0) * (cycle?.period ?? 0))
  })
})
