import { type Direction, parseQuantity } from '../core'

const plainPoint = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:e[+-]?\d+)?$/i
const plainComma = /^[+-]?(?:\d+,\d*|,\d+)(?:e[+-]?\d+)?$/i

/**
 * A voltage in a cell, V: with decimal point or comma, with a unit or without (`unit` V each, then);
 * null where it is none.
 */
export function voltageIn(cell: string, unit: number): number | null {
  const text = cell.trim()
  if (plainPoint.test(text)) return finite(Number(text) * unit)
  if (plainComma.test(text)) return finite(Number(text.replace(',', '.')) * unit)
  if (text === '') return null
  const read = parseQuantity(text, 'V', { min: Number.NEGATIVE_INFINITY })
  if (!read.ok) return null
  return finite(/[a-zµμ]\s*$/i.test(text) ? read.value : read.value * unit)
}

/** Which way a cell says the supply was going; null where it says neither. */
export function directionIn(cell: string): Direction | null {
  const text = cell.trim().toLowerCase()
  if (/^(?:up(?:wards?)?|rising|increasing|[+↑])$/.test(text)) return 'up'
  return /^(?:down(?:wards?)?|falling|decreasing|[-−↓])$/.test(text) ? 'down' : null
}

/** Whether a row is a remark and no data. */
export function isComment(cells: readonly string[]): boolean {
  return /^\s*(?:#|%|\/\/)/.test(cells[0] ?? '')
}

/** Whether a row has nothing in it. */
export function isEmpty(cells: readonly string[]): boolean {
  return cells.every((cell) => cell.trim() === '')
}

function finite(value: number): number | null {
  return Number.isFinite(value) ? value : null
}
