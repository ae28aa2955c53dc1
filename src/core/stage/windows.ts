import { type Branches, currentOn, pieceAt } from './branches'
import {
  landingAbove,
  landingBelow,
  recoveryCapacitance,
  recoveryFloor,
  topLevel,
  valleyLevel,
} from './landing'
import { type LoadLine, loadCurrent, resistanceThrough, supplyThrough } from './loadLine'
import { follow, type Pace } from './motion'
import { bisect } from './recovery'

/** A range of a part's value within which the stage flashes; `min` may be 0, both ends are limits. */
export type Window = { readonly min: number; readonly max: number }

/** A point that the load line passes where the motion changes: V across the capacitor, A in the lamp. */
type Turn = { readonly level: number; readonly current: number }

/**
 * All points of the plane at which the fate can change as the load line passes them: the ends of the
 * branches, the landings between them, and where the recovery just keeps up. Landings depend on the
 * characteristic alone, so these are few and fixed.
 */
function turnsOf(path: Branches, capacitance: number, recoveryTime: number): Turn[] {
  const turns: Turn[] = []
  const add = (level: number, current: number) => turns.push({ level, current })
  for (let k = 0; k < path.top.length; k++) {
    const high = topLevel(path, k)
    add(high, path.current[path.top[k] as number] as number)
    const above = landingAbove(path, k, high)
    if (above >= 0) add(high, currentOn(path, pieceAt(path, above, high), high))
    if (k === 0) continue
    const low = valleyLevel(path, k)
    add(low, path.current[path.bottom[k] as number] as number)
    const below = landingBelow(path, k)
    const landing = currentOn(path, pieceAt(path, below, low), low)
    add(low, landing)
    const floor = recoveryFloor(path, k, below)
    if (recoveryTime > 0 && floor === low) {
      add(low, landing + (capacitance * (topLevel(path, below) - floor)) / recoveryTime)
    }
  }
  return turns
}

/** Voltage reached by the end of a wait that begins at the top of a branch, V. */
function levelAfterWait(path: Branches, pace: Pace, branch: number): number {
  const start = topLevel(path, branch)
  const link = 1 / pace.line.resistance + pace.line.leakage
  const current = path.current[path.top[branch] as number] as number
  const rise = (loadCurrent(pace.line, start) - current) / link
  const wait = pace.wait === null ? 0 : pace.wait()
  return start + rise * -Math.expm1((-wait * link) / pace.capacitance)
}

/**
 * Values at which a wait carries the strike just to the top of another branch: found by halving, since the
 * level reached moves one way with supply voltage and with resistance.
 */
function waitCrossings(
  path: Branches,
  paceAt: (value: number) => Pace,
  values: readonly number[],
): number[] {
  const found: number[] = []
  const low = 1e-9 * Math.min(...values)
  const high = 2 * Math.max(...values)
  for (let k = 0; k < path.top.length; k++) {
    for (let other = k + 1; other < path.top.length; other++) {
      const target = topLevel(path, other)
      if (target <= topLevel(path, k)) continue
      const short = (value: number) => levelAfterWait(path, paceAt(value), k) < target
      const shortBelow = short(low)
      if (short(high) !== shortBelow) {
        found.push(bisect(low, high, (value) => short(value) === shortBelow))
      }
    }
  }
  return found
}

/** A range narrower than this, as a ratio, is rounding's doing and none. */
const narrowest = 1 + 1e-9

/** Where to look between two neighbouring turns: just inside both ends, and evenly by ratio between. */
function looksBetween(min: number, max: number, parts: number): number[] {
  const span = max - min
  const low = min > 0 ? min : max * 1e-6
  const found = [min + span * 1e-12]
  for (let k = 1; k < parts; k++) found.push(low * (max / low) ** (k / parts))
  found.push(max - span * 1e-12)
  return found
}

/**
 * Ranges of one value within which the stage flashes from switch-on, lowest first. Between two neighbouring
 * turns nothing changes, so one look there settles it. Where strikes come early or late *and* may pass a
 * branch by, the fate can change between turns as well: then there are more looks, and each change found is
 * halved down to rounding. With one falling region it changes once at most and both ends tell all; with more,
 * a range narrower than the looks are apart can be missed.
 */
function windowsOver(
  path: Branches,
  turns: readonly number[],
  paceAt: (value: number) => Pace,
): Window[] {
  const marks = turns.filter((value) => value > 0 && Number.isFinite(value))
  if (marks.length === 0) return []
  const pace = paceAt(1)
  if (pace.wait !== null) marks.push(...waitCrossings(path, paceAt, marks))
  marks.sort((a, b) => a - b)
  const movingLandings = pace.recoveryTime > 0 && (path.top.length > 2 || pace.wait !== null)
  const flashes = (value: number) => follow(path, paceAt(value), null).kind === 'cycle'
  const found: { min: number; max: number }[] = []
  const add = (min: number, max: number) => {
    const last = found.at(-1)
    if (last !== undefined && last.max === min) last.max = max
    else found.push({ min, max })
  }
  const beyond = 4 * (marks.at(-1) as number)
  for (let k = 0; k <= marks.length; k++) {
    const min = marks[k - 1] ?? 0
    const max = marks[k] ?? beyond
    if (!(max > min)) continue
    if (!movingLandings) {
      if (flashes(min > 0 ? Math.sqrt(min) * Math.sqrt(max) : max / 2)) add(min, max)
      continue
    }
    const places = looksBetween(min, max, path.top.length > 2 ? 24 : 1)
    let from = min
    let inside = flashes(places[0] as number)
    for (let n = 1; n < places.length; n++) {
      const a = places[n - 1] as number
      const b = places[n] as number
      const before = inside
      inside = flashes(b)
      if (inside === before) continue
      const change = bisect(a, b, (x) => flashes(x) === before)
      if (before) add(from, change)
      from = change
    }
    if (inside) add(from, max)
  }
  return movingLandings ? found.filter((window) => window.max > window.min * narrowest) : found
}

/**
 * Current, A, of which the load line must leave less at the first valley: the valley's own, or less still
 * if the recovery is to keep up.
 */
export function mostAtValley(path: Branches, pace: Pace): number {
  const low = valleyLevel(path, 1)
  const valley = path.current[path.bottom[1] as number] as number
  if (pace.recoveryTime === 0) return valley
  const landing = currentOn(path, pieceAt(path, 0, low), low)
  return Math.min(
    valley,
    landing + (pace.capacitance * (topLevel(path, 0) - low)) / pace.recoveryTime,
  )
}

/**
 * The window of a lamp with one falling region that strikes without delay: the load line must pass less
 * than the valley's current at the valley (or less still, if the recovery is to keep up) and more than the
 * knee's at the knee.
 */
function plainResistanceWindows(path: Branches, pace: Pace): Window[] {
  const { voltage, leakage } = pace.line
  const strike = topLevel(path, 0)
  const low = valleyLevel(path, 1)
  if (topLevel(path, 1) < strike || voltage <= strike) return []
  const min = resistanceThrough(voltage, leakage, low, mostAtValley(path, pace))
  const knee = path.current[path.top[0] as number] as number
  const max = resistanceThrough(voltage, leakage, strike, knee)
  return max > min ? [{ min, max }] : []
}

/** Ranges of the resistance between supply and capacitor, Ω, within which the stage flashes at this supply. */
export function resistanceWindows(path: Branches, pace: Pace): Window[] {
  if (path.top.length < 2) return []
  if (path.top.length === 2 && pace.wait === null) return plainResistanceWindows(path, pace)
  return generalResistanceWindows(path, pace)
}

/** The same by the general method, for any lamp; public so that a check can hold the two together. */
export function generalResistanceWindows(path: Branches, pace: Pace): Window[] {
  const { voltage, leakage } = pace.line
  const turns = turnsOf(path, pace.capacitance, pace.recoveryTime).map((turn) =>
    resistanceThrough(voltage, leakage, turn.level, turn.current),
  )
  const lineAt = (resistance: number): LoadLine => ({ voltage, resistance, leakage })
  return windowsOver(path, turns, (value) => ({ ...pace, line: lineAt(value) }))
}

/** Ranges of the supply voltage, V, within which the stage flashes with these resistances. */
export function supplyWindows(path: Branches, pace: Pace): Window[] {
  const { resistance, leakage } = pace.line
  const turns = turnsOf(path, pace.capacitance, pace.recoveryTime).map((turn) =>
    supplyThrough(resistance, leakage, turn.level, turn.current),
  )
  const lineAt = (voltage: number): LoadLine => ({ voltage, resistance, leakage })
  return windowsOver(path, turns, (value) => ({ ...pace, line: lineAt(value) }))
}

/** Capacitance, F, with which a wait carries the strike just to `target` V; zero where none carries it so far. */
function waitCapacitance(path: Branches, pace: Pace, branch: number, target: number): number {
  if (pace.wait === null) return 0
  const start = topLevel(path, branch)
  const link = 1 / pace.line.resistance + pace.line.leakage
  const current = path.current[path.top[branch] as number] as number
  const part = ((target - start) * link) / (loadCurrent(pace.line, start) - current)
  return part > 0 && part < 1 ? (pace.wait() * link) / -Math.log1p(-part) : 0
}

/**
 * Ranges of the capacitance, F, within which the stage flashes with this load line. The load line stays, so
 * only recovery and strike delay can turn it; `max` is `Infinity` where more capacitance never stops it.
 */
export function capacitanceWindows(path: Branches, pace: Pace): Window[] {
  const turns = [pace.capacitance]
  for (let k = 0; k < path.top.length; k++) {
    for (let other = k + 1; other < path.top.length; other++) {
      turns.push(waitCapacitance(path, pace, k, topLevel(path, other)))
    }
    if (k === 0) continue
    const lands = landingBelow(path, k)
    const least = recoveryCapacitance(path, pace.line, pace.recoveryTime, k, lands)
    // With many times the least, the lamp has recovered long before it strikes.
    turns.push(least, 50 * least)
  }
  const windows = windowsOver(path, turns, (capacitance) => ({ ...pace, capacitance }))
  const last = windows.at(-1)
  if (last === undefined || last.max <= Math.max(...turns)) return windows
  return [...windows.slice(0, -1), { min: last.min, max: Number.POSITIVE_INFINITY }]
}

/** The window that holds a value, else the nearest by ratio; null of none. */
export function nearestWindow(windows: readonly Window[], value: number): Window | null {
  let best: Window | null = null
  let least = Number.POSITIVE_INFINITY
  for (const window of windows) {
    const distance =
      value < window.min
        ? Math.log(window.min / value)
        : value > window.max
          ? Math.log(value / window.max)
          : 0
    if (distance < least || best === null) {
      best = window
      least = distance
    }
  }
  return best
}
