import { formatQuantity } from '../core'
import { AxisLines } from './PlaneAxes'
import type { PlaneLabel } from './planeLabels'
import type { PlaneInput, PlanePicture } from './planePicture'
import type { Box } from './plateLayout'

/** Curves, region and names of the plane, without what can be grabbed. */
export function PlaneDrawing(props: {
  input: PlaneInput
  picture: PlanePicture
  labels: readonly PlaneLabel[]
  box: Box
}) {
  const { input, picture, labels, box } = props
  return (
    <g>
      <AxisLines input={input} box={box} />
      <g clipPath="url(#plane-clip)">
        <path className="region" d={picture.region} />
        <path className="region-hatch" d={picture.region} fill="url(#hatch)" />
        <path className="edge" d={picture.litEdge} />
        <path className="edge" d={picture.darkEdge} />
        <path className="loop" d={picture.loop} />
        {picture.jumps.map((jump) => (
          <JumpArrow key={`${jump.from > jump.to ? 'out' : 'strike'}-${jump.phase}`} {...jump} />
        ))}
        {picture.lampAlone && <path className="lamp-alone" d={picture.lampAlone} />}
        <path className="characteristic" d={picture.characteristic} />
        <path className="load-line" d={picture.loadLine} />
      </g>
      {picture.marks.map((mark) =>
        inside(box, mark.x, mark.y) ? (
          <g
            key={mark.current}
            transform={`translate(${mark.x} ${mark.y})`}
            className={mark.stable ? 'mark stable' : 'mark unstable'}
          >
            <title>
              {mark.stable
                ? `The stage can rest here, at ${formatQuantity(mark.current, 'A')}`
                : `No rest here: at ${formatQuantity(mark.current, 'A')} the falling region throws the stage out`}
            </title>
            {mark.stable ? <circle r="5.5" /> : <path d="M-4.5-4.5 4.5 4.5M-4.5 4.5 4.5-4.5" />}
          </g>
        ) : null,
      )}
      {labels.map((label) => (
        <text
          key={label.id}
          className={`name ${label.tone}`}
          x={label.x}
          y={label.y}
          textAnchor={label.anchor}
        >
          {label.text}
        </text>
      ))}
    </g>
  )
}

const inside = (box: Box, x: number, y: number) =>
  x >= box.x - 1 && x <= box.x + box.width + 1 && y >= box.y - 1 && y <= box.y + box.height + 1

/** A jump at one voltage: a level line with its direction. */
function JumpArrow({ from, to, y }: { from: number; to: number; y: number }) {
  const way = to > from ? 1 : -1
  const middle = (from + to) / 2
  return (
    <g className="jump">
      <line x1={from} x2={to} y1={y} y2={y} />
      {Math.abs(to - from) > 24 && (
        <path
          d={`M${middle - 5 * way} ${y - 5}L${middle + 4 * way} ${y}L${middle - 5 * way} ${y + 5}`}
        />
      )}
    </g>
  )
}
