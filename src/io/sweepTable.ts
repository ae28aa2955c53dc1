import type { SweepReading } from '../core'
import { directionIn, isComment, isEmpty, voltageIn } from './sweepCells'
import { type ColumnChoice, columnsOf, isHeader, type SweepColumn } from './sweepColumns'
import { type Delimiter, guessDelimiter } from './sweepDelimiter'
import { giveWay, splitRows } from './sweepRows'
import { setupInRemarks, type WrittenSetup } from './sweepSetupRemarks'

/** How to read a table, where the guess is not wanted. */
export type SweepTableOptions = ColumnChoice & {
  readonly delimiter?: Delimiter
  /** Whether the first row names the columns. */
  readonly header?: boolean
}

/** Something in a row that could not be read. */
export type SweepRowError = {
  /** From 1, as a text editor counts. */
  readonly row: number
  /** What stands there. */
  readonly text: string
  readonly message: string
  /** Whether the row was used all the same. */
  readonly kept: boolean
}

/** One row of the preview: what stands there and how it was understood. */
export type SweepPreviewRow = {
  readonly row: number
  readonly cells: readonly string[]
  readonly reading: SweepReading | null
}

/** A table as understood. Each of its rows is a reading, an error, a remark, the header or empty. */
export type SweepTable =
  | {
      readonly ok: true
      readonly delimiter: Delimiter
      readonly header: boolean
      readonly columns: readonly SweepColumn[]
      /** The first rows. */
      readonly preview: readonly SweepPreviewRow[]
      readonly readings: readonly SweepReading[]
      readonly errors: readonly SweepRowError[]
      readonly remarks: readonly { readonly row: number; readonly text: string }[]
      /** What the remarks say of how the sweep was taken; null where nothing. */
      readonly setup: WrittenSetup | null
    }
  | { readonly ok: false; readonly message: string }

const longest = 20_000_000
const previewed = 12
const sampled = 200
const slice = 10_000

/**
 * Reads the table of a sweep, pasted or from a file: columns between tabs, semicolons, commas or
 * spaces; decimal point or comma; with a header or without; lines from `#`, `%` or `//` are remarks.
 * Supply and lamp columns are guessed from the header, else they are the first two of numbers, and
 * can be chosen by the options.
 */
export async function readSweep(
  text: string,
  options: SweepTableOptions = {},
): Promise<SweepTable> {
  if (text.length > longest) return refuse('That is too long for a sweep: 20 MB at most.')
  const whole = text.replace(/^\uFEFF/, '')
  const delimiter = options.delimiter ?? guessDelimiter(whole)
  const rows: (readonly string[])[] = []
  for await (const some of splitRows(whole, delimiter)) for (const row of some) rows.push(row)

  const isData = (cells: readonly string[]) => !isEmpty(cells) && !isComment(cells)
  const first = rows.findIndex(isData)
  if (first < 0) return refuse('There is nothing in this table.')
  const after = rows.slice(first + 1, first + 1 + sampled).filter(isData)
  const top = rows[first] as readonly string[]
  const header = options.header ?? isHeader(top, after)
  const sample = header ? after : [top, ...after]
  const columns = columnsOf(header ? top : null, sample, options)
  const supply = columns.find(({ role }) => role === 'supply')
  const lamp = columns.find(({ role }) => role === 'lamp')
  if (!supply || !lamp)
    return refuse('Two columns of numbers are wanted: supply volts and lamp volts.')
  if (splitDecimals(delimiter, sample)) {
    return refuse(
      'The commas here both separate columns and mark decimals: separate the columns by semicolons or tabs, or write decimal points.',
    )
  }
  const direction = columns.find(({ role }) => role === 'direction')
  const readings: SweepReading[] = []
  const errors: SweepRowError[] = []
  const remarks: { row: number; text: string }[] = []
  const preview: SweepPreviewRow[] = []
  for (const [index, cells] of rows.entries()) {
    if (index % slice === slice - 1) await giveWay()
    if (isEmpty(cells) || (header && index === first)) continue
    const row = index + 1
    if (isComment(cells)) {
      remarks.push({ row, text: cells.join(delimiter).trim() })
      continue
    }
    const found = readRow(row, cells, supply, lamp, direction)
    errors.push(...found.errors)
    if (found.reading) readings.push(found.reading)
    if (preview.length < previewed) preview.push({ row, cells, reading: found.reading })
  }
  const setup = setupInRemarks(remarks.map((remark) => remark.text))
  return { ok: true, delimiter, header, columns, preview, readings, errors, remarks, setup }
}

function readRow(
  row: number,
  cells: readonly string[],
  supply: SweepColumn,
  lamp: SweepColumn,
  direction: SweepColumn | undefined,
): { reading: SweepReading | null; errors: readonly SweepRowError[] } {
  const errors: SweepRowError[] = []
  const volts = ({ index, name, unit }: SweepColumn) => {
    const text = (cells[index] ?? '').trim()
    const value = voltageIn(text, unit ?? 1)
    if (value !== null) return value
    const message =
      text === '' ? `There is nothing in “${name}”.` : `“${text}” in “${name}” is no voltage.`
    errors.push({ row, text, message, kept: false })
    return null
  }
  const e = volts(supply)
  const v = volts(lamp)
  if (e === null || v === null) return { reading: null, errors }
  const said = direction ? (cells[direction.index] ?? '').trim() : ''
  const way = directionIn(said)
  if (said !== '' && way === null) {
    const message = `“${said}” in “${direction?.name}” is neither up nor down; the supply’s own course was taken.`
    errors.push({ row, text: said, message, kept: true })
  }
  const reading = { supply: e, lamp: v, row }
  return { reading: way ? { ...reading, direction: way } : reading, errors }
}

/** Whether commas between columns have also cut decimal numbers in two: four columns of whole numbers. */
function splitDecimals(delimiter: Delimiter, rows: readonly (readonly string[])[]): boolean {
  const whole = (cell: string) => /^\s*\d+\s*$/.test(cell)
  return delimiter === ',' && rows.every((row) => row.length === 4 && row.every(whole))
}

function refuse(message: string): SweepTable {
  return { ok: false, message }
}
