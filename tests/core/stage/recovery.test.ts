import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  branchesOf,
  type Cycle,
  loadCurrent,
  loadLineOf,
  momentAt,
  type Stage,
  solveStage,
} from '../../../src/core/index'
import { bisect, meetingTime } from '../../../src/core/stage/recovery'
import { byRatio, evenly, stages } from '../../support/lampArbitrary'
import { knotsOf, stageOf } from '../../support/stages'

const endless = Number.POSITIVE_INFINITY

function cycleOf(stage: Stage): Cycle {
  const { cycle, reason } = solveStage(stage)
  if (cycle === null) throw new Error(`No cycle: ${reason.code}`)
  return cycle
}

/** Dark phases at the cycle's beginning, up to the strike: their time together, and the voltage there. */
function strikeOf({ phases }: Cycle): { time: number; voltage: number } {
  let time = 0
  let voltage = 0
  for (const phase of phases) {
    if (phase.kind !== 'dark') break
    time += phase.duration
    voltage = phase.to
  }
  return { time, voltage }
}

/** Stages of one falling region that recover in some part of their charging time. */
const recovering = fc
  .tuple(stages({ recovery: false, delay: false }), byRatio(1e-3, 3))
  .map(([stage, part]): Stage => {
    const { cycle } = solveStage(stage)
    const recoveryTime = (cycle?.period ?? 0) * part
    return { ...stage, lamp: { ...stage.lamp, recoveryTime } }
  })

const strikeLevels = (stage: Stage) => {
  const path = branchesOf(stage.lamp.knots, stage.leadResistance)
  return {
    branches: path.top.length,
    strike: path.level[path.top[0] as number] as number,
    extinction: path.level[path.bottom[1] as number] as number,
  }
}

describe('a lamp whose strike voltage comes back slowly', () => {
  it('strikes where the capacitor meets Ve + (Vs − Ve)(1 − exp(−t/recovery)), to rounding, and not before', () => {
    let seen = 0
    fc.assert(
      fc.property(recovering, (stage) => {
        const { branches, strike, extinction } = strikeLevels(stage)
        const { cycle } = solveStage(stage)
        fc.pre(branches === 2 && cycle !== null && stage.lamp.recoveryTime > 0)
        if (cycle === null) return
        seen++
        const back = (time: number) =>
          extinction + (strike - extinction) * -Math.expm1(-time / stage.lamp.recoveryTime)
        const { time, voltage } = strikeOf(cycle)
        expect(Math.abs(voltage - back(time))).toBeLessThan(1e-12 * strike)
        let over = Number.NEGATIVE_INFINITY
        for (let n = 1; n < 400; n++) {
          const moment = momentAt(cycle.phases, cycle, (time * n) / 400)
          over = Math.max(over, (moment?.voltage ?? endless) - back((time * n) / 400))
        }
        expect(over).toBeLessThan(1e-12 * strike)
      }),
      { seed: 161, numRuns: 600 },
    )
    expect(seen).toBeGreaterThan(100)
  })

  it('flashes sooner and swings less than a rested one', () => {
    let seen = 0
    fc.assert(
      fc.property(recovering, (stage) => {
        const rested = solveStage({ ...stage, lamp: { ...stage.lamp, recoveryTime: 0 } }).cycle
        const { cycle } = solveStage(stage)
        fc.pre(strikeLevels(stage).branches === 2 && cycle !== null && rested !== null)
        if (cycle === null || rested === null) return
        seen++
        expect(cycle.period).toBeLessThanOrEqual(rested.period)
        expect(cycle.highVoltage).toBeLessThanOrEqual(rested.highVoltage)
        expect(cycle.lowVoltage).toBe(rested.lowVoltage)
        expect(cycle.peakLampCurrent).toBeLessThanOrEqual(rested.peakLampCurrent)
        // The first strike is a rested lamp's.
        expect(cycle.firstStrike).toBeCloseTo(rested.firstStrike, 14)
      }),
      { seed: 162, numRuns: 500 },
    )
    expect(seen).toBeGreaterThan(80)
  })

  it('comes back from the higher of two valleys where it has gone out below both', () => {
    // Out at 40 V, but no strike holds below the valley at 60 V in between.
    const stage = stageOf({
      supplyVoltage: 150,
      seriesResistance: 10e3,
      capacitance: 1e-6,
      recoveryTime: 3e-3,
      knots: knotsOf([0, 0], [1e-3, 90], [5e-3, 60], [12e-3, 85], [30e-3, 40], [80e-3, 120]),
    })
    const cycle = cycleOf(stage)
    expect(cycle.lowVoltage).toBe(40)
    const { time, voltage } = strikeOf(cycle)
    expect(voltage).toBeCloseTo(60 + 30 * (1 - Math.exp(-time / 3e-3)), 9)
  })

  it('comes to the rested one as the recovery time goes to nothing', () => {
    const rested = cycleOf(stageOf())
    let before = 1
    for (const part of [0.3, 0.2, 0.1, 0.05]) {
      const cycle = cycleOf(stageOf({ recoveryTime: rested.period * part }))
      const short = 1 - cycle.highVoltage / rested.highVoltage
      expect(short).toBeLessThan(before)
      before = short
    }
    const quick = cycleOf(stageOf({ recoveryTime: rested.period / 1000 }))
    expect(quick.period).toBeCloseTo(rested.period, 14)
    expect(quick.highVoltage).toBeCloseTo(rested.highVoltage, 12)
  })
})

describe('the least capacitance', () => {
  it('is the capacitor’s first rate of rise against the strike voltage’s: by hand', () => {
    // At extinction 55 V the load line leaves 65 V/2.2 MΩ, the dark branch takes 0.2 µA · 55/75; the strike
    // voltage comes back at 20 V in one recovery time.
    const recoveryTime = 0.5
    const expected = ((65 / 2.2e6 - (0.2e-6 * 55) / 75) * recoveryTime) / 20
    const found = solveStage(stageOf({ recoveryTime })).leastCapacitance
    expect((found ?? 0) / expected).toBeCloseTo(1, 12)
  })

  it('just below leaves the lamp lit for want of recovery, just above lets it flash', () => {
    let seen = 0
    fc.assert(
      fc.property(stages({ delay: false }), (stage) => {
        const { leastCapacitance, verdict } = solveStage(stage)
        if (leastCapacitance === null || leastCapacitance === 0) return
        seen++
        const below = solveStage({ ...stage, capacitance: leastCapacitance * (1 - 1e-6) })
        const above = solveStage({ ...stage, capacitance: leastCapacitance * (1 + 1e-6) })
        expect(above.verdict).toBe('flashes')
        expect(below.verdict).not.toBe('flashes')
        if (strikeLevels(stage).branches > 2) return
        expect(below.verdict).toBe('stays lit')
        expect(below.reason.code).toBe('cannot recover')
        expect(verdict === 'flashes').toBe(stage.capacitance > leastCapacitance)
      }),
      { seed: 163, numRuns: 1500 },
    )
    expect(seen).toBeGreaterThan(100)
  })

  it('is that of the extinction that charges fastest, where a cycle goes out twice', () => {
    // From 22 V the lamp falls on to 18.8 V, and only there must it recover. Going out first at the upper
    // valley asks nothing, whichever of the two the cycle is counted from.
    const knots = knotsOf([0, 0], [5e-6, 50], [12e-3, 19], [4, 31], [400, 22], [36e3, 91])
    const flasher = (capacitance: number) =>
      solveStage(
        stageOf({
          supplyVoltage: 54,
          seriesResistance: 210e3,
          capacitance,
          recoveryTime: 5e-3,
          knots,
        }),
      )
    const least = flasher(1e-6).leastCapacitance ?? 0
    expect(least).toBeGreaterThan(1e-9)
    expect(flasher(least * 1.001).verdict).toBe('flashes')
    expect(flasher(least * 1.5).leastCapacitance).toBeCloseTo(least, 12)
    expect(flasher(least * 0.999).reason.code).toBe('cannot recover')
  })

  it('is nothing without recovery, and none where no capacitor would do', () => {
    expect(solveStage(stageOf()).leastCapacitance).toBe(0)
    expect(solveStage(stageOf({ seriesResistance: 33e3 })).leastCapacitance).toBeNull()
    expect(solveStage(stageOf({ supplyVoltage: 70 })).leastCapacitance).toBeNull()
    expect(solveStage(stageOf({ knots: knotsOf([0, 0], [1, 70]) })).leastCapacitance).toBeNull()
  })

  it('counts a strike delay that carries a small capacitor off the data', () => {
    const stage = stageOf({ strikeDelay: 20e-3 })
    const least = solveStage(stage).leastCapacitance ?? 0
    // From 75 V, 0.2 µA drawn, the voltage must not pass 84 V, where the data ends, in 20 ms.
    const towards = 120 - 2.2e6 * 0.2e-6
    const expected = 20e-3 / (2.2e6 * Math.log((towards - 75) / (towards - 84)))
    expect(least / expected).toBeCloseTo(1, 9)
    const over = solveStage({ ...stage, capacitance: least * 0.999 })
    expect(over.verdict).toBe('over range')
    expect(over.leastCapacitance).toBe(least)
    expect(solveStage({ ...stage, capacitance: least * 1.001 }).verdict).toBe('flashes')
  })
})

describe('a lamp that cannot recover', () => {
  const held = solveStage(stageOf({ capacitance: 1e-9, recoveryTime: 0.5 }))

  it('stays lit at extinction voltage, with all the current the load line leaves', () => {
    expect(held.verdict).toBe('stays lit')
    expect(held.reason.code).toBe('cannot recover')
    expect(held.fromSwitchOn.at(-1)).toMatchObject({
      kind: 'held',
      duration: Number.POSITIVE_INFINITY,
      to: 55,
    })
    const point = held.operatingPoints.find((found) => found.stable)
    expect(point).toMatchObject({ lit: true, voltage: 55, capacitorVoltage: 55 })
    expect(point?.current).toBeCloseTo(loadCurrent(loadLineOf(stageOf()), 55), 15)
  })

  it('would flash with a capacitor, with more resistance or with less supply', () => {
    const quantities = held.reason.remedies.map((remedy) => remedy[0]?.quantity).sort()
    expect(quantities).toContain('capacitance')
  })
})

describe('the moment two exponentials meet', () => {
  it('is where they are equal and the capacitor has been lower until then', () => {
    let seen = 0
    fc.assert(
      fc.property(
        evenly(40, 80),
        evenly(1, 60),
        byRatio(1e-5, 1),
        evenly(1.01, 4),
        byRatio(1e-5, 1),
        (low, span, time, reach, timeConstant) => {
          const toward = low + span * reach
          const duration = timeConstant * -Math.log1p(-span / (toward - low))
          const charge = { start: 0, duration, from: low, toward, timeConstant }
          const met = meetingTime({ low, high: low + span, time }, charge)
          const capacitor = (t: number) => (toward - low) * -Math.expm1(-t / timeConstant)
          const strike = (t: number) => span * -Math.expm1(-t / time)
          fc.pre((toward - low) / timeConstant < (span / time) * (1 - 1e-6))
          if (met === null) {
            // So quick a recovery that rounding cannot tell the strike voltage from its full height.
            expect(capacitor(duration) - strike(duration)).toBeLessThan(1e-14 * span)
            return
          }
          seen++
          expect(Math.abs(capacitor(met) / strike(met) - 1)).toBeLessThan(1e-13)
          let over = Number.NEGATIVE_INFINITY
          for (let n = 1; n < 300; n++) {
            const t = (met * n) / 300
            over = Math.max(over, capacitor(t) / strike(t))
          }
          expect(over).toBeLessThan(1 + 1e-14)
        },
      ),
      { seed: 164, numRuns: 800 },
    )
    expect(seen).toBeGreaterThan(150)
  })

  it('is the knot itself where they meet at the very knot between two pieces', () => {
    const recovery = { low: 50, high: 70, time: 1 }
    const from = 50 + 20 * -Math.expm1(-0.7)
    const charge = { start: 0.7, duration: 1, from: from + 1e-14, toward: 80, timeConstant: 1 }
    expect(meetingTime(recovery, charge)).toBe(0.7)
  })

  it('does not come where the capacitor rests below', () => {
    const recovery = { low: 50, high: 70, time: 0.1 }
    const rest = { start: 0, duration: Number.POSITIVE_INFINITY, from: 50, toward: 60 }
    expect(meetingTime(recovery, { ...rest, timeConstant: 1 })).toBeNull()
  })

  it('can come before a rest below the rested strike voltage', () => {
    const recovery = { low: 50, high: 70, time: 1 }
    const rest = { start: 0.5, duration: Number.POSITIVE_INFINITY, from: 51, toward: 65 }
    const met = meetingTime(recovery, { ...rest, timeConstant: 0.05 }) ?? 0
    expect(65 - 14 * Math.exp(-(met - 0.5) / 0.05)).toBeCloseTo(70 - 20 * Math.exp(-met), 12)
  })
})

describe('halving', () => {
  it('ends at the first number on the far side', () => {
    expect(bisect(0, 2, (x) => x * x < 2)).toBeCloseTo(Math.SQRT2, 15)
    expect(bisect(0, 1e9, (x) => x < 1e-300)).toBe(1e-300)
  })
})
