import type { Branches } from './branches'
import { type LoadLine, loadCurrent } from './loadLine'

/** Where the load line crosses the characteristic. */
export type OperatingPoint = {
  /** Lamp current, A. */
  readonly current: number
  /** Voltage at the lamp, V. */
  readonly voltage: number
  /** Voltage across the capacitor, V: the lamp's and the lead resistor's together. */
  readonly capacitorVoltage: number
  /** Whether the circuit can rest there. A crossing of the falling region cannot hold with a capacitor. */
  readonly stable: boolean
  /** Whether it lies on the glow side of the knee. */
  readonly lit: boolean
}

/**
 * All crossings of load line and characteristic, in order of current. Along each straight piece both run
 * straight, so the crossing is where their difference, linear too, is zero.
 */
export function operatingPointsOf(
  path: Branches,
  line: LoadLine,
  leadResistance: number,
): OperatingPoint[] {
  const { current, level } = path
  const points: OperatingPoint[] = []
  let branch = 0
  let before = loadCurrent(line, level[0] as number) - (current[0] as number)
  for (let piece = 0; piece + 1 < current.length; piece++) {
    while (branch + 1 < path.bottom.length && (path.top[branch] as number) <= piece) branch++
    const after = loadCurrent(line, level[piece + 1] as number) - (current[piece + 1] as number)
    // A crossing at a knot belongs to the piece below it; the very first knot to the first piece.
    const crosses =
      (before > 0 && after <= 0) || (before < 0 && after >= 0) || (piece === 0 && before === 0)
    if (crosses) {
      const part = before === after ? 0 : before / (before - after)
      const left = current[piece] as number
      const low = level[piece] as number
      const at = left + part * ((current[piece + 1] as number) - left)
      const capacitorVoltage = low + part * ((level[piece + 1] as number) - low)
      points.push({
        current: at,
        voltage: Math.max(0, capacitorVoltage - leadResistance * at),
        capacitorVoltage,
        stable: standsOnBranch(path, branch, piece, part),
        lit: piece >= path.firstGlowPiece,
      })
    }
    before = after
  }
  return points
}

/** On a rising branch, its valley included: there the circuit comes back after a push. */
function standsOnBranch(path: Branches, branch: number, piece: number, part: number): boolean {
  const bottom = path.bottom[branch] as number
  const top = path.top[branch] as number
  return (piece >= bottom && piece < top) || (part === 1 && piece + 1 === bottom)
}
