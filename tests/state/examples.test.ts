import { describe, expect, it } from 'vitest'
import { solveStage } from '../../src/core'
import { genericSmallLamp } from '../../src/core/stage/genericLamp'
import { checkDesign } from '../../src/io/designFormat'
import { linkFragment } from '../../src/io/link'
import { examples } from '../../src/state/examples'
import { freshDesign } from '../../src/state/fresh'

const stageOf = (id: string) => {
  const found = examples.find((example) => example.id === id)
  if (!found) throw new Error(`There is no example ${id}`)
  return found.design.stage
}

describe('the worked examples', () => {
  it('are three, each with a name of its own, and can be kept, saved and linked', () => {
    expect(new Set(examples.map(({ id }) => id)).size).toBe(3)
    for (const { design } of examples) {
      expect(checkDesign(design)).toStrictEqual({ ok: true, design, notes: [] })
      const link = linkFragment(design)
      expect(link.ok && link.fragment.length).toBeLessThan(400)
    }
  })

  it.each([
    ['mooring-beacon', 'flashes'],
    ['panel-indicator', 'stays lit'],
    ['dark-gate', 'stays dark'],
  ])('show what they say: %s %s', (id, verdict) => {
    expect(solveStage(stageOf(id)).verdict).toBe(verdict)
  })

  it('say in their notes what the sums give', () => {
    // A flash every R·C·ln((E − Ve)/(E − Vs)) with the lamp dark almost all the time: the textbook
    // charge time, 2.2016 MΩ · 0.47 µF · ln(65/45) = 0.3805 s; on top of it the flash itself.
    const { cycle } = solveStage(stageOf('mooring-beacon'))
    const charge = 2.2016e6 * 0.47e-6 * Math.log(65 / 45)
    expect(cycle?.period).toBeGreaterThan(charge)
    expect(cycle?.period).toBeLessThan(charge * 1.05)
    expect(1 / (cycle?.period ?? 0)).toBeCloseTo(2.5, 1)

    // The straight piece from 60 V, 0.6 mA to 84 V, 8 mA has 24 V / 7.4 mA = 3243 Ω.
    const [lit] = solveStage(stageOf('panel-indicator')).operatingPoints
    const slope = 24 / 7.4e-3
    expect(lit?.current).toBeCloseTo((150 - 60 + slope * 0.6e-3) / (33e3 + slope), 9)
    expect(lit?.current).toBeCloseTo(2.5e-3, 4)
    const [design] = solveStage({
      ...stageOf('panel-indicator'),
      seriesResistance: 150e3,
    }).operatingPoints
    expect(design?.current).toBeCloseTo(0.6e-3, 5)

    const [dark] = solveStage(stageOf('dark-gate')).operatingPoints
    expect(dark?.lit).toBe(false)
    expect(dark?.capacitorVoltage).toBeGreaterThan(67.5)
    expect(dark?.capacitorVoltage).toBeLessThan(68)
  })

  it('stand on the figures noted for a generic small lamp', () => {
    // Field figures: knee 75 V at 0.2 µA, valley 55 V at 90 µA, 60 V at 0.6 mA, 84 V at 8 mA (memory).
    expect(genericSmallLamp.map(({ current, voltage }) => [current, voltage])).toEqual([
      [0, 0],
      [0.2e-6, 75],
      [90e-6, 55],
      [0.6e-3, 60],
      [8e-3, 84],
    ])
  })

  it('begin with the one that flashes', () => {
    expect(freshDesign).toBe(examples[0]?.design)
  })
})
