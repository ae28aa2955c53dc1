import { type PointerEvent, type ReactNode, useCallback, useMemo, useRef, useState } from 'react'
import { branchesOf, feedResistance, momentAt, type Solution, type Stage } from '../core'
import { LeftAxis } from './AxisLines'
import {
  type Axis,
  type CurrentAxis,
  currentAxis,
  type Domain,
  linearAxis,
  magnify,
  shift,
} from './axes'
import { planeDomain, type Span, timeDomain, voltageDomain } from './domains'
import { HandleDots } from './HandleDots'
import { HandleInputs } from './HandleInputs'
import {
  type Edit,
  type HandleId,
  handlesOf,
  knotOf,
  lineThrough,
  type PartChoice,
  placeHandle,
  type Step,
  stepHandle,
} from './handles'
import { LevelLines } from './LevelLines'
import { litWithin } from './litWithin'
import type { Overlay } from './overlayPaths'
import { PlaneDrawing } from './PlaneDrawing'
import { planeLabels } from './planeLabels'
import { planePicture } from './planePicture'
import { type Box, bottomOf, plateLayout } from './plateLayout'
import { ReadingsDrawing } from './ReadingsDrawing'
import { TraceDrawing } from './TraceDrawing'
import { tickWriter } from './tickText'
import type { Trace } from './traceOf'
import { highestCurrent, tracePicture } from './tracePicture'
import { type Point, useGrab } from './useGrab'
import { useGrabbableByTouch } from './useGrabbableByTouch'
import { type PanZoom, usePanZoom } from './usePanZoom'
import { type Playing, usePlayback } from './usePlayback'
import { useWidth } from './useWidth'

/** What a person has zoomed to; null = what matters, chosen by the page. */
export type Zoom = {
  readonly current: Domain | null
  readonly voltage: Domain | null
  readonly time: Domain | null
}

/** Nothing zoomed. */
export const wholeView: Zoom = { current: null, voltage: null, time: null }

/** What the plate reports back. */
export type PlateActions = {
  readonly onEdit: (edit: Edit) => void
  readonly onDragStart: () => void
  readonly onDragEnd: () => void
  readonly onDragCancel: () => void
  readonly onSelect: (id: HandleId | null) => void
  readonly onZoom: (zoom: Zoom) => void
  /** A handle was placed by a click. */
  readonly onPlaced: () => void
  /** The moment under the marker, s on the trace, and the stage's time that went by since, s. */
  readonly onTick: (time: number, elapsed: number, lit: boolean) => void
}

/** Plane and trace on one voltage axis. */
export function Plate(props: {
  stage: Stage
  solution: Solution
  trace: Trace
  kind: CurrentAxis
  span: Span
  zoom: Zoom
  choice: PartChoice
  /** The characteristic is not the one entered: its knots are not for moving. */
  knotsFixed: boolean
  /** Readings and a fit to show on the plane; null of none. */
  overlay: Overlay | null
  selected: HandleId | null
  /** When true, the next click on the plane puts the selected handle there. */
  placing: boolean
  playing: Playing
  /** Where a person has put the marker, s; changes are followed. */
  cursor: { readonly time: number } | null
  actions: PlateActions
  summary: string
  children?: ReactNode
}) {
  const { stage, solution, trace, kind, span, zoom, choice, selected, placing, playing, actions } =
    props
  const holder = useRef<HTMLDivElement>(null)
  const svg = useRef<SVGSVGElement>(null)
  const planeGround = useRef<SVGRectElement>(null)
  const traceGround = useRef<SVGRectElement>(null)
  const width = useWidth(holder, 1060)
  const layout = useMemo(() => plateLayout(width), [width])
  // While something is dragged the axes stand still under the pointer.
  const [held, setHeld] = useState<{
    id: HandleId
    x: Domain
    y: Domain
    time: Domain
    amps: Domain
  } | null>(null)

  const path = useMemo(
    () => branchesOf(stage.lamp.knots, stage.leadResistance),
    [stage.lamp.knots, stage.leadResistance],
  )
  const x = useMemo(() => {
    const domain = held?.x ?? zoom.current ?? planeDomain(kind, stage, path)
    return currentAxis(kind, domain, [layout.plane.x, layout.plane.x + layout.plane.width])
  }, [held, zoom.current, kind, stage, path, layout])
  const volts = held?.y ?? zoom.voltage ?? voltageDomain(stage, path)
  const y = useMemo(() => upward(volts, layout.plane, 44), [volts, layout])
  const traceY = useMemo(() => upward(volts, layout.trace, 44), [volts, layout])
  const seconds = held?.time ?? zoom.time ?? timeDomain(span, solution, trace.length)
  const time = useMemo(
    () => linearAxis(seconds, [layout.trace.x, layout.trace.x + layout.trace.width], 80),
    [seconds, layout],
  )
  const amps = held?.amps ?? ([0, 1.12 * Math.max(highestCurrent(trace), 1e-9)] as const)
  const current = useMemo(() => upward(amps, layout.current, 30), [amps, layout])

  const input = useMemo(
    () => ({ stage, solution, path, kind, x, y }),
    [stage, solution, path, kind, x, y],
  )
  const picture = useMemo(() => planePicture(input), [input])
  const labels = useMemo(() => planeLabels(input, picture), [input, picture])
  const waves = useMemo(
    () => tracePicture(trace, time, traceY, current),
    [trace, time, traceY, current],
  )
  const setting = useMemo(() => ({ stage, path, x, y, choice }), [stage, path, x, y, choice])
  const { knotsFixed } = props
  const dragged = held?.id ?? null
  const handles = useMemo(
    () => handlesOf(setting, dragged).filter((handle) => !knotsFixed || knotOf(handle.id) < 0),
    [setting, dragged, knotsFixed],
  )

  const planeDot = useRef<SVGGElement>(null)
  const traceDot = useRef<SVGGElement>(null)
  const currentDot = useRef<SVGGElement>(null)
  const feed = {
    supplyVoltage: stage.supplyVoltage,
    feedResistance: feedResistance(stage),
    leadResistance: stage.leadResistance,
  }
  const draw = (now: number, elapsed: number) => {
    const moment = momentAt(trace.phases, feed, now)
    if (moment === null) return
    const put = (dot: SVGGElement | null, box: Box, atX: number, atY: number) => {
      if (dot === null) return
      const seen =
        atX >= box.x - 1 &&
        atX <= box.x + box.width + 1 &&
        atY >= box.y - 1 &&
        atY <= bottomOf(box) + 1
      dot.setAttribute('transform', `translate(${atX.toFixed(2)} ${atY.toFixed(2)})`)
      dot.style.display = seen ? '' : 'none'
      dot.classList.toggle('lit', moment.lit)
    }
    put(planeDot.current, layout.plane, x.place(moment.lampCurrent), y.place(moment.voltage))
    put(traceDot.current, layout.trace, time.place(now), traceY.place(moment.voltage))
    put(currentDot.current, layout.current, time.place(now), current.place(moment.lampCurrent))
    actions.onTick(now, elapsed, litWithin(trace, now, elapsed))
  }
  usePlayback(trace, playing, props.cursor, draw)

  const grab = useGrab()
  const latest = useRef(setting)
  latest.current = setting
  const put = useCallback(
    (id: HandleId, at: Point) => {
      const edit = placeHandle(latest.current, id, at)
      if (edit !== null) actions.onEdit(edit)
    },
    [actions],
  )
  const hold = (id: HandleId) =>
    setHeld({ id, x: x.domain, y: y.domain, time: time.domain, amps: current.domain })
  const drag = (event: PointerEvent<SVGElement>, move: (at: Point) => void, id: HandleId) => {
    // The keyboard goes to the handle's range, which the press itself would take away again.
    event.preventDefault()
    actions.onSelect(id)
    focusRange(holder.current, id)
    grab(event, svg.current, {
      onStart: () => {
        hold(id)
        actions.onDragStart()
      },
      onMove: move,
      onEnd: () => {
        setHeld(null)
        actions.onDragEnd()
      },
      onCancel: () => {
        setHeld(null)
        actions.onDragCancel()
      },
    })
  }
  const onGrab = (event: PointerEvent<SVGElement>, id: HandleId) => {
    const handle = handles.find((one) => one.id === id)
    let offset: Point | null = null
    drag(
      event,
      (at) => {
        offset ??= { x: 0, y: 0 }
        put(id, { x: at.x - offset.x, y: at.y - offset.y })
      },
      id,
    )
    // The handle keeps its distance from the pointer instead of leaping under it.
    const start = svg.current?.getBoundingClientRect()
    if (handle !== undefined && start !== undefined) {
      offset = { x: event.clientX - start.left - handle.x, y: event.clientY - start.top - handle.y }
    }
  }
  const onGrabLine = (event: PointerEvent<SVGElement>) => {
    drag(
      event,
      (at) => {
        const edit = lineThrough(latest.current, at)
        if (edit !== null) actions.onEdit(edit)
      },
      'slope',
    )
  }

  const planeGestures: PanZoom = {
    onPan: (by) =>
      actions.onZoom({
        ...zoom,
        current: shift(x, kind, by.x),
        voltage: shift(y, 'linear', by.y),
      }),
    onZoom: (factor, about) =>
      actions.onZoom({
        ...zoom,
        current: magnify(x, kind, x.value(about.x), factor),
        voltage: magnify(y, 'linear', y.value(about.y), factor),
      }),
    onTap: (at) => {
      if (!placing || selected === null) return
      // A click names a point the load line is to pass through, not only how far along its handle lies.
      const edit =
        selected === 'slope' ? lineThrough(setting, at) : placeHandle(setting, selected, at)
      if (edit !== null) actions.onEdit(edit)
      actions.onPlaced()
    },
  }
  const traceGestures: PanZoom = {
    onPan: (by) => actions.onZoom({ ...zoom, time: shift(time, 'linear', by.x) }),
    onZoom: (factor, about) =>
      actions.onZoom({ ...zoom, time: magnify(time, 'linear', time.value(about.x), factor) }),
    onTap: () => {},
  }
  useGrabbableByTouch(svg)
  const planeHands = usePanZoom(svg, planeGround, planeGestures)
  const traceHands = usePanZoom(svg, traceGround, traceGestures)
  const { plane } = layout

  return (
    <div
      className={`plate ${layout.stacked ? 'stacked' : ''} ${placing ? 'placing' : ''}`}
      ref={holder}
    >
      <svg
        ref={svg}
        width={layout.width}
        height={layout.height}
        viewBox={`0 0 ${layout.width} ${layout.height}`}
        role="img"
        aria-label={props.summary}
      >
        <defs>
          <Clip id="plane-clip" box={plane} />
          <Clip id="trace-clip" box={layout.trace} />
          <Clip id="current-clip" box={layout.current} />
          <pattern
            id="hatch"
            width="9"
            height="9"
            patternUnits="userSpaceOnUse"
            patternTransform="rotate(45)"
          >
            <line className="hatch" x1="0" x2="0" y1="0" y2="9" />
          </pattern>
        </defs>
        <LeftAxis
          axis={y}
          box={plane}
          text={tickWriter}
          title="voltage across the capacitor, V"
          through={layout.stacked ? undefined : layout.trace}
        />
        {layout.stacked && (
          <LeftAxis
            axis={traceY}
            box={layout.trace}
            text={tickWriter}
            title="voltage across the capacitor, V"
          />
        )}
        <PlaneDrawing input={input} picture={picture} labels={labels} box={plane} />
        {props.overlay !== null && <ReadingsDrawing input={input} overlay={props.overlay} />}
        <TraceDrawing
          picture={waves}
          time={time}
          current={current}
          traceBox={layout.trace}
          currentBox={layout.current}
        />
        <LevelLines solution={solution} layout={layout} x={x} y={y} traceY={traceY} />
        <rect ref={planeGround} className="ground" data-ground="plane" {...plane} {...planeHands} />
        <rect
          ref={traceGround}
          className="ground"
          data-ground="trace"
          {...layout.trace}
          {...traceHands}
        />
        <g clipPath="url(#plane-clip)">
          <path
            className="load-line-target"
            d={picture.loadLine}
            data-grab="load-line"
            onPointerDown={onGrabLine}
          />
        </g>
        <HandleDots handles={handles} selected={selected} onGrab={onGrab} />
        <g className="markers">
          <g ref={planeDot} className="marker">
            <circle r="5" />
          </g>
          <g ref={traceDot} className="marker">
            <circle r="5" />
          </g>
          <g ref={currentDot} className="marker">
            <circle r="4" />
          </g>
        </g>
      </svg>
      <HandleInputs
        stage={stage}
        knotsFixed={knotsFixed}
        onSelect={actions.onSelect}
        onEdit={actions.onEdit}
        onStep={(id: HandleId, step: Step) => {
          const edit = stepHandle(setting, id, step)
          if (edit !== null) actions.onEdit(edit)
        }}
      />
      {props.children}
    </div>
  )
}

/** An even axis up a box. */
function upward(domain: Domain, box: Box, spacing: number): Axis {
  return linearAxis(domain, [bottomOf(box), box.y], spacing)
}

function Clip({ id, box }: { id: string; box: Box }) {
  return (
    <clipPath id={id}>
      <rect {...box} />
    </clipPath>
  )
}

/** Gives the keyboard to the range that stands for a handle, so that arrow keys go on from a drag. */
function focusRange(holder: HTMLElement | null, id: HandleId): void {
  holder?.querySelector<HTMLInputElement>(`[data-handle="${id}"]`)?.focus({ preventScroll: true })
}
