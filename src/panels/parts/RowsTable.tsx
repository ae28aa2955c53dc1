import { parseQuantity, type Unit } from '../../core'
import type { TypedTable } from '../../state/readingsStore'

/** A column of readings: numbers with a unit, or one of a few words. */
export type Column =
  | { readonly name: string; readonly unit: Unit; readonly optional?: boolean }
  | { readonly name: string; readonly words: readonly string[] }

/** What a typed table says: each row's numbers (null = empty), or what cannot be read. */
export type ReadTable = {
  readonly rows: readonly {
    readonly row: number
    readonly numbers: readonly (number | null)[]
    readonly words: readonly string[]
  }[]
  readonly faults: readonly string[]
}

/** Reads a typed table. Empty rows are passed over; a row with a fault is named with what was there. */
export function readTable(table: TypedTable, columns: readonly Column[]): ReadTable {
  const rows: ReadTable['rows'][number][] = []
  const faults: string[] = []
  table.forEach((cells, index) => {
    const typed = columns.some((column, k) => 'unit' in column && (cells[k] ?? '').trim() !== '')
    if (!typed) return
    const numbers: (number | null)[] = []
    const words: string[] = []
    let whole = true
    columns.forEach((column, k) => {
      const cell = (cells[k] ?? '').trim()
      if ('words' in column) {
        words.push(cell)
        return
      }
      if (cell === '' && column.optional) {
        numbers.push(null)
        return
      }
      const read = parseQuantity(cell, column.unit)
      if (read.ok) {
        numbers.push(read.value)
        return
      }
      whole = false
      faults.push(`Row ${index + 1}, ${column.name.toLowerCase()}: ${read.message}`)
    })
    if (whole) rows.push({ row: index + 1, numbers, words })
  })
  return { rows, faults }
}

/** Rows of readings to type; Enter in the last row begins another. */
export function RowsTable(props: {
  label: string
  columns: readonly Column[]
  table: TypedTable
  onChange: (table: TypedTable) => void
}) {
  const { label, columns, table, onChange } = props
  const set = (row: number, column: number, text: string) =>
    onChange(table.map((cells, r) => (r === row ? cells.with(column, text) : cells)))
  const blank = columns.map((column) => ('words' in column ? (column.words[0] ?? '') : ''))
  const addRow = () =>
    onChange([
      ...table,
      table.at(-1)?.map((cell, k) => ('words' in (columns[k] ?? {}) ? cell : '')) ?? blank,
    ])
  return (
    <div className="rows-table">
      <table aria-label={label}>
        <thead>
          <tr>
            <th scope="col">
              <span className="unseen">Row</span>
            </th>
            {columns.map(({ name }) => (
              <th key={name} scope="col">
                {name}
              </th>
            ))}
            <th scope="col">
              <span className="unseen">Remove</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {table.map((cells, row) => {
            const place = `row ${row + 1}`
            return (
              <tr key={place}>
                <th scope="row">{row + 1}</th>
                {columns.map((column, k) => (
                  <td key={column.name}>
                    {'words' in column ? (
                      <select
                        aria-label={`${column.name}, ${place}`}
                        value={cells[k] ?? ''}
                        onChange={(event) => set(row, k, event.currentTarget.value)}
                      >
                        {column.words.map((word) => (
                          <option key={word}>{word}</option>
                        ))}
                      </select>
                    ) : (
                      <input
                        type="text"
                        inputMode="decimal"
                        autoComplete="off"
                        aria-label={`${column.name}, ${place}`}
                        value={cells[k] ?? ''}
                        onChange={(event) => set(row, k, event.currentTarget.value)}
                        onKeyDown={(event) => {
                          if (event.key === 'Enter' && row === table.length - 1) addRow()
                        }}
                      />
                    )}
                  </td>
                ))}
                <td>
                  <button
                    type="button"
                    className="button icon"
                    aria-label={`Remove ${place}`}
                    disabled={table.length < 2}
                    onClick={() => onChange(table.toSpliced(row, 1))}
                  >
                    −
                  </button>
                </td>
              </tr>
            )
          })}
        </tbody>
      </table>
      <button type="button" className="button" onClick={addRow}>
        Add a row
      </button>
    </div>
  )
}
