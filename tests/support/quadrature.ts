/**
 * Integral of a smooth function from `from` to `to` by Simpson's rule, halving every interval until it agrees
 * with its two halves (Richardson's estimate, a fifteenth of the difference).
 *
 * @param tolerance how far off the whole may be, in the unit of the integral.
 */
export function integrate(
  f: (x: number) => number,
  from: number,
  to: number,
  tolerance: number,
): number {
  const simpson = (a: number, fa: number, fm: number, b: number, fb: number) =>
    ((b - a) / 6) * (fa + 4 * fm + fb)
  const refine = (
    a: number,
    fa: number,
    m: number,
    fm: number,
    b: number,
    fb: number,
    whole: number,
    allowed: number,
    depth: number,
  ): number => {
    const left = (a + m) / 2
    const right = (m + b) / 2
    const fl = f(left)
    const fr = f(right)
    const low = simpson(a, fa, fl, m, fm)
    const high = simpson(m, fm, fr, b, fb)
    const off = low + high - whole
    if (depth === 0 || Math.abs(off) <= 15 * allowed) return low + high + off / 15
    return (
      refine(a, fa, left, fl, m, fm, low, allowed / 2, depth - 1) +
      refine(m, fm, right, fr, b, fb, high, allowed / 2, depth - 1)
    )
  }
  const middle = (from + to) / 2
  const ends = [f(from), f(middle), f(to)] as const
  const first = simpson(from, ends[0], ends[1], to, ends[2])
  return refine(from, ends[0], middle, ends[1], to, ends[2], first, tolerance, 40)
}
