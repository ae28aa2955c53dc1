import { formatQuantity } from '../../core'
import type { SweepTable, SweepTableOptions } from '../../io/sweepTable'

const mostErrors = 8

/** A table as it was read: columns, first rows, and every row that could not be used. */
export function SweepPreview(props: {
  table: SweepTable | null
  options: SweepTableOptions
  onOptions: (options: SweepTableOptions) => void
}) {
  const { table, options, onOptions } = props
  if (table === null) return <p className="hint">Nothing to read yet.</p>
  if (!table.ok) return <p className="wrong-text">{table.message}</p>
  const column = (role: 'supply' | 'lamp') =>
    table.columns.find((each) => each.role === role)?.index ?? 0
  const choose = (role: 'supplyColumn' | 'lampColumn') => (value: string) =>
    onOptions({ ...options, [role]: Number(value) })
  return (
    <>
      <p role="status">
        {table.readings.length} readings
        {table.errors.length > 0 && `, ${table.errors.length} remarks on rows`}.
      </p>
      <div className="fields">
        <ColumnChoice
          label="Supply is in"
          table={table}
          value={column('supply')}
          onChoose={choose('supplyColumn')}
        />
        <ColumnChoice
          label="Lamp is in"
          table={table}
          value={column('lamp')}
          onChoose={choose('lampColumn')}
        />
      </div>
      {/* biome-ignore lint/a11y/noNoninteractiveTabindex: what scrolls must be reached by keys */}
      <section className="scroll" tabIndex={0} aria-label="First rows as understood">
        <table className="preview">
          <thead>
            <tr>
              <th scope="col">Row</th>
              <th scope="col">As written</th>
              <th scope="col">Supply</th>
              <th scope="col">Lamp</th>
            </tr>
          </thead>
          <tbody>
            {table.preview.map(({ row, cells, reading }) => (
              <tr key={row}>
                <th scope="row">{row}</th>
                <td>{cells.join(' · ')}</td>
                <td>{reading === null ? '–' : formatQuantity(reading.supply, 'V', 5)}</td>
                <td>{reading === null ? '–' : formatQuantity(reading.lamp, 'V', 5)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      {table.errors.slice(0, mostErrors).map(({ row, message }) => (
        <p key={`${row}-${message}`} className="wrong-text">
          Row {row}: {message}
        </p>
      ))}
      {table.errors.length > mostErrors && (
        <p className="wrong-text">and {table.errors.length - mostErrors} more.</p>
      )}
    </>
  )
}

function ColumnChoice(props: {
  label: string
  table: Extract<SweepTable, { readonly ok: true }>
  value: number
  onChoose: (value: string) => void
}) {
  return (
    <div className="field">
      <label>
        {props.label}
        <select value={props.value} onChange={(event) => props.onChoose(event.currentTarget.value)}>
          {props.table.columns.map(({ index, name }) => (
            <option key={index} value={index}>
              {name}
            </option>
          ))}
        </select>
      </label>
    </div>
  )
}
