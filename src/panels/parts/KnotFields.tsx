import { steppedPart } from '../../chart/handles'
import type { Knot } from '../../core'
import { designLimits } from '../../io/designLimits'
import { QuantityField } from './QuantityField'

/** Voltage of a knot; the label names the knot where several stand together. */
export function KnotVoltage({ name, knot, onKnot }: KnotFieldProps) {
  return (
    <QuantityField
      label={name === undefined ? 'Voltage' : `${name}: voltage`}
      quiet
      unit="V"
      value={knot.voltage}
      max={designLimits.voltage.most}
      onValue={(voltage) => onKnot({ ...knot, voltage })}
      step={(direction, coarse) =>
        Math.max(0, knot.voltage + (direction === 'up' ? 1 : -1) * (coarse ? 5 : 0.5))
      }
    />
  )
}

/** Current of a knot. */
export function KnotCurrent({ name, knot, onKnot }: KnotFieldProps) {
  return (
    <QuantityField
      label={name === undefined ? 'Current' : `${name}: current`}
      quiet
      unit="A"
      value={knot.current}
      max={designLimits.current.most}
      onValue={(current) => onKnot({ ...knot, current })}
      step={(direction, coarse) =>
        steppedPart(knot.current, 'any', { direction, coarse }, 1e-15, 100)
      }
    />
  )
}

type KnotFieldProps = {
  name?: string
  knot: Knot
  onKnot: (knot: Knot) => void
}
