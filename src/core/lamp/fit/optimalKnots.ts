import {
  type Chain,
  type ChainPart,
  type Course,
  extendChain,
  leastOf,
  originChain,
  withinLimit,
} from './chain'
import type { FreePieces } from './freePieces'
import { type EnvelopePart, LowerEnvelope, quadraticAt } from './lowerEnvelope'
import { dark, falling, glow, type Phase, type PieceRules, phases } from './phases'
import type { PieceCost } from './pieceCosts'

/** The best knots. */
export type KnotChoice = {
  /** Weighted squares of all points, least possible with so many knots at the places. */
  readonly cost: number
  /** Index of each knot's place, the origin's 0 first. */
  readonly places: readonly number[]
  /** Voltage at each, V. */
  readonly voltages: readonly number[]
}

/** What is known before the search. */
export type KnotProblem = {
  /** Of every piece between two places; the first place is the origin, the last the end. */
  readonly costs: readonly (readonly (PieceCost | null)[])[]
  readonly rules: PieceRules
  readonly remainders: FreePieces['remainders']
}

/**
 * The best continuous characteristic of so many straight pieces that costs no more than `limit`;
 * null where there is none, and 'too long' if more than `patience` pairs of chains would have to be compared. It starts at 0 V at the first place, ends at the last, rises along the
 * dark branch, falls, and rises along the glow branch; its knots stand at places. Exactly the best
 * of all such: dynamic programming over the places, keeping for every place the least cost so far
 * as a function of the voltage there, which is an envelope of quadratics.
 *
 * Source: functional pruning, Rigaill, Journal de la Société Française de Statistique 156 (2015) 180;
 * for continuous pieces Fearnhead, Maidstone and Letchford, Journal of Computational and Graphical
 * Statistics 28 (2019) 265 [both from memory]; the bounds on rise and fall are our own.
 */
export function optimalKnots(
  problem: KnotProblem,
  pieces: number,
  limit: number,
  patience = Number.POSITIVE_INFINITY,
): KnotChoice | 'too long' | null {
  let work = 0
  const { costs, rules, remainders } = problem
  const last = costs.length - 1
  const roomy = limit + 1e-9 * (1 + Math.abs(limit))
  /** The most a chain may cost that ends at a place with a piece of that phase. */
  const limitAt = (used: number, phase: Phase, place: number) =>
    roomy - (remainders[pieces - used]?.[phase]?.[place] as number)

  let before: readonly (readonly ChainPart[])[][] = phases.map((phase) =>
    costs.map((_, place) => (phase === dark && place === 0 ? [origin] : [])),
  )
  for (let used = 1; used <= pieces; used++) {
    const next = phases.map(() => costs.map(() => new LowerEnvelope<Chain>()))
    for (const phase of phases) {
      for (let a = 0; a < last; a++) {
        const starts = startsAt(before, phase, a)
        if (starts.length === 0) continue
        for (let b = a + 1; b <= last; b++) {
          const cost = costs[a]?.[b]
          const most = limitAt(used, phase, b)
          if (!cost || !(most >= 0) || !rules.allows(phase, a, b)) continue
          const envelope = next[phase]?.[b] as LowerEnvelope<Chain>
          work += starts.length * (8 + envelope.parts.length)
          if (work > patience) return 'too long'
          const course: Course =
            phase === falling ? { rising: false } : { rising: true, most: rules.mostRise(a, b) }
          for (const part of starts) {
            extendChain(part, cost, course, b, (chain) => {
              const useful = withinLimit(chain, most)
              if (useful) envelope.add(useful)
            })
          }
        }
      }
    }
    before = next.map((row, phase) =>
      row.map(({ parts }, place) => withEnds(parts, limitAt(used, phase as Phase, place))),
    )
  }
  return bestOf(before[glow]?.[last] ?? [])
}

const origin: ChainPart = { item: originChain, low: 0, high: 0, lowEnd: true, highEnd: true }

/** What a piece of that phase may start from: the end of one like it, or of the phase before. */
function startsAt(
  before: readonly (readonly (readonly ChainPart[])[])[],
  phase: Phase,
  place: number,
): readonly ChainPart[] {
  const own = before[phase]?.[place] ?? []
  const earlier = phase === dark ? [] : (before[phase - 1]?.[place] ?? [])
  return earlier.length === 0 ? own : own.length === 0 ? earlier : [...own, ...earlier]
}

/**
 * Marks where a piece may have to start from the very end of a part: where nothing goes on there, and
 * where the cost has a bend with the corner downwards, as at a bound that begins to hold. Where two
 * chains merely cross, the corner points upwards and is never the least.
 */
function withEnds(parts: readonly EnvelopePart<Chain>[], limit: number): readonly ChainPart[] {
  // An end where the chain has just become too dear is of no use to start from.
  const useful = (item: Chain, v: number) =>
    limit === Number.POSITIVE_INFINITY || quadraticAt(item, v) < limit - 1e-6 * Math.abs(limit)
  return parts.map(({ item, low, high }, i) => {
    const left = parts[i - 1]
    const right = parts[i + 1]
    const smoothLeft = left?.high === low && goesOn(left.item, item, low)
    const smoothRight = right?.low === high && goesOn(item, right.item, high)
    return {
      item,
      low,
      high,
      lowEnd: !smoothLeft && useful(item, low),
      highEnd: !smoothRight && useful(item, high),
    }
  })
}

/** Whether cost goes on from one chain to the other at `v` without a step or a corner downwards. */
function goesOn(left: Chain, right: Chain, v: number): boolean {
  const here = quadraticAt(left, v)
  if (Math.abs(quadraticAt(right, v) - here) > 1e-7 * (1 + Math.abs(here))) return false
  const before = left.square * v - left.linear
  const after = right.square * v - right.linear
  return before >= after - 1e-7 * (1 + Math.abs(left.linear) + Math.abs(right.linear))
}

/** The cheapest of some finished chains, followed back to its start. */
function bestOf(parts: readonly ChainPart[]): KnotChoice | null {
  let best: { chain: Chain; at: number; cost: number } | null = null
  for (const { item, low, high } of parts) {
    const found = leastOf(item, low, high)
    if (best === null || found.cost < best.cost) best = { chain: item, ...found }
  }
  if (best === null) return null
  const places: number[] = []
  const voltages: number[] = []
  let v = best.at
  for (let chain: Chain | null = best.chain; chain; chain = chain.before) {
    places.unshift(chain.place)
    voltages.unshift(v)
    v = chain.base + chain.gain * v
  }
  return { cost: Math.max(0, best.cost), places, voltages }
}
