import { type Branches, branchesOf } from './branches'
import { type Cycle, cycleFrom } from './cycle'
import { jitterOf, noJitter } from './jitter'
import { landingBelow, recoveryCapacitance } from './landing'
import { leadNeeded } from './leadNeeded'
import { loadLineOf, resistanceThrough } from './loadLine'
import { type Fate, follow, type Pace, type Trail } from './motion'
import { type OperatingPoint, operatingPointsOf } from './operatingPoints'
import type { Phase } from './phase'
import { type Reason, reasonFor } from './reason'
import { effectiveCapacitance, faultInStage, type Stage } from './stage'
import { capacitanceWindows, nearestWindow, resistanceWindows, type Window } from './windows'

/** What becomes of a stage, in plain words. */
export type Verdict = 'flashes' | 'stays dark' | 'stays lit' | 'latches' | 'over range'

/** All there is to know about a stage. */
export type Solution = {
  readonly verdict: Verdict
  readonly reason: Reason
  /** Crossings of load line and characteristic, in order of current. */
  readonly operatingPoints: readonly OperatingPoint[]
  /**
   * Series resistances, Ω, between which this stage flashes at this supply: the range that holds the present
   * one, else the nearest; null when none does. The ends are limits.
   */
  readonly window: Window | null
  /** All such ranges, lowest first; more than one only where the lamp has several falling regions. */
  readonly windows: readonly Window[]
  /**
   * How far the series resistance is from each edge of the window, as a ratio: above 1 inside. `toLit`:
   * resistance / min (`Infinity` where the window begins at 0); `toDark`: max / resistance. Null without
   * a window.
   */
  readonly margin: { readonly toLit: number; readonly toDark: number } | null
  /**
   * Least capacitance, F, at which the stage still flashes with this load line: with less the lamp cannot
   * recover, or the strike delay carries it off the end of the characteristic. 0 = any; null where this load
   * line does not flash with any.
   */
  readonly leastCapacitance: number | null
  /** Capacitance reckoned with, F, and whether it is the stray one because none is fitted. */
  readonly capacitance: number
  readonly strayOnly: boolean
  readonly cycle: Cycle | null
  /**
   * What happens from switch-on, capacitor empty: up to the first strike and through the first cycle where
   * it flashes, else to the rest, whose last phase lasts for ever, or to the end of the data.
   */
  readonly fromSwitchOn: readonly Phase[]
}

/** The pace of a stage, each strike waiting the mean strike delay. */
export function paceOf(stage: Stage, wait: (() => number) | null): Pace {
  return {
    line: loadLineOf(stage),
    capacitance: effectiveCapacitance(stage),
    recoveryTime: stage.lamp.recoveryTime,
    wait,
  }
}

/** Each strike waiting the mean delay; null where there is none. */
export function meanWait(strikeDelay: number): (() => number) | null {
  return strikeDelay > 0 ? () => strikeDelay : null
}

/**
 * Solves a stage: verdict, reason, operating points, window and cycle, all in closed form.
 *
 * @throws RangeError for a stage that `faultInStage` finds fault with: ask that first of anything typed.
 */
export function solveStage(stage: Stage): Solution {
  const fault = faultInStage(stage)
  if (fault !== null) throw new RangeError(fault)
  const { lamp } = stage
  const path = branchesOf(lamp.knots, stage.leadResistance)
  const pace = paceOf(stage, meanWait(lamp.strikeDelay))
  const trail: Trail = { phases: [], firstStrike: -1, cycleStart: -1 }
  const fate = follow(path, pace, trail)
  const operatingPoints = operatingPointsOf(path, pace.line, stage.leadResistance)
  if (fate.kind === 'held') holdPoint(operatingPoints, fate, stage.leadResistance)

  const windows = seriesWindows(path, pace, stage.sourceResistance)
  const window = nearestWindow(windows, stage.seriesResistance)
  const leastCapacitance = leastCapacitanceOf(path, pace, fate)
  const darkRest = fate.kind === 'rest' && fate.branch === 0 && !isLit(path, fate)
  const twoRests = darkRest && operatingPoints.some((point) => point.lit && point.stable)

  return {
    verdict: verdictOf(fate, darkRest, twoRests),
    reason: reasonFor(
      {
        path,
        pace,
        fate,
        sourceResistance: stage.sourceResistance,
        seriesResistance: stage.seriesResistance,
        leadNeeded: path.top.length < 2 ? leadNeeded(lamp.knots, pace, stage.leadResistance) : null,
        window,
        leastCapacitance,
      },
      twoRests,
    ),
    operatingPoints,
    window,
    windows,
    margin:
      window === null
        ? null
        : {
            toLit: window.min > 0 ? stage.seriesResistance / window.min : Number.POSITIVE_INFINITY,
            toDark: window.max / stage.seriesResistance,
          },
    leastCapacitance,
    capacitance: pace.capacitance,
    strayOnly: stage.capacitance === 0,
    cycle: fate.kind === 'cycle' ? closedCycle(stage, path, pace, trail) : null,
    fromSwitchOn: trail.phases,
  }
}

function verdictOf(fate: Fate, darkRest: boolean, twoRests: boolean): Verdict {
  switch (fate.kind) {
    case 'cycle':
      return 'flashes'
    case 'held':
      return 'stays lit'
    case 'over range':
      return 'over range'
    case 'rest':
      return twoRests ? 'latches' : darkRest ? 'stays dark' : 'stays lit'
  }
}

/** A rest beyond the knee's current is lit, even where a lead resistor has straightened the fall out. */
function isLit(path: Branches, fate: Fate): boolean {
  return fate.current > (path.current[path.firstGlowPiece] as number)
}

function closedCycle(stage: Stage, path: Branches, pace: Pace, trail: Trail): Cycle {
  const delay = stage.lamp.strikeDelay
  return cycleFrom(stage, trail, (phases, period) =>
    delay > 0
      ? jitterOf(path, pace.line, pace.capacitance, phases, period, delay)
      : noJitter(period),
  )
}

function seriesWindows(path: Branches, pace: Pace, source: number): Window[] {
  const windows: Window[] = []
  for (const { min, max } of resistanceWindows(path, pace)) {
    if (max > source) windows.push({ min: Math.max(0, min - source), max: max - source })
  }
  return windows
}

/** The falling-region crossing at which a lamp that cannot recover stays is one it does rest at. */
function holdPoint(points: OperatingPoint[], fate: Fate, leadResistance: number): void {
  const held = {
    current: fate.current,
    voltage: fate.level - leadResistance * fate.current,
    capacitorVoltage: fate.level,
    stable: true,
    lit: true,
  }
  const index = points.findIndex((point) => !point.stable)
  if (index >= 0) points[index] = held
  else points.push(held)
}

function leastCapacitanceOf(path: Branches, pace: Pace, fate: Fate): number | null {
  if (path.top.length < 2) return null
  if (path.top.length > 2 || pace.wait !== null) {
    return nearestWindow(capacitanceWindows(path, pace), pace.capacitance)?.min ?? null
  }
  if (fate.kind !== 'cycle' && fate.kind !== 'held') return null
  const { branch } = fate
  return recoveryCapacitance(path, pace.line, pace.recoveryTime, branch, landingBelow(path, branch))
}

/**
 * Series resistance, Ω, that takes a stage's load line through a point of the plane: `level` V across lamp
 * and lead resistor, `current` A in the lamp. Null where none does.
 */
export function seriesResistanceThrough(
  stage: Stage,
  level: number,
  current: number,
): number | null {
  const total = resistanceThrough(stage.supplyVoltage, 1 / stage.leakageResistance, level, current)
  const series = total - stage.sourceResistance
  return Number.isFinite(series) && series >= 0 ? series : null
}
