/** A quadratic `square·v² − 2·linear·v + constant` that holds for v from `low` to `high`. */
export type Quadratic = {
  readonly square: number
  readonly linear: number
  readonly constant: number
  readonly low: number
  readonly high: number
}

/** Value of a quadratic, wherever it holds. */
export function quadraticAt(q: Quadratic, v: number): number {
  return (q.square * v - 2 * q.linear) * v + q.constant
}

/** The part of one quadratic that is least, from `low` to `high`. */
export type EnvelopePart<Q extends Quadratic> = {
  readonly item: Q
  readonly low: number
  readonly high: number
}

/**
 * The least of some quadratics, as parts in rising order: exact, so that whatever is least nowhere
 * can be forgotten. Parts neither overlap nor, on the range the quadratics cover, leave gaps.
 */
export class LowerEnvelope<Q extends Quadratic> {
  parts: readonly EnvelopePart<Q>[] = []

  /** Takes in one more quadratic. */
  add(item: Q): void {
    if (!(item.low < item.high) || !this.improvedBy(item)) return
    const next: EnvelopePart<Q>[] = []
    // Where the new one has been placed up to.
    let from = item.low
    for (const part of this.parts) {
      if (part.high < from || part.low > item.high) {
        if (part.low > item.high && from < item.high) {
          put(next, item, from, Math.min(item.high, part.low))
          from = item.high
        }
        put(next, part.item, part.low, part.high)
        continue
      }
      if (part.low > from) put(next, item, from, part.low)
      else put(next, part.item, part.low, from)
      const low = Math.max(part.low, from)
      const high = Math.min(part.high, item.high)
      lesser(next, part.item, item, low, high)
      put(next, part.item, high, part.high)
      from = high
    }
    put(next, item, from, item.high)
    this.parts = next
  }

  /** Whether a quadratic is anywhere less than all so far, or holds where none does. */
  private improvedBy(item: Q): boolean {
    let covered = item.low
    for (const part of this.parts) {
      if (part.high <= item.low) continue
      if (part.low >= item.high) break
      if (part.low > covered) return true
      covered = part.high
      if (
        lessSomewhere(item, part.item, Math.max(part.low, item.low), Math.min(part.high, item.high))
      ) {
        return true
      }
    }
    return covered < item.high
  }
}

/** Whether `p` is less than `q` anywhere from `low` to `high`. */
function lessSomewhere(p: Quadratic, q: Quadratic, low: number, high: number): boolean {
  const a = p.square - q.square
  const b = p.linear - q.linear
  const c = p.constant - q.constant
  if ((a * low - 2 * b) * low + c < 0 || (a * high - 2 * b) * high + c < 0) return true
  const bottom = b / a
  return a > 0 && bottom > low && bottom < high && c - b * bottom < 0
}

/** Appends the lesser of two quadratics from `low` to `high`. */
function lesser<Q extends Quadratic>(
  parts: EnvelopePart<Q>[],
  old: Q,
  fresh: Q,
  low: number,
  high: number,
): void {
  const cuts = [low, ...crossings(old, fresh, low, high), high]
  for (let i = 1; i < cuts.length; i++) {
    const from = cuts[i - 1] as number
    const to = cuts[i] as number
    const middle = (from + to) / 2
    put(parts, quadraticAt(fresh, middle) < quadraticAt(old, middle) ? fresh : old, from, to)
  }
}

/** Where two quadratics cross strictly between `low` and `high`, in rising order. */
function crossings(p: Quadratic, q: Quadratic, low: number, high: number): readonly number[] {
  const a = p.square - q.square
  const b = p.linear - q.linear
  const c = p.constant - q.constant
  // a·v² − 2·b·v + c = 0, by the form that loses no figures.
  const under = b * b - a * c
  if (under < 0) return []
  const sum = b + (b < 0 ? -1 : 1) * Math.sqrt(under)
  const roots = [sum / a, c / sum].filter((root) => root > low && root < high)
  return roots.sort((one, other) => one - other)
}

/** Appends a part, as a longer one where it goes on with the last; nothing where it has no width. */
function put<Q extends Quadratic>(
  parts: EnvelopePart<Q>[],
  item: Q,
  low: number,
  high: number,
): void {
  if (!(high > low)) return
  const last = parts[parts.length - 1]
  if (last && last.item === item && last.high === low) {
    parts[parts.length - 1] = { item, low: last.low, high }
  } else parts.push({ item, low, high })
}
