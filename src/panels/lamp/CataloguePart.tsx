import { useState } from 'react'
import { catalogue, catalogueEntry, formatQuantity, peakOfAcRating, recordOf } from '../../core'
import { designStore, useDesign } from '../../state/useDesign'
import { QuantityField } from '../parts/QuantityField'
import { FactList } from './FactList'

/** Lamps by designation: what is known of each, from whom, and a typical one to put into the design. */
export function CataloguePart() {
  const [chosen, setChosen] = useState(catalogue[0]?.id ?? '')
  const [rating, setRating] = useState(65)
  const [base, setBase] = useState(0)
  const fitted = useDesign((state) => state.design.lampName)
  const entry = catalogueEntry(chosen)
  if (entry === null) return null
  const record = { ...recordOf(entry), baseResistance: base }
  return (
    <div className="lamp-part two">
      <section aria-label="Lamps by designation">
        <h3>By designation</h3>
        <table className="catalogue">
          <thead>
            <tr>
              <th scope="col">Lamp</th>
              <th scope="col">Brightness</th>
              <th scope="col">Strike at most, dc</th>
              <th scope="col">Design current</th>
              <th scope="col">Resistor</th>
            </tr>
          </thead>
          <tbody>
            {catalogue.map((each) => (
              <tr key={each.id} className={each.id === chosen ? 'chosen' : ''}>
                <th scope="row">
                  <label>
                    <input
                      type="radio"
                      name="catalogue"
                      checked={each.id === chosen}
                      onChange={() => setChosen(each.id)}
                    />
                    {each.name}
                  </label>
                </th>
                <td>{each.brightness.value}</td>
                <td>{each.strikeDc === null ? '–' : formatQuantity(each.strikeDc.value, 'V')}</td>
                <td>
                  {each.designCurrent === null
                    ? '–'
                    : formatQuantity(each.designCurrent.value, 'A')}
                </td>
                <td>
                  {each.seriesResistor === null
                    ? '–'
                    : formatQuantity(each.seriesResistor.value, 'Ω')}
                </td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      <section aria-label="What is known of this lamp">
        <h3>{entry.name}</h3>
        <FactList facts={record.facts} />
        <QuantityField
          label="Resistor built into its base"
          unit="Ω"
          value={base}
          max={1e13}
          none={{ value: 0, word: 'none' }}
          onValue={setBase}
          apart
          hint="adds to the lead resistor"
        />
        <button
          type="button"
          className="button strong"
          onClick={() => designStore.getState().fitLamp(record)}
        >
          Put this lamp into the design
        </button>
        <p className="hint">
          In the design now: {fitted === '' ? 'a lamp without a name' : fitted}. The curve is
          typical, single lamps differ by the spread above.
        </p>
        <QuantityField
          label="A rating in volts ac"
          unit="V"
          value={rating}
          max={1000}
          onValue={setRating}
          apart
          hint={`${peakOfAcRating(rating, null).step} peak: that is the dc to compare with`}
        />
      </section>
    </div>
  )
}
