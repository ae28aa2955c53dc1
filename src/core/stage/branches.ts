import { type Knot, kneeIndexOf } from './lamp'

/**
 * The characteristic as the capacitor sees it, lead resistor included, sorted into its rising branches.
 * A branch runs from a bottom knot (a valley, except the first) to a top knot (a knee or the end); between
 * a top and the next bottom lies a falling region. A flat piece is the limit of a gently rising one, so it
 * belongs to a branch, unless both its neighbours fall.
 */
export type Branches = {
  /** Currents of the knots, A. */
  readonly current: readonly number[]
  /** Voltages across lamp and lead resistor at the knots, V. */
  readonly level: readonly number[]
  /** Knot index of each branch's lower end. */
  readonly bottom: readonly number[]
  /** Knot index of each branch's upper end. */
  readonly top: readonly number[]
  /** Pieces from this index on are glow, those below it dark. Zero where the lamp never strikes. */
  readonly firstGlowPiece: number
}

/** Sorts a characteristic into branches. `leadResistance` in Ω. */
export function branchesOf(knots: readonly Knot[], leadResistance: number): Branches {
  const count = knots.length
  const current: number[] = new Array(count)
  const level: number[] = new Array(count)
  for (let i = 0; i < count; i++) {
    const knot = knots[i] as Knot
    current[i] = knot.current
    level[i] = knot.voltage + leadResistance * knot.current
  }
  const bottom: number[] = []
  const top: number[] = []
  let i = 0
  while (i + 1 < count) {
    // Down the falling region, over flat pieces that fall again afterwards.
    if (i > 0) {
      let next = i
      let foot = i
      while (next + 1 < count && (level[next + 1] as number) <= (level[next] as number)) {
        next++
        if ((level[next] as number) < (level[next - 1] as number)) foot = next
      }
      i = foot
      if (i + 1 >= count) break
    }
    bottom.push(i)
    while (i + 1 < count && (level[i + 1] as number) >= (level[i] as number)) i++
    top.push(i)
  }
  return { current, level, bottom, top, firstGlowPiece: kneeIndexOf(knots) ?? 0 }
}

/** Index of the piece of a branch that holds `level`; the upper one where two share it. */
export function pieceAt(path: Branches, branch: number, level: number): number {
  const bottom = path.bottom[branch] as number
  let piece = (path.top[branch] as number) - 1
  while (piece > bottom && (path.level[piece] as number) > level) piece--
  return piece
}

/** Lamp current, A, on a piece at `level` V; a flat piece gives its lower end. */
export function currentOn(path: Branches, piece: number, level: number): number {
  const low = path.level[piece] as number
  const high = path.level[piece + 1] as number
  const left = path.current[piece] as number
  if (high === low) return left
  return left + ((level - low) / (high - low)) * ((path.current[piece + 1] as number) - left)
}
