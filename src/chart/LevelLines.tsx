import { formatQuantity, type Solution } from '../core'
import type { Axis } from './axes'
import { type PlateLayout, rightOf } from './plateLayout'

/** Strike and extinction voltage as level lines across plane and trace, named in the gap between. */
export function LevelLines(props: {
  solution: Solution
  layout: PlateLayout
  x: Axis
  y: Axis
  /** The trace's own voltage axis where the two are stacked. */
  traceY: Axis
}) {
  const { solution, layout, x, y, traceY } = props
  const { strike, extinction } = solution.reason
  if (strike === null || extinction === null) return null
  const { plane, trace, stacked } = layout
  const middle = (rightOf(plane) + trace.x) / 2 - 3
  const within = (axis: Axis, voltage: number) =>
    voltage >= axis.domain[0] && voltage <= axis.domain[1]
  const closeness = Math.abs(y.place(strike.voltage) - y.place(extinction.voltage))
  const levels = [
    { name: 'strike', ...strike, lift: -1 },
    { name: 'extinction', ...extinction, lift: 1 },
  ]
  return (
    <g className="levels">
      {levels.map(({ name, voltage, current, lift }) => {
        const at = y.place(voltage)
        const traceAt = traceY.place(voltage)
        const start = Math.max(plane.x, Math.min(rightOf(plane), x.place(current)))
        const text = formatQuantity(voltage, 'V')
        // Close levels part their names, so that neither covers the other.
        const part = closeness < 34 ? lift * (17 - closeness / 2) : 0
        return (
          <g key={name}>
            {within(y, voltage) && (
              <line x1={start} x2={stacked ? rightOf(plane) : rightOf(trace)} y1={at} y2={at} />
            )}
            {stacked && within(traceY, voltage) && (
              <>
                <line x1={trace.x} x2={rightOf(trace)} y1={traceAt} y2={traceAt} />
                <text className="level-name" x={trace.x + 6} y={traceAt + (lift < 0 ? -5 : 14)}>
                  {name} {text}
                </text>
              </>
            )}
            {!stacked && within(y, voltage) && (
              <text className="level-name" textAnchor="middle">
                <tspan x={middle} y={at - 5 + part}>
                  {name}
                </tspan>
                <tspan x={middle} y={at + 13 + part}>
                  {text}
                </tspan>
              </text>
            )}
          </g>
        )
      })}
    </g>
  )
}
