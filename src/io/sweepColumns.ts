import { directionIn, voltageIn } from './sweepCells'

/** What a column of a sweep holds. */
export type SweepRole = 'supply' | 'lamp' | 'direction'

/** One column as found. */
export type SweepColumn = {
  /** From 0. */
  readonly index: number
  /** As in the header; `Column 1` and so on without one. */
  readonly name: string
  /** What one of its numbers is worth, V; null where the header gives a unit that is not of voltage. */
  readonly unit: number | null
  readonly role: SweepRole | null
}

/** Which columns to take instead of those guessed; null for none. */
export type ColumnChoice = {
  readonly supplyColumn?: number
  readonly lampColumn?: number
  readonly directionColumn?: number | null
  /** What one number of the column is worth, V. */
  readonly supplyUnit?: number
  readonly lampUnit?: number
}

const worth: Readonly<Record<string, number>> = { µV: 1e-6, μV: 1e-6, mV: 1e-3, V: 1, kV: 1e3 }

/** Whether the first row names the columns: no number in it, and numbers in the rows after. */
export function isHeader(first: readonly string[], rows: readonly (readonly string[])[]): boolean {
  const numeric = (row: readonly string[]) => row.some((cell) => voltageIn(cell, 1) !== null)
  return !numeric(first) && (rows.length === 0 || rows.some(numeric))
}

/** Names, units and roles of the columns; `rows` are some of the data. */
export function columnsOf(
  header: readonly string[] | null,
  rows: readonly (readonly string[])[],
  choice: ColumnChoice,
): readonly SweepColumn[] {
  const count = Math.max(header?.length ?? 0, ...rows.map((row) => row.length))
  const columns = Array.from({ length: count }, (_, index) => {
    const name = header?.[index]?.trim() || `Column ${index + 1}`
    return { index, name, unit: unitIn(name), cells: rows.map((row) => row[index] ?? '') }
  })
  const volts = columns.filter(
    ({ cells, unit }) => unit !== null && cells.some((cell) => voltageIn(cell, 1) !== null),
  )
  const counted = volts.length > 2 ? volts.filter(({ cells }) => !countsRows(cells)) : volts
  const named = (pattern: RegExp, not?: number) =>
    counted.find(({ name, index }) => index !== not && pattern.test(name))?.index
  const free = (not: number | undefined) => counted.find(({ index }) => index !== not)?.index

  const lampNamed = choice.lampColumn ?? named(/lamp|tube|glow|resistor|reading|across/i)
  const supply =
    choice.supplyColumn ??
    named(/supply|source|battery|input|applied/i, lampNamed) ??
    free(lampNamed)
  const lamp = lampNamed ?? free(supply)
  const spoken = columns.find(({ cells }) => cells.some((cell) => directionIn(cell) !== null))
  const direction =
    choice.directionColumn === undefined ? spoken?.index : (choice.directionColumn ?? undefined)

  return columns.map(({ index, name, unit }): SweepColumn => {
    if (index === supply) return { index, name, unit: choice.supplyUnit ?? unit, role: 'supply' }
    if (index === lamp) return { index, name, unit: choice.lampUnit ?? unit, role: 'lamp' }
    return { index, name, unit, role: index === direction ? 'direction' : null }
  })
}

/** What a unit in a header is worth, V: `Lamp (mV)`, `U / V`, `lamp [V]`; 1 where there is none. */
function unitIn(name: string): number | null {
  const unit = /(?:[([/]|\bin\s)\s*([a-zµμΩ]+)\s*[)\]]?\s*$/i.exec(name)?.[1]
  if (unit === undefined) return 1
  if (/^volts?$/i.test(unit)) return 1
  const found = Object.hasOwn(worth, unit) ? worth[unit] : worth[unit.replace(/v$/, 'V')]
  if (found !== undefined) return found
  return /^(?:[pnuµμmk]?a|amps?|[kmg]?(?:ohms?|Ω)|[mk]?w|m?s|hz)$/i.test(unit) ? null : 1
}

/** Whether a column is just 0, 1, 2 … or 1, 2, 3 …: the rows' numbers. */
function countsRows(cells: readonly string[]): boolean {
  const numbers = cells.map((cell) => voltageIn(cell, 1))
  const first = numbers[0]
  return (
    cells.length > 2 && (first === 0 || first === 1) && numbers.every((n, i) => n === first + i)
  )
}
