import { type ComponentType, useState } from 'react'
import { Choice } from '../parts/Choice'
import { CataloguePart } from './CataloguePart'
import { ConditionsPart } from './ConditionsPart'
import { KnotsPart } from './KnotsPart'
import { MyLampsPart } from './MyLampsPart'
import { prepareSweep } from './prepareSweep'
import { RecoveryPart } from './RecoveryPart'
import { StrikePart } from './StrikePart'
import { SweepPart } from './SweepPart'
import { WatchPart } from './WatchPart'

type PartId =
  | 'knots'
  | 'catalogue'
  | 'sweep'
  | 'strike'
  | 'watch'
  | 'conditions'
  | 'recovery'
  | 'mine'

const parts: readonly (readonly [PartId, string, ComponentType])[] = [
  ['knots', 'Figures', KnotsPart],
  ['catalogue', 'Catalogue', CataloguePart],
  ['sweep', 'From a sweep', SweepPart],
  ['strike', 'From strike tests', StrikePart],
  ['watch', 'From a watch', WatchPart],
  ['recovery', 'Recovery time', RecoveryPart],
  ['conditions', 'Conditions', ConditionsPart],
  ['mine', 'My lamps', MyLampsPart],
]

/** Loads what its parts will need, ahead of its being needed. */
export const prepare = prepareSweep

/** The lamp: its figures, and every way to come by them. */
export default function LampPanel() {
  const [chosen, setChosen] = useState<PartId>('knots')
  const Part = parts.find(([id]) => id === chosen)?.[2] ?? KnotsPart
  return (
    <div className="lamp-panel">
      <Choice
        name="The lamp, by its"
        value={chosen}
        options={parts.map(([id, words]) => [id, words] as const)}
        onChoose={setChosen}
      />
      <Part />
    </div>
  )
}
