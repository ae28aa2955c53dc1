import type { Branches } from './branches'
import { topLevel, valleyLevel } from './landing'
import { equivalentSource, type LoadLine, loadCurrent } from './loadLine'
import { type Fate, follow, type Pace } from './motion'
import { mostAtValley, nearestWindow, supplyWindows, type Window } from './windows'

/** Why the verdict is what it is. */
export type ReasonCode =
  /** The load line threads between knee and valley. */
  | 'between knee and valley'
  /** Dark: the supply never reaches strike voltage. */
  | 'supply below strike'
  /** Dark: the supply would, but the leakage pulls it down. */
  | 'leakage holds it below strike'
  /** Dark: strike voltage is in reach, but lamp and leakage take more at the knee than the resistor passes. */
  | 'too little current at the knee'
  /** Lit: more current than the valley's flows at extinction voltage, so it never goes out. */
  | 'too much current at the valley'
  /** Lit: it would go out, but the capacitor charges faster than the strike voltage comes back. */
  | 'cannot recover'
  /** The characteristic, lead resistor included, has no falling region, or none below where it rests. */
  | 'no falling region'
  /** Dark and lit rests both exist. */
  | 'two rests'
  /** The strike lands beyond the end of the characteristic. */
  | 'strike beyond the data'
  /** The current climbs beyond the end of the characteristic. */
  | 'current beyond the data'

/** One quantity to change, and the limit to pass. */
export type Change = {
  readonly quantity:
    | 'supplyVoltage'
    | 'seriesResistance'
    | 'capacitance'
    | 'leakageResistance'
    | 'leadResistance'
  /** `at least`: go above the value; `at most`: below it. */
  readonly sense: 'at least' | 'at most'
  /** V, Ω or F. */
  readonly value: number
}

/** Changes which, made together, would make the stage flash. */
export type Remedy = readonly Change[]

/** Why the verdict is what it is, with the numbers for one sentence. */
export type Reason = {
  readonly code: ReasonCode
  /** Knee and valley as the capacitor sees them: V, and lamp current there, A. Null of no falling region, and of no valley. */
  readonly strike: { readonly voltage: number; readonly current: number } | null
  readonly extinction: { readonly voltage: number; readonly current: number } | null
  /** Current the load line leaves for the lamp at strike and at extinction voltage, A. */
  readonly currentAtStrike: number
  readonly currentAtExtinction: number
  /** What would make it flash, the smallest change first; empty where it flashes or nothing would. */
  readonly remedies: readonly Remedy[]
}

/** What the remedies are looked for among. */
export type Setting = {
  readonly path: Branches
  readonly pace: Pace
  readonly fate: Fate
  readonly sourceResistance: number
  readonly seriesResistance: number
  /** Lead resistance, Ω, below which the stage would flash, asked where this one leaves no glow branch. */
  readonly leadNeeded: number | null
  readonly window: Window | null
  readonly leastCapacitance: number | null
}

/** Why this fate, and what would make it flash. */
export function reasonFor(setting: Setting, twoRests: boolean): Reason {
  const { path, pace, fate } = setting
  const folds = path.top.length > 1
  const line = pace.line
  const strike = falls(path) ? at(topLevel(path, 0), path.current[path.top[0] as number]) : null
  const valley = fate.kind !== 'rest' && fate.branch > 0 ? fate.branch : Math.max(1, fate.branch)
  const extinction = folds
    ? at(valleyLevel(path, valley), path.current[path.bottom[valley] as number])
    : null
  return {
    code: codeFor(setting, twoRests),
    strike,
    extinction,
    currentAtStrike: strike === null ? 0 : loadCurrent(line, strike.voltage),
    currentAtExtinction: extinction === null ? 0 : loadCurrent(line, extinction.voltage),
    remedies: fate.kind === 'cycle' ? [] : remediesFor(setting),
  }
}

const at = (voltage: number, current: number | undefined) => ({
  voltage,
  current: current as number,
})

/** Whether anything falls at all, be it at the very end of the data. */
const falls = (path: Branches) => (path.top[0] as number) + 1 < path.level.length

function codeFor({ path, pace, fate }: Setting, twoRests: boolean): ReasonCode {
  if (fate.kind === 'cycle') return 'between knee and valley'
  if (fate.kind === 'held') return 'cannot recover'
  if (fate.kind === 'over range') {
    return fate.branch === path.top.length - 1 && path.top[fate.branch] === path.level.length - 1
      ? 'current beyond the data'
      : 'strike beyond the data'
  }
  if (twoRests) return 'two rests'
  const straightened =
    fate.branch === 0 && fate.current > (path.current[path.firstGlowPiece] as number)
  if (!falls(path) || straightened) return 'no falling region'
  if (fate.branch > 0) return 'too much current at the valley'
  const strike = topLevel(path, 0)
  if (pace.line.voltage <= strike) return 'supply below strike'
  if (equivalentSource(pace.line).voltage <= strike) return 'leakage holds it below strike'
  return 'too little current at the knee'
}

/** Size of a change, as a ratio without a sign, to put the smallest first. */
const size = (from: number, to: number) => Math.abs(Math.log(to / from))

function remediesFor(setting: Setting): Remedy[] {
  const { path, pace, window, seriesResistance } = setting
  const found: { remedy: Remedy; cost: number }[] = []
  const offer = (cost: number, ...remedy: Change[]) => found.push({ remedy, cost })
  if (path.top.length < 2) {
    const limit = setting.leadNeeded
    if (limit !== null) offer(0, { quantity: 'leadResistance', sense: 'at most', value: limit })
    return found.map(({ remedy }) => remedy)
  }
  if (window !== null) {
    const more = seriesResistance <= window.min
    const value = more ? window.min : window.max
    offer(size(seriesResistance, value), {
      quantity: 'seriesResistance',
      sense: more ? 'at least' : 'at most',
      value,
    })
  }
  const supply = nearestWindow(supplyWindows(path, pace), pace.line.voltage)
  if (supply !== null) {
    const more = pace.line.voltage <= supply.min
    const value = more ? supply.min : supply.max
    offer(size(pace.line.voltage, value), {
      quantity: 'supplyVoltage',
      sense: more ? 'at least' : 'at most',
      value,
    })
  }
  if (setting.leastCapacitance !== null && pace.capacitance <= setting.leastCapacitance) {
    const value = setting.leastCapacitance
    offer(size(pace.capacitance, value), { quantity: 'capacitance', sense: 'at least', value })
  }
  const insulation = leakageNeeded(path, pace)
  if (insulation !== null) {
    const value = insulation
    offer(size(1 / pace.line.leakage, value), {
      quantity: 'leakageResistance',
      sense: 'at least',
      value,
    })
  }
  if (found.length === 0) {
    const pair = bothNeeded(setting)
    if (pair !== null) offer(0, ...pair)
  }
  return found.sort((a, b) => a.cost - b.cost).map(({ remedy }) => remedy)
}

/** Leakage resistance, Ω, above which the lamp strikes and goes on to flash; null where it is not that. */
function leakageNeeded(path: Branches, pace: Pace): number | null {
  const { voltage, resistance, leakage } = pace.line
  if (leakage === 0) return null
  const strike = topLevel(path, 0)
  const spare = (voltage - strike) / resistance - (path.current[path.top[0] as number] as number)
  const limit = spare / strike
  if (!(limit > 0 && limit < leakage)) return null
  const cleaner: LoadLine = { voltage, resistance, leakage: limit * 0.999 }
  return follow(path, { ...pace, line: cleaner }, null).kind === 'cycle' ? 1 / limit : null
}

/**
 * Series resistance and supply voltage to change together where neither alone will do: twice the least
 * resistance whose load lines can pass between knee and valley at all, and the supply that then goes
 * through the middle.
 */
function bothNeeded({ path, pace, sourceResistance }: Setting): Change[] | null {
  const knee = path.top[0] as number
  const valley = path.bottom[1] as number
  const drop = (path.level[knee] as number) - (path.level[valley] as number)
  const { leakage } = pace.line
  const gain = mostAtValley(path, pace) - (path.current[knee] as number) - drop * leakage
  if (!(gain > 0)) return null
  const resistance = Math.max(sourceResistance, (2 * drop) / gain)
  const line: LoadLine = { voltage: pace.line.voltage, resistance, leakage }
  const windows = supplyWindows(path, { ...pace, line })
  const window = windows[0]
  if (window === undefined) return null
  return [
    {
      quantity: 'seriesResistance',
      sense: 'at least',
      value: Math.max(0, resistance - sourceResistance),
    },
    { quantity: 'supplyVoltage', sense: 'at least', value: (window.min + window.max) / 2 },
  ]
}
