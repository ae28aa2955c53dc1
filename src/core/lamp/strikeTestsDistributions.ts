import { bisect } from '../stage/recovery'

// Lanczos' approximation with g = 7 and nine terms [coefficients as commonly printed, from memory];
// its error is below 1e-14 for the arguments used here, which the tests hold against known values.
const lanczos = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313,
  -176.61502916214059, 12.507343278686905, -0.13857109526572012, 9.9843695780195716e-6,
  1.5056327351493116e-7,
]

/** Natural logarithm of the gamma function, for x ≥ ½. */
export function logGamma(x: number): number {
  let sum = lanczos[0] as number
  for (let i = 1; i < lanczos.length; i++) sum += (lanczos[i] as number) / (x - 1 + i)
  const t = x + 6.5
  return 0.5 * Math.log(2 * Math.PI) + (x - 0.5) * Math.log(t) - t + Math.log(sum)
}

/**
 * Chance that a chi-square variable with `freedom` degrees is at most `x`: the incomplete gamma function by
 * its series [Abramowitz & Stegun, 6.5.29 and 26.4.19].
 */
export function chiSquareBelow(x: number, freedom: number): number {
  if (!(x > 0)) return 0
  const a = freedom / 2
  const y = x / 2
  // Far out the series is long and nothing is left of the tail.
  if (y > a + 40 + 12 * Math.sqrt(a + 40)) return 1
  let term = 1 / a
  let sum = term
  for (let n = 1; term > sum * 1e-17 && n < 100_000; n++) {
    term *= y / (a + n)
    sum += term
  }
  return Math.min(1, sum * Math.exp(a * Math.log(y) - y - logGamma(a)))
}

/** Continued fraction of the incomplete beta function, by Lentz' method [Abramowitz & Stegun, 26.5.8]. */
function betaFraction(x: number, a: number, b: number): number {
  const tiny = 1e-300
  let c = 1
  let d = 1 - ((a + b) * x) / (a + 1)
  d = 1 / (Math.abs(d) < tiny ? tiny : d)
  let value = d
  for (let m = 1; m < 10_000; m++) {
    const even = (m * (b - m) * x) / ((a + 2 * m - 1) * (a + 2 * m))
    const odd = (-(a + m) * (a + b + m) * x) / ((a + 2 * m) * (a + 2 * m + 1))
    let change = 1
    for (const part of [even, odd]) {
      d = 1 + part * d
      d = 1 / (Math.abs(d) < tiny ? tiny : d)
      c = 1 + part / c
      if (Math.abs(c) < tiny) c = tiny
      change = d * c
      value *= change
    }
    if (Math.abs(change - 1) < 1e-16) break
  }
  return value
}

/** Regularised incomplete beta function, 0 ≤ x ≤ 1, a and b ≥ ½. */
function betaBelow(x: number, a: number, b: number): number {
  if (x <= 0) return 0
  if (x >= 1) return 1
  if (x > (a + 1) / (a + b + 2)) return 1 - betaBelow(1 - x, b, a)
  const front = logGamma(a + b) - logGamma(a) - logGamma(b) + a * Math.log(x) + b * Math.log1p(-x)
  return (Math.exp(front) * betaFraction(x, a, b)) / a
}

/**
 * Chance that Student's t with `freedom` degrees (not necessarily whole) is further from zero than ±t
 * [Abramowitz & Stegun, 26.7.1 with 26.5.27].
 */
export function studentBeyond(t: number, freedom: number): number {
  return betaBelow(freedom / (freedom + t * t), freedom / 2, 0.5)
}

/** Value that Student's t exceeds, either way, with the chance `beyond`, 0 … 1. */
export function studentLimit(beyond: number, freedom: number): number {
  let high = 1
  while (studentBeyond(high, freedom) > beyond) high *= 2
  return bisect(0, high, (t) => studentBeyond(t, freedom) > beyond)
}

/** Value that a chi-square variable stays below with the chance `below`, 0 … 1. */
export function chiSquareLimit(below: number, freedom: number): number {
  let high = freedom
  while (chiSquareBelow(high, freedom) < below) high *= 2
  return bisect(0, high, (x) => chiSquareBelow(x, freedom) < below)
}
