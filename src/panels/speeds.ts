/** Speeds to choose from: seconds of the stage for each second on screen. */
export const speeds = [100, 10, 1, 0.1, 0.01, 1e-3, 1e-4, 1e-5, 1e-6] as const

/**
 * The slowest period that is still pleasant to watch, and the fastest, in screen seconds: at that the lamp on the
 * page still flashes (`lampLight`).
 */
const slowest = 12
const fastest = 0.37

/** The speed that shows a cycle at a pace an eye can follow: real where that will do. */
export function speedFor(period: number): number {
  if (period >= fastest && period <= slowest) return 1
  const suited = speeds.filter((speed) => period / speed >= fastest)
  // Slow stages are sped up as little as needed, fast ones slowed as little as needed.
  if (period > slowest) {
    return [...suited].reverse().find((speed) => period / speed <= slowest) ?? speeds[0]
  }
  return suited[0] ?? speeds[speeds.length - 1] ?? 1
}

/** A speed in words. */
export function speedWords(speed: number): string {
  if (speed === 1) return 'real speed'
  return speed > 1 ? `${speed} × real` : `1/${Math.round(1 / speed)} of real`
}

/** The corner next to a time, s: ends of the phases, going up or down; the outermost at the ends. */
export function cornerBeside(
  phases: readonly { readonly duration: number }[],
  time: number,
  way: 1 | -1,
): number {
  const corners = [0]
  for (const { duration } of phases) corners.push((corners.at(-1) ?? 0) + duration)
  const near = 1e-9 * (corners.at(-1) ?? 0)
  if (way > 0) return corners.find((corner) => corner > time + near) ?? 0
  return corners.findLast((corner) => corner < time - near) ?? corners.at(-1) ?? 0
}
