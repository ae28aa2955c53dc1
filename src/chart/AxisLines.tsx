import type { ReactNode } from 'react'
import type { Axis } from './axes'
import { type Box, bottomOf, rightOf } from './plateLayout'

/** Thin vertical lines and numbers of an axis that runs along the bottom of a box. */
export function BottomAxis(props: {
  axis: Axis
  box: Box
  text: (value: number) => string
  title: ReactNode
  /** Other boxes above that the grid lines run through. */
  through?: Box
  bare?: boolean
}) {
  const { axis, box, text, title, through, bare } = props
  const floor = bottomOf(box)
  return (
    <g className="axis">
      {axis.ticks.map(({ value, at, labelled, minor }) => (
        <g key={value}>
          <line className={minor ? 'grid minor' : 'grid'} x1={at} x2={at} y1={box.y} y2={floor} />
          {through && (
            <line className="grid" x1={at} x2={at} y1={through.y} y2={bottomOf(through)} />
          )}
          {labelled && !bare && (
            <text x={at} y={floor + 17} textAnchor="middle">
              {text(value)}
            </text>
          )}
        </g>
      ))}
      <line className="rule" x1={box.x} x2={rightOf(box)} y1={floor} y2={floor} />
      {!bare && (
        <text className="axis-title" x={rightOf(box)} y={floor + 34} textAnchor="end">
          {title}
        </text>
      )}
    </g>
  )
}

/** Thin level lines and numbers of an axis that runs up the left of a box. */
export function LeftAxis(props: {
  axis: Axis
  box: Box
  text: (value: number) => string
  title: string
  /** Another box to the right that the level lines run through. */
  through?: Box | undefined
}) {
  const { axis, box, text, title, through } = props
  return (
    <g className="axis">
      {axis.ticks.map(({ value, at }) => (
        <g key={value}>
          <line className="grid" x1={box.x} x2={rightOf(box)} y1={at} y2={at} />
          {through && (
            <line className="grid" x1={through.x} x2={rightOf(through)} y1={at} y2={at} />
          )}
          <text x={box.x - 8} y={at + 4} textAnchor="end">
            {text(value)}
          </text>
        </g>
      ))}
      <line className="rule" x1={box.x} x2={box.x} y1={box.y} y2={bottomOf(box)} />
      <text className="axis-title" x={box.x - 44} y={box.y - 10}>
        {title}
      </text>
    </g>
  )
}
