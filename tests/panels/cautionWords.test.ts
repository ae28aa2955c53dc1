import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { cautionsFor } from '../../src/core'
import { cautionWords, mainsCaution } from '../../src/panels/words/cautionWords'
import { anyStage } from '../chart/drawing'
import { stageOf } from '../support/stages'

const wordsFor = (stage: Parameters<typeof cautionsFor>[0]) =>
  cautionsFor(stage).map((caution) => ({
    kind: caution.kind,
    ...cautionWords(caution),
    text: cautionWords(caution).text.replaceAll('\u00A0', ' '),
  }))

describe('cautionWords', () => {
  it('says which voltage is dangerous, the limit, and what to do before reaching in', () => {
    const [voltage] = wordsFor(stageOf({ supplyVoltage: 120 }))
    expect(voltage!.text).toContain('120 V is dangerous to touch')
    // IEC 61010-1, 6.3.1: 60 V dc (as quoted in secondary sources).
    expect(voltage!.text).toContain('60 V dc')
    expect(voltage!.text).toContain('discharge')
    expect(voltage!.source).toContain('IEC 61010-1')
  })

  it('says how much charge the capacitor can hold, and how to discharge it', () => {
    const words = wordsFor(stageOf({ supplyVoltage: 120, capacitance: 10e-6 }))
    const charge = words.find(({ kind }) => kind === 'charge')!
    // 10 µF at 120 V; the limit of 45 µC as IEC 60335-1, 8.1.4 has it.
    expect(charge.text).toContain('1.2 mC at 120 V')
    expect(charge.text).toContain('45 µC')
    expect(charge.text).toContain('resistor')
    expect(charge.source).toContain('IEC 60335-1')
  })

  it('says that a dark lamp leaves up to all the supply gives on the capacitor', () => {
    const dark = wordsFor(stageOf()).find(({ kind }) => kind === 'dark is not discharged')!
    expect(dark.text).toContain('up to 120 V may still be on it')
  })

  it('says nothing of a stage that is safe to touch', () => {
    expect(wordsFor(stageOf({ supplyVoltage: 50 }))).toEqual([])
  })

  it('always gives a source and numbers that are numbers, whatever the design', () => {
    fc.assert(
      fc.property(anyStage, (stage) => {
        for (const { text, source } of wordsFor(stage)) {
          expect(text).not.toMatch(/NaN|undefined|null|Infinity|∞|–/)
          expect(text).toMatch(/\d/)
          expect(source.length).toBeGreaterThan(10)
        }
      }),
      { seed: 921, numRuns: 200 },
    )
  })

  it('leaves the mains to local codes and licensed people', () => {
    expect(mainsCaution).toMatch(/local codes/)
    expect(mainsCaution).toMatch(/licensed/)
  })
})
