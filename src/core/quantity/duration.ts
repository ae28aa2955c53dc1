import { figuresOf, placePoint } from './decimal'

const minute = 60
const hour = 60 * minute
const day = 24 * hour
/** The Julian year of 365.25 days, as astronomers count. */
const year = 365.25 * day

/** A part of a duration: how many of which. */
export type DurationPart = {
  readonly count: string
  readonly of: 's' | 'min' | 'h' | 'day' | 'year'
}

/**
 * A time above two minutes in the units people plan with: minutes and seconds to two hours, hours
 * and minutes to two days, days (with hours below ten days) to two years, then years to three
 * figures. Null up to 120 s, where seconds with a prefix serve better. Domain: s, finite, positive.
 */
export function splitDuration(seconds: number): readonly DurationPart[] | null {
  if (!(seconds > 2 * minute)) return null
  const wholeSeconds = Math.round(seconds)
  if (wholeSeconds < 2 * hour) {
    return parts([Math.floor(wholeSeconds / minute), 'min'], [wholeSeconds % minute, 's'])
  }
  const wholeMinutes = Math.round(seconds / minute)
  if (wholeMinutes < 48 * 60)
    return parts([Math.floor(wholeMinutes / 60), 'h'], [wholeMinutes % 60, 'min'])
  const wholeHours = Math.round(seconds / hour)
  if (wholeHours < 240) return parts([Math.floor(wholeHours / 24), 'day'], [wholeHours % 24, 'h'])
  const wholeDays = Math.round(seconds / day)
  if (wholeDays < 730) return parts([wholeDays, 'day'])
  return [{ count: placePoint(figuresOf(seconds / year, 3), false), of: 'year' }]
}

function parts(...counted: readonly (readonly [number, DurationPart['of']])[]): DurationPart[] {
  return counted.filter(([count]) => count > 0).map(([count, of]) => ({ count: String(count), of }))
}

const durationPart =
  /(\d+(?:[.,]\d+)?)\s*(years?|yrs?|y|days?|d|hours?|hrs?|h|minutes?|mins?|min|seconds?|secs?|s)(?![a-z])\s*/giy

/**
 * Reads "3 min 20 s", "2 h" or "1.5 days" as seconds; null where the text is not of that kind
 * (plain seconds included: they are read with their prefixes elsewhere).
 */
export function readDuration(text: string): number | null {
  let seconds = 0
  let seen = 0
  let smallest = Number.POSITIVE_INFINITY
  durationPart.lastIndex = 0
  for (let at = 0; at < text.length; at = durationPart.lastIndex) {
    const found = durationPart.exec(text)
    if (!found) return null
    const [, count = '', word = ''] = found
    const size = sizeOf(word.toLowerCase())
    // "20 s 3 min" or "3 min 4 min" is a slip, not a duration.
    if (size >= smallest) return null
    smallest = size
    seconds += Number(count.replace(',', '.')) * size
    seen += 1
  }
  return seen === 0 || (seen === 1 && smallest === 1) ? null : seconds
}

function sizeOf(word: string): number {
  if (word.startsWith('y')) return year
  if (word.startsWith('d')) return day
  if (word.startsWith('h')) return hour
  return word.startsWith('m') ? minute : 1
}
