import { scaleLinear, scaleLog } from 'd3'

/** How the current axis runs. */
export type CurrentAxis = 'logarithmic' | 'linear'

/** From and to, in the unit of the axis. */
export type Domain = readonly [from: number, to: number]

/** A number on an axis: its value, its place in px, and whether it carries a label. */
export type Tick = {
  readonly value: number
  readonly at: number
  readonly labelled: boolean
  readonly minor?: boolean
}

/** Turns values into px and back. */
export type Axis = {
  readonly domain: Domain
  readonly range: Domain
  readonly place: (value: number) => number
  readonly value: (at: number) => number
  readonly ticks: readonly Tick[]
}

/** An even axis with about one labelled tick every `spacing` px. */
export function linearAxis(domain: Domain, range: Domain, spacing: number): Axis {
  const scale = scaleLinear(domain, range)
  const count = Math.max(2, Math.round(Math.abs(range[1] - range[0]) / spacing))
  return {
    domain,
    range,
    place: (value) => scale(value),
    value: (at) => scale.invert(at),
    ticks: scale.ticks(count).map((value) => ({ value, at: scale(value), labelled: true })),
  }
}

/**
 * A logarithmic axis: a label at each decade (or every few), thin lines between. Over few decades 2 and 5 are
 * labelled too, over less than one the numbers of an even axis, as far as there is room. `domain` above 0.
 */
export function logarithmicAxis(domain: Domain, range: Domain, spacing: number): Axis {
  const scale = scaleLog(domain, range)
  const decades = Math.log10(domain[1] / domain[0])
  const room = Math.abs(range[1] - range[0]) / Math.max(decades, 1e-9)
  const step = Math.max(1, Math.ceil(spacing / room))
  const candidates: (Tick & { readonly rank: number })[] = []
  if (decades < 0.7) {
    for (const value of scaleLinear(domain, range).ticks(4)) {
      candidates.push({ value, at: scale(value), labelled: false, rank: 1 })
    }
  } else {
    for (let power = Math.floor(Math.log10(domain[0])); 10 ** power <= domain[1]; power++) {
      for (let digit = 1; digit < 10; digit++) {
        // Written as a decimal literal, so that a tick is 1e-6 and not its neighbour.
        const value = Number(`${digit}e${power}`)
        if (
          value < domain[0] ||
          value > domain[1] ||
          (digit > 1 && (room < 26 || (room < 110 && digit !== 2 && digit !== 5)))
        )
          continue
        const rank = digit === 2 || digit === 5 ? 2 : digit === 1 && power % step === 0 ? 1 : 3
        candidates.push({ value, at: scale(value), minor: digit > 1, labelled: false, rank })
      }
    }
  }
  const ticks = withLabels(candidates, 0.75 * spacing)
  return { domain, range, place: (value) => scale(value), value: (at) => scale.invert(at), ticks }
}

/** Labels ticks of the first rank; those of the second where these are fewer than three; none too near another. */
function withLabels(ticks: readonly (Tick & { readonly rank: number })[], near: number): Tick[] {
  const chosen: number[] = []
  const choose = (rank: number) => {
    for (const tick of ticks) {
      if (tick.rank === rank && chosen.every((at) => Math.abs(at - tick.at) >= near)) {
        chosen.push(tick.at)
      }
    }
  }
  choose(1)
  if (chosen.length < 3) choose(2)
  return ticks.map(({ rank, ...tick }) => ({ ...tick, labelled: chosen.includes(tick.at) }))
}

/** The current axis of the plane, either way. A logarithmic one has no zero: lesser values stand at its left end. */
export function currentAxis(kind: CurrentAxis, domain: Domain, range: Domain): Axis {
  if (kind === 'linear') return linearAxis(domain, range, 90)
  const axis = logarithmicAxis(domain, range, 62)
  const least = domain[0]
  return { ...axis, place: (value) => axis.place(Math.max(value, least)) }
}

/** A domain magnified by `factor` about a fixed value, on the axis's own terms. */
export function magnify(axis: Axis, kind: CurrentAxis, about: number, factor: number): Domain {
  const at = axis.place(about)
  const [from, to] = axis.range
  const ends = [at + (from - at) / factor, at + (to - at) / factor] as const
  return orderly([axis.value(ends[0]), axis.value(ends[1])], kind)
}

/** A domain moved by `distance` px, on the axis's own terms. */
export function shift(axis: Axis, kind: CurrentAxis, distance: number): Domain {
  const [from, to] = axis.range
  return orderly([axis.value(from - distance), axis.value(to - distance)], kind)
}

/** Ends beyond which no axis is moved: past every voltage, current and time a stage can have. */
const furthest = 1e18
const leastCurrent = 1e-18
const mostCurrent = 1e4

/** Keeps a zoom within what numbers and eyes can tell apart. */
function orderly([from, to]: Domain, kind: CurrentAxis): Domain {
  if (kind === 'logarithmic') {
    const low = Math.min(Math.max(from, leastCurrent), mostCurrent / 10)
    return [low, Math.min(Math.max(to, low * 1.05), mostCurrent)]
  }
  const low = Math.min(Math.max(from, -furthest), furthest)
  const high = Math.min(Math.max(to, -furthest), furthest)
  const least = Math.max(1e-15, Math.max(Math.abs(low), Math.abs(high)) * 1e-9)
  return high - low > least ? [low, high] : [low, low + least]
}
