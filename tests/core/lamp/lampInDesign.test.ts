import { describe, expect, it } from 'vitest'
import {
  catalogueEntry,
  type Design,
  designWithLamp,
  detailsOf,
  genericSmallLamp,
  type LampRecord,
  lampTurned,
  noConditions,
  recordOf,
  recordOfDesign,
  solveStage,
  typedDetails,
  workingStage,
} from '../../../src/core'

const design: Design = {
  title: 'Bench',
  note: '',
  lampName: 'one of the bag',
  stage: {
    supplyVoltage: 120,
    sourceResistance: 0,
    seriesResistance: 2.2e6,
    capacitance: 0.47e-6,
    leakageResistance: Number.POSITIVE_INFINITY,
    leadResistance: 1000,
    lamp: { knots: genericSmallLamp, recoveryTime: 1e-4, strikeDelay: 0.01 },
  },
}

const other = genericSmallLamp.map(({ current, voltage }) => ({ current, voltage: voltage * 1.05 }))

describe('the lamp in a design', () => {
  it('works as entered where nothing more is known of it', () => {
    const working = workingStage(design)
    expect(working.stage).toBe(design.stage)
    expect(working).toMatchObject({ sentences: [], fault: null, shifted: false })
    expect(detailsOf(design)).toBe(typedDetails)
  })

  it('adds the resistor in its base to the lead resistor, and leaves the part as fitted', () => {
    const based = { ...design, lampDetails: { ...typedDetails, baseResistance: 22e3 } }
    expect(workingStage(based).stage.leadResistance).toBe(23e3)
    expect(based.stage.leadResistance).toBe(1000)
    expect(solveStage(workingStage(based).stage).cycle?.peakLampCurrent).toBeLessThan(
      solveStage(design.stage).cycle?.peakLampCurrent ?? 0,
    )
  })

  it('strikes later in the dark, says so, and does not change the lamp kept', () => {
    const conditions = { ...noConditions, on: true, surroundings: 'dark' as const }
    const dark = { ...design, lampDetails: { ...typedDetails, conditions } }
    const working = workingStage(dark)
    expect(working.shifted).toBe(true)
    expect(working.sentences[0]).toContain('strikes up to 20\u00A0V later')
    const strike = solveStage(working.stage).reason.strike?.voltage ?? 0
    expect(strike - (solveStage(design.stage).reason.strike?.voltage ?? 0)).toBeCloseTo(20, 9)
    expect(dark.stage.lamp.knots).toBe(genericSmallLamp)
    const off = {
      ...design,
      lampDetails: { ...typedDetails, conditions: { ...conditions, on: false } },
    }
    expect(workingStage(off).stage).toBe(design.stage)
  })

  it('says why conditions cannot be applied, and then leaves the lamp as it is', () => {
    const impossible = {
      ...noConditions,
      on: true,
      surroundings: 'dark' as const,
      effects: { ...noConditions.effects, dark: { strikeRise: -60, delayGrowth: 0 } },
    }
    const working = workingStage({
      ...design,
      lampDetails: { ...typedDetails, conditions: impossible },
    })
    expect(working.fault).toContain('no glow lamp')
    expect(working.stage).toBe(design.stage)
  })

  it('turns a lamp round and back to the very same design', () => {
    const twoWay = { ...design, lampDetails: { ...typedDetails, otherWay: other } }
    const turned = lampTurned(twoWay)
    expect(turned.stage.lamp.knots).toBe(other)
    expect(turned.lampDetails?.otherWay).toBe(genericSmallLamp)
    expect(lampTurned(turned)).toEqual(twoWay)
    expect(lampTurned(design)).toBe(design)
  })

  it('puts a lamp in and takes the same out again', () => {
    const entry = catalogueEntry('A1A')
    if (entry === null) throw new Error('A1A is missing')
    const record: LampRecord = { ...recordOf(entry), baseResistance: 100e3, reverseKnots: other }
    expect(recordOfDesign(designWithLamp(design, record))).toEqual(record)
  })

  it('keeps the conditions when the lamp is changed', () => {
    const conditions = { ...noConditions, on: true, temperature: 40 }
    const entry = catalogueEntry('C2A')
    if (entry === null) throw new Error('C2A is missing')
    const changed = designWithLamp(
      { ...design, lampDetails: { ...typedDetails, conditions } },
      recordOf(entry),
    )
    expect(detailsOf(changed).conditions).toBe(conditions)
  })
})
