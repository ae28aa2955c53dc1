import { knotName } from '../../chart/handles'
import { detailsOf, type Knot } from '../../core'
import { designLimits } from '../../io/designLimits'
import { designStore, useDesign } from '../../state/useDesign'
import { KnotCurrent, KnotVoltage } from '../parts/KnotFields'
import { QuantityField } from '../parts/QuantityField'

/** The lamp by its figures: each knot of the characteristic, and its two times. */
export function KnotsPart() {
  const lamp = useDesign((state) => state.design.stage.lamp)
  const lampName = useDesign((state) => state.design.lampName)
  const details = useDesign((state) => detailsOf(state.design))
  const { change, changeKnot, addKnot, removeKnot } = designStore.getState()
  return (
    <div className="lamp-figures">
      <section aria-label="Knots of the characteristic">
        <h3>Knots of the characteristic</h3>
        <table>
          <thead>
            <tr>
              <th scope="col">Knot</th>
              <th scope="col">Voltage</th>
              <th scope="col">Current</th>
              <th scope="col">
                <span className="unseen">Add or remove</span>
              </th>
            </tr>
          </thead>
          <tbody>
            {lamp.knots.map((knot, index) => {
              const name = index === 0 ? 'Origin' : knotName(lamp.knots, index)
              const place = `knot-${index}`
              const onKnot = (moved: Knot) => changeKnot(index, moved)
              return (
                <tr key={place}>
                  <th scope="row">{name}</th>
                  {index === 0 ? (
                    <>
                      <td className="fixed">0 V</td>
                      <td className="fixed">0 A</td>
                    </>
                  ) : (
                    <>
                      <td>
                        <KnotVoltage name={name} knot={knot} onKnot={onKnot} />
                      </td>
                      <td>
                        <KnotCurrent name={name} knot={knot} onKnot={onKnot} />
                      </td>
                    </>
                  )}
                  <td className="row-buttons">
                    <button
                      type="button"
                      className="button icon"
                      aria-label={`Add a knot after ${name}`}
                      onClick={() => addKnot(index)}
                    >
                      +
                    </button>
                    {index > 0 && (
                      <button
                        type="button"
                        className="button icon"
                        aria-label={`Remove ${name}`}
                        onClick={() => removeKnot(index)}
                      >
                        −
                      </button>
                    )}
                  </td>
                </tr>
              )
            })}
          </tbody>
        </table>
        <p className="hint">
          Straight lines run between the knots. The knee is where it strikes, the valley where it
          goes out; a knot keeps between its neighbours’ currents.
        </p>
      </section>
      <section aria-label="Name and times">
        <h3>Name and times</h3>
        <div className="field">
          <label htmlFor="lamp-name">Lamp</label>
          <input
            id="lamp-name"
            type="text"
            maxLength={60}
            value={lampName}
            onFocus={() => designStore.getState().beginDrag()}
            onBlur={() => designStore.getState().endDrag()}
            onChange={(event) => change({ lampName: event.currentTarget.value })}
          />
          <p className="hint">what you call it</p>
        </div>
        <div className="field">
          <label htmlFor="lamp-note">Note about the lamp</label>
          <textarea
            id="lamp-note"
            rows={2}
            maxLength={400}
            value={details.note}
            onFocus={() => designStore.getState().beginDrag()}
            onBlur={() => designStore.getState().endDrag()}
            onChange={(event) => change({ lampDetails: { note: event.currentTarget.value } })}
          />
        </div>
        <QuantityField
          label="Resistor in its base"
          unit="Ω"
          value={details.baseResistance}
          max={designLimits.baseResistance.most}
          none={{ value: 0, word: 'none' }}
          onValue={(baseResistance) => change({ lampDetails: { baseResistance } })}
          hint="built in; adds to the lead resistor"
        />
        <PolarityButtons />
        <QuantityField
          label="Recovery time"
          unit="s"
          value={lamp.recoveryTime}
          max={designLimits.recoveryTime.most}
          none={{ value: 0, word: 'none' }}
          onValue={(recoveryTime) => change({ lamp: { ...lamp, recoveryTime } })}
          hint="time constant with which the strike voltage comes back; 50 µs … 1 ms is usual (from memory)"
        />
        <QuantityField
          label="Strike delay"
          unit="s"
          value={lamp.strikeDelay}
          max={designLimits.strikeDelay.most}
          none={{ value: 0, word: 'none' }}
          onValue={(strikeDelay) => change({ lamp: { ...lamp, strikeDelay } })}
          hint="mean of the random wait before each strike; longer in the dark, up to seconds (from memory)"
        />
      </section>
    </div>
  )
}

/** A lamp that differs by polarity carries two characteristics, one in use. */
function PolarityButtons() {
  const otherWay = useDesign((state) => detailsOf(state.design).otherWay)
  const knots = useDesign((state) => state.design.stage.lamp.knots)
  const { change, turnLamp } = designStore.getState()
  return (
    <div className="field">
      <span className="field-name">The other way round</span>
      <div className="button-row">
        {otherWay === null ? (
          <button
            type="button"
            className="button"
            onClick={() => change({ lampDetails: { otherWay: knots } })}
          >
            It differs: give it a second curve
          </button>
        ) : (
          <>
            <button type="button" className="button" onClick={turnLamp}>
              Turn it round
            </button>
            <button
              type="button"
              className="button"
              onClick={() => change({ lampDetails: { otherWay: null } })}
            >
              Same both ways
            </button>
          </>
        )}
      </div>
      <p className="hint">
        {otherWay === null
          ? 'taken to be the same'
          : 'two curves: turn the lamp to see and edit the other'}
      </p>
    </div>
  )
}
