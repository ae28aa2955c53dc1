import { createStore, type StoreApi } from 'zustand/vanilla'
import {
  type Design,
  designWithLamp,
  detailsOf,
  type Knot,
  type LampDetails,
  type LampRecord,
  lampTurned,
  type Stage,
} from '../core'
import { constrainDesign, problemWithKnots } from './constrain'
import { freshDesign } from './fresh'
import { begin, cancel, commit, type History, record, redo, startHistory, undo } from './history'
import { dropKnot, insertKnot, moveKnot } from './knots'
import { sameData, shareUnchanged } from './shareUnchanged'

/** New values for some parts of a stage, and for the texts around it. */
export type DesignPatch = Partial<Stage> &
  Partial<Omit<Design, 'stage' | 'lampDetails'>> & {
    /** Parts of what is known of the lamp besides. */
    readonly lampDetails?: Partial<LampDetails>
  }

/** The design on the page, how it came to be, and all that can be done to it. */
export type DesignState = {
  readonly design: Design
  readonly past: readonly Design[]
  readonly future: readonly Design[]
  /** Whether a drag is under way: until it ends, all changes are one step. */
  readonly dragging: boolean
  /** A sentence about what could not be done, or how something was opened; null if none. */
  readonly notice: string | null

  /** Changes parts of the stage or the texts; numbers are moved into their ranges. */
  readonly change: (patch: DesignPatch) => void
  /** Moves a knot as far as its neighbours let it; the first stays. */
  readonly changeKnot: (index: number, knot: Knot) => void
  /** Adds a knot after `index`, on the characteristic; after the last, beyond it. */
  readonly addKnot: (index: number) => void
  readonly removeKnot: (index: number) => void
  readonly rename: (title: string) => void
  /** Puts another lamp into the design. */
  readonly fitLamp: (record: LampRecord) => void
  /** Turns a lamp that differs by polarity round in its holder. */
  readonly turnLamp: () => void

  readonly beginDrag: () => void
  readonly endDrag: () => void
  /** Ends a drag and puts back what was before it. */
  readonly cancelDrag: () => void
  readonly undo: () => void
  readonly redo: () => void

  /** Puts a design on the page that was read from elsewhere; the one before can be undone to. */
  readonly open: (design: Design, notice?: string) => void
  /** Puts a design on the page and forgets all steps: for the start of a visit. */
  readonly startWith: (design: Design, notice?: string) => void
  /** Says something to the person, or with null falls silent. */
  readonly say: (notice: string | null) => void
}

type Kept = Pick<DesignState, 'design' | 'past' | 'future' | 'dragging' | 'notice'> & {
  /** The design when the drag began. */
  readonly beforeDrag: Design | null
}

/** A store of its own, with no page around it: what keeps, links and draws is wired elsewhere. */
export function createDesignStore(first: Design = freshDesign): StoreApi<DesignState> {
  return createStore<DesignState & Kept>()((set, get) => {
    const moveOn = (next: History<Design>, notice: string | null = null) => {
      const state = get()
      const changed = next.present !== state.design
      const nothing = !changed && next.past === state.past && next.before === state.beforeDrag
      if (!nothing || notice !== null)
        set({ ...fromHistory(next), notice: notice ?? (changed ? null : state.notice) })
    }
    const change = (wanted: Design, notice: string | null = null) => {
      const { design } = get()
      const next = shareUnchanged(design, constrainDesign(wanted, design))
      moveOn(record(toHistory(get()), next, sameData), notice)
    }
    const changeKnots = (knots: readonly Knot[]) => {
      const { design } = get()
      change({ ...design, stage: { ...design.stage, lamp: { ...design.stage.lamp, knots } } })
    }
    const knotsNow = () => get().design.stage.lamp.knots

    return {
      ...fromHistory(startHistory(first)),
      notice: null,
      change: ({ title, note, lampName, lampDetails, ...stage }) => {
        const { design } = get()
        change(
          {
            title: title ?? design.title,
            note: note ?? design.note,
            lampName: lampName ?? design.lampName,
            stage: { ...design.stage, ...stage },
            ...(lampDetails === undefined && design.lampDetails === undefined
              ? {}
              : { lampDetails: { ...detailsOf(design), ...lampDetails } }),
          },
          stage.lamp ? problemWithKnots(stage.lamp.knots) : null,
        )
      },
      changeKnot: (index, knot) => changeKnots(moveKnot(knotsNow(), index, knot)),
      addKnot: (index) => {
        const added = insertKnot(knotsNow(), index)
        if (added.ok) changeKnots(added.knots)
        else set({ notice: added.message })
      },
      removeKnot: (index) => {
        const removed = dropKnot(knotsNow(), index)
        if (removed.ok) changeKnots(removed.knots)
        else set({ notice: removed.message })
      },
      fitLamp: (record) => {
        const problem = problemWithKnots(record.knots)
        if (problem === null) change(designWithLamp(get().design, record))
        else set({ notice: problem })
      },
      turnLamp: () => change(lampTurned(get().design)),
      rename: (title) => change({ ...get().design, title }),
      beginDrag: () => moveOn(begin(toHistory(get()))),
      endDrag: () => moveOn(commit(toHistory(get()), sameData)),
      cancelDrag: () => moveOn(cancel(toHistory(get()))),
      undo: () => moveOn(undo(toHistory(get()), sameData)),
      redo: () => moveOn(redo(toHistory(get()), sameData)),
      open: (design, notice) => {
        const closed = commit(toHistory(get()), sameData)
        moveOn(record(closed, shareUnchanged(closed.present, design), sameData), notice ?? null)
      },
      startWith: (design, notice) =>
        set({ ...fromHistory(startHistory(design)), notice: notice ?? null }),
      say: (notice) => set({ notice }),
    }
  })
}

function toHistory({ past, design, future, beforeDrag }: Kept): History<Design> {
  return { past, present: design, future, before: beforeDrag }
}

function fromHistory({ past, present, future, before }: History<Design>) {
  return { past, design: present, future, beforeDrag: before, dragging: before !== null }
}
