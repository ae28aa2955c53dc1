import { type Branches, currentOn, pieceAt } from './branches'
import { type LoadLine, loadCurrent } from './loadLine'

/** Level of a branch's valley, V; zero for the dark branch. */
export function valleyLevel(path: Branches, branch: number): number {
  return path.level[path.bottom[branch] as number] as number
}

/** Level of a branch's upper end, V: its strike voltage, or the end of the data. */
export function topLevel(path: Branches, branch: number): number {
  return path.level[path.top[branch] as number] as number
}

/** Branch on which a lamp striking from `branch` at `level` lands: the next that reaches so high; −1 = none. */
export function landingAbove(path: Branches, branch: number, level: number): number {
  for (let k = branch + 1; k < path.top.length; k++) {
    if (topLevel(path, k) >= level) return k
  }
  return -1
}

/** Branch on which a lamp going out at the valley of `branch` lands: the next that reaches so low. */
export function landingBelow(path: Branches, branch: number): number {
  const level = valleyLevel(path, branch)
  let k = branch - 1
  while (k > 0 && valleyLevel(path, k) > level) k--
  return k
}

/**
 * Level, V, from which the strike voltage of branch `to` returns after extinction at the valley of `from`.
 * Usually that valley's own; a higher valley in between must be reached before a strike can hold at all.
 */
export function recoveryFloor(path: Branches, from: number, to: number): number {
  return Math.max(valleyLevel(path, from), valleyLevel(path, to + 1))
}

/**
 * Capacitance, F, at or below which the returning strike voltage cannot outrun the capacitor after the lamp
 * has gone out at the valley of branch `from` and landed on branch `to`: the capacitor's first rate of rise
 * against that of the strike voltage. Zero where there is always time.
 */
export function recoveryCapacitance(
  path: Branches,
  line: LoadLine,
  recoveryTime: number,
  from: number,
  to: number,
): number {
  const level = valleyLevel(path, from)
  const low = recoveryFloor(path, from, to)
  if (low > level || recoveryTime === 0) return 0
  const spare = loadCurrent(line, level) - currentOn(path, pieceAt(path, to, level), level)
  return Math.max(0, (spare * recoveryTime) / (topLevel(path, to) - low))
}
