import { formatQuantity } from './formatQuantity'
import { capital, forExample } from './parseWords'
import { type ParsedQuantity, readSize } from './readSize'
import { readUnit } from './readUnit'
import { oneMeasure, type Unit, units } from './units'

/** What a field accepts. */
export type ParseOptions = {
  /** Least value accepted, in the unit; 0 if absent. */
  readonly min?: number
  /** Greatest value accepted, in the unit; no bound if absent. */
  readonly max?: number
  /** The value of "none" and of an empty field, where the part can be left out. */
  readonly none?: number
}

const longest = 60

/**
 * Reads what people type for a part or a reading: `4M7`, `4.7 MΩ`, `0,47u`, `470n`, `R47`,
 * `1.5 Meg`, `1 000 000`, `90 V`, `3 min 20 s`. `m` is milli and `M` is mega. Letters in the
 * decimal mark's place follow IEC 60062. Digits are scaled in decimal: `470n` is 4.7e-7 exactly.
 */
export function parseQuantity(
  text: string,
  unit: Unit,
  options: ParseOptions = {},
): ParsedQuantity {
  const typed = tidy(text.slice(0, 4 * longest))
  if (typed.length > longest || text.length > 4 * longest) {
    return refuse(`That is too long for ${oneMeasure(unit)}; ${forExample(unit)}`)
  }
  if (isNone(typed, unit, options.none)) return { ok: true, value: options.none }
  if (/^[+-]?$/.test(typed)) {
    return refuse(`Type ${oneMeasure(unit)}, for example ${units[unit].example}.`)
  }
  if (/^[+-]? ?∞|^[+-]? ?inf(?:inite|inity)?\b/i.test(typed)) {
    return refuse(`A finite ${units[unit].measures} is wanted here; ${forExample(unit)}`)
  }
  if (/^[+-]?0x[\da-f]/i.test(typed)) {
    return refuse(`Only decimal numbers are understood; ${forExample(unit)}`)
  }
  const below = typed.startsWith('-')
  const read = readSize(typed.replace(/^[+-]\s*/, ''), unit)
  if (!read.ok) return read
  // Zero has no sign here.
  const value = below && read.value !== 0 ? -read.value : read.value
  return checkRange({ ...read, value }, unit, options)
}

/** One kind of space, of micro, of ohm, of minus and of apostrophe; nothing invisible. */
function tidy(text: string): string {
  return text
    .replace(/[\u200B-\u200D\u2060\u00AD]/g, '')
    .replace(/\s+/g, ' ')
    .replace(/\u03BC/g, 'µ')
    .replace(/\u2126/g, 'Ω')
    .replace(/[\u2212\u2013]/g, '-')
    .replace(/\u2019/g, "'")
    .trim()
}

/** Whether nothing is meant; "∞" says so only where none means infinite. */
function isNone(typed: string, unit: Unit, none: number | undefined): none is number {
  if (none === undefined) return false
  if (typed === '' || /^none$/i.test(typed)) return true
  const [infinite, tail = ''] = /^(?:∞|inf(?:inite|inity)?(?![a-z])) ?(.*)$/i.exec(typed) ?? []
  if (infinite === undefined || none !== Number.POSITIVE_INFINITY) return false
  return tail === '' || readUnit(tail, unit)?.unit === unit
}

function checkRange(
  read: ParsedQuantity & { readonly ok: true },
  unit: Unit,
  { min = 0, max = Number.POSITIVE_INFINITY }: ParseOptions,
): ParsedQuantity {
  const { value } = read
  if (value >= min && value <= max) return read
  const { measures } = units[unit]
  if (value < 0 && min >= 0) {
    return refuse(
      `${capital(oneMeasure(unit))} below zero has no meaning here: leave out the minus sign.`,
    )
  }
  const write = (bound: number) => formatQuantity(bound, unit, { figures: 'all' })
  const note = read.note === undefined ? '' : ` ${read.note}`
  const found = `; this is ${write(value)}.${note}`
  if (max === Number.POSITIVE_INFINITY) {
    return refuse(`The ${measures} must be at least ${write(min)}${found}`)
  }
  if (min === Number.NEGATIVE_INFINITY) {
    return refuse(`The ${measures} must be at most ${write(max)}${found}`)
  }
  return refuse(`The ${measures} must be from ${write(min)} to ${write(max)}${found}`)
}

function refuse(message: string): ParsedQuantity {
  return { ok: false, message }
}
