import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Cycle, type Stage, solveStage } from '../../../src/core/index'
import { stages } from '../../support/lampArbitrary'

const plain = stages({ recovery: false, delay: false })

const relative = (found: number, expected: number) =>
  expect(Math.abs(found - expected)).toBeLessThanOrEqual(1e-9 * Math.abs(expected))

/** Solves a stage and its scaled like, and hands over both cycles; the verdict must be one. */
function compare(
  seed: number,
  drawn: fc.Arbitrary<Stage>,
  scaled: (stage: Stage) => Stage,
  look: (cycle: Cycle, other: Cycle) => void,
): void {
  let flashed = 0
  fc.assert(
    fc.property(drawn, (stage) => {
      const one = solveStage(stage)
      const other = solveStage(scaled(stage))
      expect(other.verdict).toBe(one.verdict)
      expect(other.reason.code).toBe(one.reason.code)
      if (one.cycle === null || other.cycle === null) return
      flashed++
      look(one.cycle, other.cycle)
    }),
    { seed, numRuns: 500 },
  )
  expect(flashed).toBeGreaterThan(80)
}

describe('scaling a stage', () => {
  it('in capacitance by powers of two scales the period to the last bit', () => {
    for (const factor of [2, 1024, 2 ** -20]) {
      compare(
        131,
        plain,
        (stage) => ({ ...stage, capacitance: stage.capacitance * factor }),
        (cycle, other) => {
          expect(other.period).toBe(cycle.period * factor)
          expect(other.glowTime).toBe(cycle.glowTime * factor)
          expect(other.firstStrike).toBe(cycle.firstStrike * factor)
          expect(other.highVoltage).toBe(cycle.highVoltage)
          expect(other.peakLampCurrent).toBe(cycle.peakLampCurrent)
        },
      )
    }
  })

  it('in capacitance by any factor scales the period by as much', () => {
    compare(
      132,
      plain,
      (stage) => ({ ...stage, capacitance: stage.capacitance * 3.7 }),
      (cycle, other) => {
        expect(Math.abs(other.period / (3.7 * cycle.period) - 1)).toBeLessThan(1e-14)
        relative(other.meanSupplyCurrent, cycle.meanSupplyCurrent)
        relative(other.meanLampPower, cycle.meanLampPower)
      },
    )
  })

  it('in capacitance and both of the lamp’s times alike scales every time', () => {
    compare(
      133,
      stages(),
      (stage) => ({
        ...stage,
        capacitance: stage.capacitance * 8,
        lamp: {
          ...stage.lamp,
          recoveryTime: stage.lamp.recoveryTime * 8,
          strikeDelay: stage.lamp.strikeDelay * 8,
        },
      }),
      (cycle, other) => {
        relative(other.period, 8 * cycle.period)
        relative(other.periodDeviation, 8 * cycle.periodDeviation)
        relative(other.highVoltage, cycle.highVoltage)
      },
    )
  })

  it('in all currents up and all resistances down leaves the voltages, and the period with the capacitance', () => {
    const k = 16
    compare(
      134,
      stages(),
      (stage) => ({
        ...stage,
        sourceResistance: stage.sourceResistance / k,
        seriesResistance: stage.seriesResistance / k,
        leakageResistance: stage.leakageResistance / k,
        leadResistance: stage.leadResistance / k,
        capacitance: stage.capacitance * k,
        lamp: {
          ...stage.lamp,
          knots: stage.lamp.knots.map(({ current, voltage }) => ({
            current: current * k,
            voltage,
          })),
        },
      }),
      (cycle, other) => {
        relative(other.period, cycle.period)
        relative(other.highVoltage, cycle.highVoltage)
        relative(other.lowVoltage, cycle.lowVoltage)
        relative(other.meanVoltage, cycle.meanVoltage)
        relative(other.peakLampCurrent, cycle.peakLampCurrent * k)
        relative(other.meanLampPower, cycle.meanLampPower * k)
      },
    )
  })

  it('in all voltages and resistances leaves the currents and the time constants’ ratio', () => {
    const k = 1 / 64
    compare(
      135,
      stages(),
      (stage) => ({
        ...stage,
        supplyVoltage: stage.supplyVoltage * k,
        sourceResistance: stage.sourceResistance * k,
        seriesResistance: stage.seriesResistance * k,
        leakageResistance: stage.leakageResistance * k,
        leadResistance: stage.leadResistance * k,
        capacitance: stage.capacitance / k,
        lamp: {
          ...stage.lamp,
          knots: stage.lamp.knots.map(({ current, voltage }) => ({
            current,
            voltage: voltage * k,
          })),
        },
      }),
      (cycle, other) => {
        relative(other.period, cycle.period)
        relative(other.highVoltage, cycle.highVoltage * k)
        relative(other.peakLampCurrent, cycle.peakLampCurrent)
        relative(other.meanSupplyPower, cycle.meanSupplyPower * k)
      },
    )
  })
})
