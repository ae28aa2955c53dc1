import { describe, expect, it } from 'vitest'
import { freePieces } from '../../../src/core/lamp/fit/freePieces'
import { type KnotChoice, optimalKnots } from '../../../src/core/lamp/fit/optimalKnots'
import { pieceRules } from '../../../src/core/lamp/fit/phases'
import { pieceCosts, type WeightedPoints } from '../../../src/core/lamp/fit/pieceCosts'
import { costOf, exhaustiveCost } from './exhaustiveKnots'
import { normal, seeded } from './syntheticSweep'

const leastRise = 1e-3

/** A few points about a course that rises, falls and rises; the more noise, the less one sees of it. */
function somePoints(seed: number, count: number, noise: number): WeightedPoints {
  const random = seeded(seed)
  const level = Array.from({ length: count }, () => 5 + 145 * random()).sort((a, b) => a - b)
  const course = (at: number) =>
    at < 70 ? 0.95 * at : at < 100 ? 66.5 - 0.5 * (at - 70) : 51.5 + 0.1 * (at - 100)
  return {
    level,
    voltage: level.map((at) => course(at) + noise * normal(random)),
    weight: level.map(() => 0.5 + random()),
  }
}

function search(points: WeightedPoints, places: readonly number[], pieces: number, limit: number) {
  const costs = pieceCosts(points, places)
  const rules = pieceRules(places, leastRise, null)
  const { remainders } = freePieces(costs, pieces, rules)
  const found = optimalKnots({ costs, rules, remainders }, pieces, limit)
  if (found === 'too long') throw new Error('a small case is meant to be searched to its end')
  return found
}

function best(points: WeightedPoints, places: readonly number[], pieces: number): KnotChoice {
  const found = search(points, places, pieces, Number.POSITIVE_INFINITY)
  if (!found) throw new Error('there is a best one')
  return found
}

const cases = [0.3, 3, 20, 60].flatMap((noise) =>
  [1, 2, 3, 4, 5, 6].map((seed) => [noise, seed] as const),
)

describe('the best knots', () => {
  it.each(cases)('are those of an exhaustive search, at noise %f V and seed %i', (noise, seed) => {
    const points = somePoints(seed, 8, noise)
    const places = [0, ...Array.from(points.level)]
    for (const pieces of [3, 4]) {
      const least = exhaustiveCost(points, places, pieces, leastRise)
      const found = best(points, places, pieces)
      expect(found.cost).toBeLessThanOrEqual(least * (1 + 1e-7) + 1e-6)
      expect(found.cost).toBeGreaterThanOrEqual(least * (1 - 1e-7) - 1e-6)
    }
  })

  it.each(cases)('cost what they say and keep their course, at %f V and seed %i', (noise, seed) => {
    const points = somePoints(seed + 100, 25, noise)
    const places = [0, ...Array.from(points.level)]
    for (const pieces of [3, 4, 5]) {
      const found = best(points, places, pieces)
      const levels = found.places.map((place) => places[place]!)
      expect(found.cost).toBeCloseTo(costOf(points, levels, found.voltages), 5)
      const rises = levels.slice(1).map((_, i) => found.voltages[i + 1]! - found.voltages[i]!)
      const signs = rises.map((rise) => (rise > 1e-9 ? '+' : rise < -1e-9 ? '-' : '')).join('')
      expect(signs).toMatch(/^\+*-*\+*$/)
      for (const [i, rise] of rises.entries()) {
        expect(rise).toBeLessThanOrEqual(levels[i + 1]! - levels[i]! - leastRise + 1e-9)
      }
    }
  })

  it('cost no more with a piece more', () => {
    const points = somePoints(7, 30, 2)
    const places = [0, ...Array.from(points.level)]
    const costs = [3, 4, 5, 6].map((pieces) => best(points, places, pieces).cost)
    for (const [i, cost] of costs.entries()) {
      if (i > 0) expect(cost).toBeLessThanOrEqual(costs[i - 1]! * (1 + 1e-9))
    }
  })

  it('are found with a limit just above their cost, and nothing is with one below', () => {
    const points = somePoints(8, 30, 2)
    const places = [0, ...Array.from(points.level)]
    const { cost } = best(points, places, 4)
    expect(search(points, places, 4, cost * (1 + 1e-9))?.cost).toBeCloseTo(cost, 6)
    expect(search(points, places, 4, cost * 0.999)).toBeNull()
  })

  it('join knee and valley by one piece where a bridge is asked for', () => {
    const points = somePoints(9, 12, 1)
    const places = [0, ...Array.from(points.level)]
    const costs = pieceCosts(points, places)
    const rules = pieceRules(places, leastRise, { knee: 6, valley: 8 })
    const { remainders } = freePieces(costs, 4, rules)
    const found = optimalKnots({ costs, rules, remainders }, 4, Number.POSITIVE_INFINITY)
    if (found === null || found === 'too long') throw new Error('there is a best one')
    expect(found.places).toContain(6)
    expect(found.places[found.places.indexOf(6) + 1]).toBe(8)
  })
})
