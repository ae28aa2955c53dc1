import type { KeyboardEvent } from 'react'
import { type Stage, spokenQuantity } from '../core'
import { type Edit, type HandleId, knotName, type Step } from './handles'

type Slider = {
  readonly id: HandleId
  readonly along: Step['along']
  readonly name: string
  readonly spoken: string
  readonly min: number
  readonly max: number
  readonly now: number
  /** What a value of the range means. */
  readonly edit: (value: number) => Edit
}

/** Ranges run over a thousandth of a decade for what spans decades, over tenths of volts for voltages. */
const decades = (value: number) => Math.round(1000 * Math.log10(Math.max(value, 1e-15)))

function slidersOf(stage: Stage): Slider[] {
  const sliders: Slider[] = [
    {
      id: 'supply',
      along: 'voltage',
      name: 'Supply end of the load line: supply voltage',
      spoken: spokenQuantity(stage.supplyVoltage, 'V'),
      min: 0,
      max: Math.max(4000, Math.ceil(stage.supplyVoltage * 20)),
      now: Math.round(stage.supplyVoltage * 10),
      edit: (value) => ({ kind: 'supply', voltage: value / 10 }),
    },
    {
      id: 'slope',
      along: 'current',
      name: 'Slope of the load line: series resistor',
      spoken: spokenQuantity(stage.seriesResistance, 'Ω'),
      min: 0,
      max: 13000,
      now: decades(Math.max(1, stage.seriesResistance)),
      edit: (value) => ({
        kind: 'series',
        resistance: Number((10 ** (value / 1000)).toPrecision(3)),
      }),
    },
  ]
  stage.lamp.knots.forEach((knot, index) => {
    if (index === 0) return
    const name = knotName(stage.lamp.knots, index)
    sliders.push(
      {
        id: `knot-${index}`,
        along: 'voltage',
        name: `${name}: voltage`,
        spoken: spokenQuantity(knot.voltage, 'V'),
        min: 0,
        max: Math.max(4000, Math.ceil(knot.voltage * 20)),
        now: Math.round(knot.voltage * 10),
        edit: (value) => ({ kind: 'knot', index, knot: { ...knot, voltage: value / 10 } }),
      },
      {
        id: `knot-${index}`,
        along: 'current',
        name: `${name}: current`,
        spoken: spokenQuantity(knot.current, 'A'),
        min: -15000,
        max: 2000,
        now: decades(knot.current),
        edit: (value) => ({
          kind: 'knot',
          index,
          knot: { ...knot, current: Number((10 ** (value / 1000)).toPrecision(3)) },
        }),
      },
    )
  })
  return sliders
}

/** A stage whose lamp has nothing to move. */
const withoutKnots = (stage: Stage): Stage => ({ ...stage, lamp: { ...stage.lamp, knots: [] } })

const arrows: Readonly<Record<string, { along: Step['along'] | null; up: boolean; page?: true }>> =
  {
    ArrowUp: { along: 'voltage', up: true },
    ArrowDown: { along: 'voltage', up: false },
    ArrowRight: { along: 'current', up: true },
    ArrowLeft: { along: 'current', up: false },
    PageUp: { along: null, up: true, page: true },
    PageDown: { along: null, up: false, page: true },
  }

/**
 * The same handles as native ranges, seen by screen readers and reached by Tab: two for each that moves two
 * ways. Arrow keys step finely, with Shift or as Page keys coarsely.
 */
export function HandleInputs(props: {
  stage: Stage
  knotsFixed: boolean
  onSelect: (id: HandleId | null) => void
  onEdit: (edit: Edit) => void
  onStep: (id: HandleId, step: Step) => void
}) {
  const { stage, onSelect, onEdit, onStep } = props
  const press = (event: KeyboardEvent, slider: Slider) => {
    const arrow = arrows[event.key]
    if (arrow === undefined || event.ctrlKey || event.metaKey || event.altKey) return
    event.preventDefault()
    const knot = slider.id.startsWith('knot')
    onStep(slider.id, {
      along: knot ? (arrow.along ?? slider.along) : slider.along,
      direction: arrow.up ? 'up' : 'down',
      coarse: event.shiftKey || arrow.page === true,
    })
  }
  return (
    <fieldset className="handle-inputs">
      <legend>Handles of the plane</legend>
      {slidersOf(props.knotsFixed ? withoutKnots(stage) : stage).map((slider) => (
        <input
          key={`${slider.id}-${slider.along}`}
          type="range"
          data-handle={slider.id}
          data-along={slider.along}
          aria-label={slider.name}
          aria-valuetext={slider.spoken}
          min={slider.min}
          max={slider.max}
          step={1}
          value={slider.now}
          onFocus={() => onSelect(slider.id)}
          onKeyDown={(event) => press(event, slider)}
          onChange={(event) => onEdit(slider.edit(Number(event.currentTarget.value)))}
        />
      ))}
    </fieldset>
  )
}
