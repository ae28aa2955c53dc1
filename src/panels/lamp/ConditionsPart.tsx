import { conditionSources, detailsOf, type LampConditions, workingStage } from '../../core'
import { designStore, useDesign } from '../../state/useDesign'
import { Choice } from '../parts/Choice'
import { QuantityField } from '../parts/QuantityField'

const hour = 3600

/** Surroundings, temperature and age of the lamp, and what each does to it. */
export function ConditionsPart() {
  const design = useDesign((state) => state.design)
  const { conditions } = detailsOf(design)
  const { effects } = conditions
  const { sentences, fault } = workingStage(design)
  const set = (patch: Partial<LampConditions>) =>
    designStore.getState().change({ lampDetails: { conditions: { ...conditions, ...patch } } })
  const effect = (patch: Partial<LampConditions['effects']>) =>
    set({ effects: { ...effects, ...patch } })
  return (
    <div className="lamp-part two">
      <section aria-label="Conditions">
        <h3>Conditions</h3>
        <label className="switch">
          <input
            type="checkbox"
            checked={conditions.on}
            onChange={(event) => set({ on: event.currentTarget.checked })}
          />
          Reckon with the lamp as it is under these conditions
        </label>
        <Choice
          name="Surroundings"
          value={conditions.surroundings}
          options={[
            ['lit', 'lit'],
            ['dim', 'dim'],
            ['dark', 'dark'],
          ]}
          onChoose={(surroundings) => set({ surroundings })}
        />
        <div className="fields">
          <QuantityField
            label="Temperature, °C"
            unit=""
            min={-90}
            max={300}
            value={conditions.temperature}
            onValue={(temperature) => set({ temperature })}
            hint="of the lamp"
          />
          <QuantityField
            label="Has glowed for, hours"
            unit=""
            max={1e7}
            value={conditions.timeOfUse / hour}
            onValue={(hours) => set({ timeOfUse: hours * hour })}
            hint="so far"
          />
        </div>
        {conditions.on ? (
          <div role="status">
            {fault !== null && <p className="wrong-text">{fault}</p>}
            {sentences.map((sentence) => (
              <p key={sentence}>{sentence}</p>
            ))}
            {fault === null && sentences.length === 0 && <p>These conditions change nothing.</p>}
          </div>
        ) : (
          <p className="hint">Off: the lamp is taken as its figures say.</p>
        )}
      </section>
      <section aria-label="What they do">
        <h3>What they do</h3>
        <div className="fields">
          <QuantityField
            label="Dim: strikes higher by"
            unit="V"
            max={1000}
            value={effects.dim.strikeRise}
            onValue={(strikeRise) => effect({ dim: { ...effects.dim, strikeRise } })}
            hint={conditionSources.dim}
          />
          <QuantityField
            label="Dim: waits longer by"
            unit="s"
            max={1000}
            value={effects.dim.delayGrowth}
            onValue={(delayGrowth) => effect({ dim: { ...effects.dim, delayGrowth } })}
            hint="on average"
          />
          <QuantityField
            label="Dark: strikes higher by"
            unit="V"
            max={1000}
            value={effects.dark.strikeRise}
            onValue={(strikeRise) => effect({ dark: { ...effects.dark, strikeRise } })}
            hint={conditionSources.dark}
          />
          <QuantityField
            label="Dark: waits longer by"
            unit="s"
            max={1000}
            value={effects.dark.delayGrowth}
            onValue={(delayGrowth) => effect({ dark: { ...effects.dark, delayGrowth } })}
            hint="on average"
          />
          <QuantityField
            label="Change for each °C"
            unit="V"
            min={-1}
            max={1}
            value={effects.perKelvin}
            onValue={(perKelvin) => effect({ perKelvin })}
            hint={conditionSources.perKelvin}
          />
          <QuantityField
            label="Strike at the end of its life"
            unit="V"
            min={-1000}
            max={1000}
            value={effects.strikeAtEnd}
            onValue={(strikeAtEnd) => effect({ strikeAtEnd })}
            hint={conditionSources.strikeAtEnd}
          />
          <QuantityField
            label="Extinction at the end of its life"
            unit="V"
            min={-1000}
            max={1000}
            value={effects.extinctionAtEnd}
            onValue={(extinctionAtEnd) => effect({ extinctionAtEnd })}
            hint={conditionSources.extinctionAtEnd}
          />
          <QuantityField
            label="Life, hours"
            unit=""
            min={1}
            max={1e7}
            value={effects.life / hour}
            onValue={(hours) => effect({ life: hours * hour })}
            hint={conditionSources.life}
          />
        </div>
      </section>
    </div>
  )
}
