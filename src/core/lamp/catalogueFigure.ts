/** What a figure rests on. Only the first two were written down by somebody else. */
export type Basis = 'data sheet' | 'published' | 'derived' | 'from memory' | 'guessed'

/** A value with what it rests on. */
export type Figure<Value = number> = {
  readonly value: Value
  readonly basis: Basis
  /** Who says so, or how it was come by: words to show beside it. */
  readonly source: string
}

const sheetName = 'SPC Technology data sheet for A1A/A1B/A1C/C2A/A9A'

/** A figure read in the data sheet of the five common lamps. */
export function onSheet<Value>(value: Value): Figure<Value> {
  return { value, basis: 'data sheet', source: sheetName }
}

/** A figure with no source read. */
export function remembered<Value>(value: Value): Figure<Value> {
  return { value, basis: 'from memory', source: 'from memory; no source was read' }
}

/** A figure nobody published, with what led to it. */
export function guessed<Value>(value: Value, why: string): Figure<Value> {
  return { value, basis: 'guessed', source: `guessed: ${why}` }
}

/** A figure that follows from others. */
export function derived<Value>(value: Value, how: string): Figure<Value> {
  return { value, basis: 'derived', source: how }
}

/** A figure read elsewhere than in the data sheet. */
export function published<Value>(value: Value, source: string): Figure<Value> {
  return { value, basis: 'published', source }
}
