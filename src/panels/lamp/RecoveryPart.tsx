import { useMemo } from 'react'
import { formatQuantity, recoveryFromRate } from '../../core'
import { noteDown, useReadings } from '../../state/readingsStore'
import { designStore } from '../../state/useDesign'
import { QuantityField } from '../parts/QuantityField'
import { useSolution } from '../useSolution'

/** The recovery time from the rate at which this very stage was seen to run. */
export function RecoveryPart() {
  const { stage } = useSolution()
  const frequency = useReadings((state) => state.countedRate)
  const uncertainty = useReadings((state) => state.rateUncertainty)
  const result = useMemo(
    () => (frequency > 0 ? recoveryFromRate(stage, { frequency, uncertainty }) : null),
    [stage, frequency, uncertainty],
  )
  const { lamp } = stage
  return (
    <div className="lamp-part two">
      <section aria-label="The rate seen">
        <h3>The rate seen</h3>
        <p className="hint">
          A fast stage strikes before its lamp has quite recovered, so it runs faster and with a
          smaller swing than reckoned. Build the stage on this page, fast, and type the rate it runs
          at.
        </p>
        <div className="fields">
          <QuantityField
            label="Rate seen"
            unit="Hz"
            apart
            value={frequency}
            max={1e7}
            none={{ value: 0, word: 'not yet' }}
            onValue={(countedRate) => noteDown({ countedRate })}
            hint="of the built stage"
          />
          <QuantityField
            label="How far it may be out"
            unit="%"
            apart
            value={100 * uncertainty}
            max={50}
            onValue={(value) => noteDown({ rateUncertainty: value / 100 })}
            hint="rate and parts together"
          />
        </div>
      </section>
      <section aria-label="Recovery time" aria-live="polite">
        <h3>Recovery time</h3>
        {result === null && <p className="hint">Type a rate to begin.</p>}
        {result?.ok === false && <p className="wrong-text">{result.reason}</p>}
        {result?.ok === true && (
          <>
            <p>
              <strong>{formatQuantity(result.recoveryTime, 's')}</strong>, between{' '}
              {formatQuantity(result.low, 's', 2)} and{' '}
              {result.high === null ? 'more than can be told' : formatQuantity(result.high, 's', 2)}
              . With a lamp that recovers at once it would run at{' '}
              {formatQuantity(result.idealFrequency, 'Hz')}; it strikes at{' '}
              {formatQuantity(result.strikeReached, 'V')} instead of{' '}
              {formatQuantity(result.strikeRested, 'V')}.
            </p>
            {result.remarks.map((remark) => (
              <p key={remark}>{remark}</p>
            ))}
            <button
              type="button"
              className="button strong"
              onClick={() => {
                const own = designStore.getState().design.stage.lamp
                designStore
                  .getState()
                  .change({ lamp: { ...own, recoveryTime: result.recoveryTime } })
              }}
            >
              Give the lamp this recovery time
            </button>
            <p className="hint">
              In the design now:{' '}
              {lamp.recoveryTime > 0 ? formatQuantity(lamp.recoveryTime, 's') : 'none'}.
            </p>
          </>
        )}
      </section>
    </div>
  )
}
