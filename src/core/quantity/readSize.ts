import { readDuration } from './duration'
import { capital, forExample, quote } from './parseWords'
import { noteOnPrefix, refusePrefix } from './prefixAdvice'
import { readNumber } from './readNumber'
import { readUnit } from './readUnit'
import { oneMeasure, type Unit, units } from './units'

/** A value in the SI unit (percent for '%'), or a sentence that says what to type. */
export type ParsedQuantity =
  | { readonly ok: true; readonly value: number; readonly note?: string }
  | { readonly ok: false; readonly message: string }

const codedInside = /^(\d+)([a-zµΩ]|meg)(\d+) ?(\D*)$/i
const codedInFront = /^([pnuµmkgr])(\d+) ?(\D*)$/i
const plain = /^(\d[\d ,.']*(?:e[+-]?\d+)?|[.,]\d+(?:e[+-]?\d+)?)(?![\d.,])(.*)$/i

/** Reads a number without sign, with its prefix and unit, for the wanted unit. */
export function readSize(typed: string, unit: Unit): ParsedQuantity {
  const duration = unit === 's' ? readDuration(typed) : null
  if (duration !== null) return { ok: true, value: duration }

  const exponential = /^\d+e\d+/i.test(typed)
  const inside = exponential ? null : codedInside.exec(typed)
  if (inside) {
    const [, whole = '', letter = '', fraction = '', tail = ''] = inside
    return scale(typed, `${whole}.${fraction}`, joinCode(letter, tail), unit)
  }
  const inFront = codedInFront.exec(typed)
  if (inFront) {
    const [, letter = '', fraction = '', tail = ''] = inFront
    return scale(typed, `0.${fraction}`, joinCode(letter, tail), unit)
  }
  const [, number, tail = ''] = plain.exec(typed) ?? []
  return number === undefined ? notUnderstood(typed, unit) : scale(typed, number, tail, unit)
}

/** In `4R7 Ω` the R is already the ohm. */
function joinCode(letter: string, tail: string): string {
  return /^r$/i.test(letter) && /^(?:Ω|ohms?)$/i.test(tail) ? letter : letter + tail
}

function scale(typed: string, number: string, tail: string, wanted: Unit): ParsedQuantity {
  const read = readNumber(number)
  if (!read.ok)
    return refuse(`${read.message} Leave out marks for thousands; ${forExample(wanted)}`)
  const found = readUnit(tail, wanted)
  if (!found) return notUnderstood(typed, wanted)
  if (found.unit !== null && found.unit !== wanted) {
    return otherWanted(typed, oneMeasure(found.unit), wanted)
  }
  if (found.exponent !== 0 && !units[wanted].typed.includes(found.exponent)) {
    return refuse(refusePrefix(found.exponent, wanted))
  }
  const value = Number(`${read.mantissa}e${read.exponent + found.exponent}`)
  if (!Number.isFinite(value)) return refuse(`That number is too large; ${forExample(wanted)}`)
  if (value === 0 && /[1-9]/.test(read.mantissa))
    return refuse(`That number is too small; ${forExample(wanted)}`)
  const note = noteOnPrefix(value, found.exponent, wanted, found.unit === null) ?? read.note
  return note === undefined ? { ok: true, value } : { ok: true, value, note }
}

function notUnderstood(typed: string, unit: Unit): ParsedQuantity {
  if (unit !== 's' && readDuration(typed) !== null) {
    return otherWanted(typed, 'a time', unit)
  }
  return refuse(`${quote(typed)} is not understood as ${oneMeasure(unit)}; ${forExample(unit)}`)
}

function otherWanted(typed: string, came: string, wanted: Unit): ParsedQuantity {
  const unit = wanted === '' ? '' : ` in ${wanted}`
  return refuse(`${capital(oneMeasure(wanted))}${unit} is wanted here; ${quote(typed)} is ${came}.`)
}

function refuse(message: string): ParsedQuantity {
  return { ok: false, message }
}
