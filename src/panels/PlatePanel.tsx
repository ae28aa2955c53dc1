import { type RefObject, useMemo, useRef } from 'react'
import { heldBack, isRise, shownBrightness } from '../chart/lampLight'
import { Plate, type PlateActions, wholeView } from '../chart/Plate'
import { traceOf } from '../chart/traceOf'
import { formatQuantity } from '../core'
import { useReadings } from '../state/readingsStore'
import { designStore } from '../state/useDesign'
import { look, useView, viewStore } from '../state/viewStore'
import { HandleBar } from './HandleBar'
import { PlayBar } from './PlayBar'
import { Choice } from './parts/Choice'
import { cornerBeside, speedFor } from './speeds'
import { useSolution } from './useSolution'
import { verdictWords } from './words/verdictWords'
import { zoomPlane, zoomTime } from './zooming'

/** The picture: plane and trace, and what goes with them. */
export function PlatePanel({ glow }: { glow: RefObject<SVGGElement | null> }) {
  const { stage, solution, shifted } = useSolution()
  const view = useView((state) => state)
  const overlay = useReadings((state) => state.sweepShown)
  const { span } = view
  const trace = useMemo(() => traceOf(stage, solution, span), [stage, solution, span])
  const period = solution.cycle?.period ?? null
  const speed = view.speed ?? speedFor(period ?? trace.length / 4)
  const clock = useRef<HTMLOutputElement>(null)
  const now = useRef(0)
  const brightness = useRef(0)
  const risenAt = useRef(Number.NEGATIVE_INFINITY)

  const light = useRef({ speed, period })
  light.current = { speed, period }
  const actions = useMemo<PlateActions>(() => {
    const store = designStore.getState()
    return {
      onEdit: (edit) => {
        if (edit.kind === 'supply') store.change({ supplyVoltage: edit.voltage })
        else if (edit.kind === 'series') store.change({ seriesResistance: edit.resistance })
        else store.changeKnot(edit.index, edit.knot)
      },
      onDragStart: store.beginDrag,
      onDragEnd: store.endDrag,
      onDragCancel: store.cancelDrag,
      onSelect: (selected) => look({ selected }),
      onZoom: (zoom) => look({ zoom }),
      onPlaced: () => look({ placing: false }),
      onTick: (time, elapsed, lit) => {
        now.current = time
        const shown = light.current
        const running = viewStore.getState().running
        const rate = shown.period === null || !running ? 0 : shown.speed / shown.period
        const wanted = running
          ? shownBrightness(brightness.current, lit, elapsed / shown.speed, rate)
          : Number(lit)
        const since = (performance.now() - risenAt.current) / 1000
        const next = heldBack(brightness.current, wanted, since)
        if (isRise(brightness.current, next)) risenAt.current = performance.now()
        brightness.current = next
        if (glow.current !== null) glow.current.style.opacity = brightness.current.toFixed(2)
        if (clock.current !== null) {
          clock.current.textContent = formatQuantity(time, 's', { figures: 3, keepZeros: true })
        }
      },
    }
  }, [glow])
  const words = verdictWords(stage, solution)

  return (
    <section className="plate-panel" aria-label="Plane and trace">
      <div className="plate-tools">
        <div>
          <Choice
            name="Current axis"
            value={view.currentAxis}
            options={[
              ['logarithmic', 'Logarithmic'],
              ['linear', 'Linear'],
            ]}
            onChoose={(currentAxis) =>
              look({ currentAxis, zoom: { ...viewStore.getState().zoom, current: null } })
            }
          />
          <ZoomButtons
            of="plane"
            onZoom={(factor) =>
              look({ zoom: zoomPlane(view.zoom, view.currentAxis, stage, factor) })
            }
            onWhole={() => look({ zoom: { ...view.zoom, current: null, voltage: null } })}
            zoomed={view.zoom.current !== null || view.zoom.voltage !== null}
          />
        </div>
        <div>
          <Choice
            name="Time"
            value={solution.cycle === null ? 'switch-on' : span}
            options={
              solution.cycle === null
                ? [['switch-on', 'From switch-on']]
                : [
                    ['cycles', 'Cycles'],
                    ['flash', 'One flash'],
                    ['switch-on', 'From switch-on'],
                  ]
            }
            onChoose={(value) =>
              look({ span: value, zoom: { ...viewStore.getState().zoom, time: null } })
            }
          />
          <ZoomButtons
            of="time"
            onZoom={(factor) => look({ zoom: zoomTime(view.zoom, span, solution, trace, factor) })}
            onWhole={() => look({ zoom: { ...view.zoom, time: null } })}
            zoomed={view.zoom.time !== null}
          />
        </div>
      </div>
      <Plate
        stage={stage}
        solution={solution}
        trace={trace}
        kind={view.currentAxis}
        span={span}
        zoom={view.zoom ?? wholeView}
        choice={view.choice}
        knotsFixed={shifted}
        overlay={overlay}
        selected={view.selected}
        placing={view.placing}
        playing={{ running: view.running, speed }}
        cursor={view.cursor}
        actions={actions}
        summary={`Plane and trace. ${words.verdict}${words.sentence}`}
      >
        <div className="under-plane">
          <HandleBar />
          <PlayBar
            speed={speed}
            clock={clock}
            onStep={(way) =>
              look({
                running: false,
                cursor: { time: cornerBeside(trace.phases, now.current, way) },
              })
            }
          />
        </div>
      </Plate>
    </section>
  )
}

function ZoomButtons(props: {
  of: 'plane' | 'time'
  onZoom: (factor: number) => void
  onWhole: () => void
  zoomed: boolean
}) {
  return (
    <span className="zoom-buttons">
      <button
        type="button"
        className="button icon"
        aria-label={`Zoom the ${props.of} out`}
        onClick={() => props.onZoom(1 / 1.5)}
      >
        −
      </button>
      <button
        type="button"
        className="button icon"
        aria-label={`Zoom the ${props.of} in`}
        onClick={() => props.onZoom(1.5)}
      >
        +
      </button>
      <button
        type="button"
        className="button"
        aria-label={`Show all of the ${props.of}`}
        disabled={!props.zoomed}
        onClick={props.onWhole}
      >
        all
      </button>
    </span>
  )
}
