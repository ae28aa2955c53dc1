import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Domain } from '../../src/chart/axes'
import {
  characteristicPoints,
  loadLinePoints,
  type PlanePoint,
  piecePoints,
  stretchPoints,
} from '../../src/chart/curves'
import { planeDomain } from '../../src/chart/domains'
import {
  branchesOf,
  equivalentSource,
  lampVoltageAt,
  loadCurrent,
  loadLineOf,
  type Stage,
} from '../../src/core'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'
import { anyStage, extremeStages, kinds } from './drawing'

const anyKind = fc.constantFrom(...kinds)
const pathOf = (stage: Stage) => branchesOf(stage.lamp.knots, stage.leadResistance)

/** How far a voltage is from another, in parts of the highest there is. */
const off = (a: number, b: number, stage: Stage) => {
  const highest = Math.max(1, stage.supplyVoltage, ...pathOf(stage).level)
  return Math.abs(a - b) / highest
}

const finite = (points: readonly PlanePoint[]) =>
  points.every((point) => point.every(Number.isFinite))

describe('the characteristic as points', () => {
  it('lies on the characteristic, lead resistor included, on either axis', () => {
    fc.assert(
      fc.property(stages(), anyKind, (stage, kind) => {
        const path = pathOf(stage)
        const points = characteristicPoints(path, kind, planeDomain(kind, stage, path))
        const worst = points.map(([current, level]) => {
          const most = stage.lamp.knots.at(-1)!.current
          const lamp = lampVoltageAt(stage.lamp.knots, Math.min(current, most))!
          return off(level, lamp + stage.leadResistance * current, stage)
        })
        expect(Math.max(...worst)).toBeLessThan(1e-9)
      }),
      { seed: 751 },
    )
  })

  it('passes every knot in sight, and on a logarithmic axis starts at its left end', () => {
    fc.assert(
      fc.property(stages(), anyKind, (stage, kind) => {
        const path = pathOf(stage)
        const domain = planeDomain(kind, stage, path)
        const points = characteristicPoints(path, kind, domain)
        path.current.forEach((current, k) => {
          if (current < domain[0]) return
          const least = points.map(([at, level]) =>
            Math.max(
              Math.abs(at / (current || 1) - (current ? 1 : 0)),
              off(level, path.level[k]!, stage),
            ),
          )
          expect(Math.min(...least)).toBeLessThan(1e-9)
        })
        expect(points[0]![0]).toBe(domain[0])
      }),
      { seed: 752 },
    )
  })

  it('bends smoothly on a logarithmic axis: no step of more than a decade in a piece', () => {
    const path = pathOf(stageOf())
    const points = characteristicPoints(path, 'logarithmic', [1e-8, 1e-2])
    const ratios = points.slice(1).map(([current], k) => current / points[k]![0])
    expect(Math.max(...ratios)).toBeLessThan(1.5)
    expect(Math.min(...ratios)).toBeGreaterThanOrEqual(1)
  })

  it('leaves out a piece that lies wholly to the left of a logarithmic axis', () => {
    const path = pathOf(stageOf())
    expect(piecePoints(path, 0, 'logarithmic', [1e-6, 1e-2])).toEqual([])
    expect(piecePoints(path, 0, 'linear', [1e-6, 1e-2])).toEqual([
      [0, 0],
      [0.2e-6, 75],
    ])
  })

  it.each(extremeStages)('has 2000 points at most, all of them numbers: %s', (_, stage) => {
    for (const kind of kinds) {
      const path = pathOf(stage)
      const points = characteristicPoints(path, kind, planeDomain(kind, stage, path))
      expect(points.length).toBeLessThanOrEqual(2000)
      expect(finite(points)).toBe(true)
    }
  })
})

describe('a stretch of one piece', () => {
  it('begins and ends at the levels asked for, on the piece', () => {
    fc.assert(
      fc.property(
        anyKind,
        fc.double({ min: 55.1, max: 59.9, noNaN: true }),
        fc.double({ min: 55.1, max: 59.9, noNaN: true }),
        (kind, from, to) => {
          fc.pre(Math.abs(from - to) > 1e-6)
          const path = pathOf(stageOf())
          const points = stretchPoints(path, 3, kind, [1e-8, 1e-2], from, to)
          expect(points[0]![1]).toBeCloseTo(from, 9)
          expect(points.at(-1)![1]).toBeCloseTo(to, 9)
          for (const [current, level] of points) {
            expect(lampVoltageAt(stageOf().lamp.knots, current)).toBeCloseTo(level, 9)
          }
        },
      ),
      { seed: 753 },
    )
  })

  it('is one point where it lies wholly to the left of a logarithmic axis', () => {
    const path = pathOf(stageOf())
    expect(stretchPoints(path, 0, 'logarithmic', [1e-6, 1e-2], 60, 70)).toEqual([[1e-6, 70]])
  })
})

describe('a load line as points', () => {
  it('lies on the load line on either axis, leakage included', () => {
    fc.assert(
      fc.property(stages(), anyKind, (stage, kind) => {
        const line = loadLineOf(stage)
        const domain = planeDomain(kind, stage, pathOf(stage))
        const short = loadCurrent(line, 0)
        for (const [current, level] of loadLinePoints(line, kind, domain)) {
          expect(Math.abs(loadCurrent(line, level) - current)).toBeLessThanOrEqual(1e-9 * short)
        }
      }),
      { seed: 754 },
    )
  })

  it('runs from what the source gives with no current down to no voltage', () => {
    fc.assert(
      fc.property(stages(), anyKind, (stage, kind) => {
        const line = loadLineOf(stage)
        const source = equivalentSource(line)
        const domain = planeDomain(kind, stage, pathOf(stage))
        const points = loadLinePoints(line, kind, domain)
        const short = source.voltage / source.resistance
        fc.pre(short > domain[0])
        expect(points[0]![0]).toBe(domain[0])
        expect(
          off(points[0]![1], source.voltage - domain[0] * source.resistance, stage),
        ).toBeLessThan(1e-9)
        expect(points.at(-1)![0] / short).toBeCloseTo(1, 9)
        expect(off(points.at(-1)![1], 0, stage)).toBeLessThan(1e-9)
        const rising = points.every(([current], k) => k === 0 || current > points[k - 1]![0])
        expect(rising).toBe(true)
      }),
      { seed: 755 },
    )
  })

  it('is straight on a linear axis: two points are all', () => {
    const line = loadLineOf(stageOf({ supplyVoltage: 120, seriesResistance: 1e6 }))
    expect(loadLinePoints(line, 'linear', [0, 2e-4])).toEqual([
      [0, 120],
      [120e-6, 0],
    ])
  })

  it('is finer in voltage than a fiftieth and in current than a third, so that it looks a curve', () => {
    const line = loadLineOf(stageOf())
    const points = loadLinePoints(line, 'logarithmic', [1e-8, 1e-2])
    points.slice(1).forEach(([current, level], k) => {
      expect(points[k]![1] - level).toBeLessThan(120 / 50)
      expect(current / points[k]![0]).toBeLessThan(4 / 3)
    })
  })

  it('is a single point where the supply gives nothing', () => {
    const line = loadLineOf(stageOf({ supplyVoltage: 0 }))
    const domain: Domain = [1e-8, 1e-2]
    expect(loadLinePoints(line, 'logarithmic', domain)).toEqual([[1e-8, 0]])
    expect(loadLinePoints(line, 'linear', [0, 1])).toEqual([[0, 0]])
  })

  it('has 2000 points at most, all of them numbers, for any design', () => {
    fc.assert(
      fc.property(
        fc.oneof(anyStage, fc.constantFrom(...extremeStages.map(([, stage]) => stage))),
        anyKind,
        (stage, kind) => {
          const domain = planeDomain(kind, stage, pathOf(stage))
          const points = loadLinePoints(loadLineOf(stage), kind, domain)
          expect(points.length).toBeLessThanOrEqual(2000)
          expect(finite(points)).toBe(true)
          expect(points.every(([, level]) => level >= 0)).toBe(true)
        },
      ),
      { seed: 756 },
    )
  })
})
