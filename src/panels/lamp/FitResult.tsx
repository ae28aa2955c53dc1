import { knotName } from '../../chart/handles'
import { formatQuantity } from '../../core'
import type { FitState } from './useSweepFit'

/** The fit: begun, under way, stopped or done, and what it found. */
export function FitResult(props: {
  state: FitState
  readings: number
  onBegin: () => void
  onStop: () => void
  onAdopt: () => void
}) {
  const { state } = props
  const running = state.is === 'running'
  return (
    <>
      <div className="button-row">
        <button
          type="button"
          className="button strong"
          disabled={running || props.readings === 0}
          onClick={props.onBegin}
        >
          Fit a characteristic
        </button>
        {running && (
          <button type="button" className="button" onClick={props.onStop}>
            Stop
          </button>
        )}
      </div>
      {running && (
        <label className="progress">
          {state.progress?.stage ?? 'beginning'}
          <progress max={1} value={state.progress?.done ?? 0} />
        </label>
      )}
      <div role="status">
        {state.is === 'stopped' && <p>Stopped. Nothing was changed.</p>}
        {state.is === 'failed' && <p className="wrong-text">{state.message}</p>}
        {state.is === 'done' && <Found {...props} />}
      </div>
    </>
  )
}

function Found({ state, onAdopt }: { state: FitState; onAdopt: () => void }) {
  if (state.is !== 'done') return null
  const { fit, leftOut, averaged } = state.result
  return (
    <>
      {!fit.ok && <p className="wrong-text">{fit.message}</p>}
      {fit.ok && (
        <>
          <table className="preview">
            <thead>
              <tr>
                <th scope="col">Knot</th>
                <th scope="col">Voltage</th>
                <th scope="col">Current</th>
              </tr>
            </thead>
            <tbody>
              {fit.knots.map((knot, index) => {
                const sigma = fit.sigma[index]
                const place = `fitted-${index}`
                return (
                  <tr key={place}>
                    <th scope="row">{index === 0 ? 'Origin' : knotName(fit.knots, index)}</th>
                    <td>
                      {formatQuantity(knot.voltage, 'V', 4)}
                      {index > 0 && error(sigma?.voltage, 'V')}
                    </td>
                    <td>
                      {formatQuantity(knot.current, 'A')}
                      {index > 0 && error(sigma?.current, 'A')}
                    </td>
                  </tr>
                )
              })}
            </tbody>
          </table>
          <p>
            {fit.knots.length} knots by the {fit.criterion.name}; readings lie within{' '}
            {formatQuantity(fit.rms, 'V', 2)} rms. The falling region is{' '}
            {fit.fallingRegion === 'measured'
              ? 'measured'
              : 'not measured: a straight line joins its ends'}
            .
          </p>
          {averaged > 0 && (
            <p className="hint">{averaged} points stand for several readings each.</p>
          )}
          {fit.notes.map((note) => (
            <p key={note}>{note}</p>
          ))}
          <button type="button" className="button strong" onClick={onAdopt}>
            Put this characteristic into the design
          </button>
          <p className="hint">
            Its points and the fit are on the plane. Once in the design, its knots can be dragged; a
            glow branch that ends below strike voltage is carried straight on past it, which is a
            guess.
          </p>
        </>
      )}
      {leftOut.slice(0, 8).map(({ row, reason }) => (
        <p key={row} className="wrong-text">
          Row {row}: {reason}
        </p>
      ))}
      {leftOut.length > 8 && (
        <p className="wrong-text">and {leftOut.length - 8} more rows left out.</p>
      )}
    </>
  )
}

function error(sigma: number | undefined, unit: 'V' | 'A'): string {
  if (sigma === undefined || sigma === 0) return ''
  return Number.isFinite(sigma) ? ` ± ${formatQuantity(sigma, unit, 2)}` : ' (not bounded)'
}
