/** Knots of a characteristic as levels and voltages; the first is the origin, 0 and 0. */
export type Shape = {
  /** V + shear · I of each knot, V, rising. */
  readonly levels: readonly number[]
  /** V. */
  readonly voltages: readonly number[]
  readonly knee: number
  readonly valley: number
}

/**
 * A shape with its voltages moved as little as its course asks, knot after knot: never falling up to
 * the knee and from the valley on, never rising between, and the level rising by `leastRise` more
 * than the voltage. Null where the levels themselves are out of order.
 */
export function keepCourse(shape: Shape, leastRise: number): Shape | null {
  const { levels, knee, valley } = shape
  const voltages: number[] = [0]
  for (let i = 1; i < levels.length; i++) {
    const before = voltages[i - 1] as number
    const room = (levels[i] as number) - (levels[i - 1] as number) - leastRise
    if (!(room > 0)) return null
    const falls = i > knee && i <= valley
    const low = falls ? 0 : before
    const high = falls ? before : before + room
    voltages.push(Math.min(high, Math.max(low, shape.voltages[i] as number)))
  }
  return { ...shape, voltages }
}

/** A shape that rises, falls and rises, with its knee and valley found, whatever is flat between. */
export function withTurns(levels: readonly number[], voltages: readonly number[]): Shape {
  const falls = voltages.map((v, i) => i > 0 && v < (voltages[i - 1] as number))
  const knee = Math.max(0, falls.indexOf(true) - 1)
  return { levels, voltages, knee, valley: Math.max(knee, falls.lastIndexOf(true)) }
}
