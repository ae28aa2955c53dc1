import { type DurationPart, splitDuration } from './duration'
import { scaleQuantity } from './formatQuantity'
import { prefixOf, type Unit, units } from './units'

/**
 * A value as a screen reader should say it: "4.7 megohms", "470 nanofarads", "minus 5 volts",
 * "3 minutes 20 seconds". NaN is "no value".
 * @param value in the SI unit (percent for '%'), any number
 */
export function spokenQuantity(value: number, unit: Unit, figures: number | 'all' = 3): string {
  if (Number.isNaN(value)) return 'no value'
  const sign = value < 0 ? 'minus ' : ''
  if (!Number.isFinite(value)) return `${sign}infinite`
  const duration = unit === 's' && figures !== 'all' ? splitDuration(Math.abs(value)) : null
  if (duration) return sign + duration.map(speakPart).join(' ')

  const { number, exponent } = scaleQuantity(Math.abs(value), unit, figures, false)
  const said = number.replace(/e(\u2212?)(\d+)$/, (_, minus, power) => {
    return ` times ten to the ${minus === '' ? '' : 'minus '}${power}`
  })
  const [one, many] = units[unit].spoken
  return `${sign}${said} ${joinPrefix(prefixOf(exponent).word, number === '1' ? one : many)}`.trim()
}

/** "kilohm" and "megohm" drop the prefix's last vowel; the other prefixes keep it. */
function joinPrefix(prefix: string, unit: string): string {
  const drops = unit.startsWith('ohm') && (prefix === 'kilo' || prefix === 'mega')
  return (drops ? prefix.slice(0, -1) : prefix) + unit
}

const partNames: Readonly<Record<DurationPart['of'], string>> = {
  s: 'second',
  min: 'minute',
  h: 'hour',
  day: 'day',
  year: 'year',
}

function speakPart({ count, of }: DurationPart): string {
  return `${count} ${partNames[of]}${count === '1' ? '' : 's'}`
}
