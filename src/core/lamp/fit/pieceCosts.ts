/**
 * The weighted squares of a piece's points as a quadratic in the voltages u and v at its ends:
 * `uu·u² + 2·uv·u·v + vv·v² − 2·u1·u − 2·v1·v + rest`.
 */
export type PieceCost = {
  readonly uu: number
  readonly uv: number
  readonly vv: number
  readonly u1: number
  readonly v1: number
  readonly rest: number
}

/** Points in rising order of `level`, V, with their voltages, V, and weights, 1/V². */
export type WeightedPoints = {
  readonly level: ArrayLike<number>
  readonly voltage: ArrayLike<number>
  readonly weight: ArrayLike<number>
}

/**
 * Costs of every piece between two of the places: `[left][right]`, for left < right. A piece holds
 * the points above its left place up to and with its right one; those at or below the first place
 * belong to the pieces that start there. Places rise; the last one is at or above all the points.
 */
export function pieceCosts(
  points: WeightedPoints,
  places: readonly number[],
): readonly (readonly (PieceCost | null)[])[] {
  const { level, voltage, weight } = points
  return places.map((left, a) => {
    const row: (PieceCost | null)[] = new Array(places.length).fill(null)
    let point = 0
    if (a > 0) while (point < level.length && (level[point] as number) <= left) point++
    let w0 = 0
    let w1 = 0
    let w2 = 0
    let y0 = 0
    let y1 = 0
    let yy = 0
    for (let b = a + 1; b < places.length; b++) {
      const right = places[b] as number
      for (; point < level.length && (level[point] as number) <= right; point++) {
        const w = weight[point] as number
        const x = (level[point] as number) - left
        const y = voltage[point] as number
        w0 += w
        w1 += w * x
        w2 += w * x * x
        y0 += w * y
        y1 += w * x * y
        yy += w * y * y
      }
      const d = right - left
      const vv = w2 / (d * d)
      const v1 = y1 / d
      row[b] = { uu: w0 - (2 * w1) / d + vv, uv: w1 / d - vv, vv, u1: y0 - v1, v1, rest: yy }
    }
    return row
  })
}
