import { type HandleId, knotName, knotOf } from '../chart/handles'
import type { Knot } from '../core'
import { designStore, useDesign } from '../state/useDesign'
import { look, useView } from '../state/viewStore'
import { KnotCurrent, KnotVoltage } from './parts/KnotFields'
import { SeriesField, SupplyField } from './parts/PartFields'
import { useSolution } from './useSolution'

/** The handle last touched: its values to type, and a way to place it that needs no drag. */
export function HandleBar() {
  const selected = useView((view) => view.selected)
  const placing = useView((view) => view.placing)
  const knots = useDesign((state) => state.design.stage.lamp.knots)
  const { shifted } = useSolution()
  if (shifted && selected !== null && knotOf(selected) >= 0) {
    return (
      <div className="handle-bar empty">
        <p>The curve is drawn under the conditions set; its knots are moved with those off.</p>
      </div>
    )
  }
  if (selected === null || (knotOf(selected) >= 0 && knots[knotOf(selected)] === undefined)) {
    return (
      <div className="handle-bar empty">
        <p>
          Drag the load line, its supply end or a knot of the lamp. Each can also be chosen with Tab
          and moved with the arrow keys.
        </p>
      </div>
    )
  }
  const name =
    selected === 'supply'
      ? 'Supply end'
      : selected === 'slope'
        ? 'Slope of the load line'
        : knotName(knots, knotOf(selected))
  return (
    <div className="handle-bar">
      <h3>{name}</h3>
      <HandleFields id={selected} />
      <button
        type="button"
        className={placing ? 'button pressed' : 'button'}
        aria-pressed={placing}
        onClick={() => look({ placing: !placing })}
      >
        {placing ? 'Now click on the plane' : 'Place with a click'}
      </button>
    </div>
  )
}

function HandleFields({ id }: { id: HandleId }) {
  const knots = useDesign((state) => state.design.stage.lamp.knots)
  if (id === 'supply') return <SupplyField quiet />
  if (id === 'slope') return <SeriesField quiet />
  const index = knotOf(id)
  const knot = knots[index]
  if (knot === undefined) return null
  const onKnot = (moved: Knot) => designStore.getState().changeKnot(index, moved)
  return (
    <>
      <KnotVoltage knot={knot} onKnot={onKnot} />
      <KnotCurrent knot={knot} onKnot={onKnot} />
    </>
  )
}
