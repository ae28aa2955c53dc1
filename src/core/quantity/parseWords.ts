import { type Unit, units } from './units'

/** "type for example 4.7 MΩ.": ends a sentence that refuses what was typed. */
export function forExample(unit: Unit): string {
  return `type for example ${units[unit].example}.`
}

/** Quotes typed text without letting it fill the page. */
export function quote(text: string): string {
  return `“${text.length > 24 ? `${text.slice(0, 24)}…` : text}”`
}

/** The same text with a capital first letter. */
export function capital(text: string): string {
  return text.charAt(0).toUpperCase() + text.slice(1)
}
