import type { PointerEvent } from 'react'
import type { Handle, HandleId } from './handles'

/** What can be grabbed, as dots with targets far larger than they look. */
export function HandleDots(props: {
  handles: readonly Handle[]
  selected: HandleId | null
  onGrab: (event: PointerEvent<SVGElement>, id: HandleId) => void
}) {
  const { handles, selected, onGrab } = props
  return (
    <g className="handles">
      {handles.map(({ id, name, tone, x, y }) => (
        <g
          key={id}
          transform={`translate(${x} ${y})`}
          className={`handle ${tone} ${selected === id ? 'selected' : ''}`}
          data-grab={id}
          onPointerDown={(event) => onGrab(event, id)}
        >
          <title>{name}: drag, or select and use the arrow keys</title>
          <circle className="target" r="18" />
          {tone === 'circuit' ? (
            <rect className="dot" x="-6" y="-6" width="12" height="12" rx="2.5" />
          ) : (
            <circle className="dot" r="5.5" />
          )}
        </g>
      ))}
    </g>
  )
}
