import { knotName, steppedPart } from '../chart/handles'
import { designLimits } from '../io/designLimits'
import { designStore, useDesign } from '../state/useDesign'
import { QuantityField } from './parts/QuantityField'

/** The lamp by its figures: each knot of the characteristic, and its two times. */
export default function LampFigures() {
  const lamp = useDesign((state) => state.design.stage.lamp)
  const lampName = useDesign((state) => state.design.lampName)
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
                        <QuantityField
                          label={`${name}: voltage`}
                          quiet
                          unit="V"
                          value={knot.voltage}
                          max={designLimits.voltage.most}
                          onValue={(voltage) => changeKnot(index, { ...knot, voltage })}
                          step={(direction, coarse) =>
                            Math.max(
                              0,
                              knot.voltage + (direction === 'up' ? 1 : -1) * (coarse ? 5 : 0.5),
                            )
                          }
                        />
                      </td>
                      <td>
                        <QuantityField
                          label={`${name}: current`}
                          quiet
                          unit="A"
                          value={knot.current}
                          max={designLimits.current.most}
                          onValue={(current) => changeKnot(index, { ...knot, current })}
                          step={(direction, coarse) =>
                            steppedPart(knot.current, 'any', { direction, coarse }, 1e-15, 100)
                          }
                        />
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
