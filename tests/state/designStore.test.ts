import { describe, expect, it, vi } from 'vitest'
import type { Design } from '../../src/core'
import { createDesignStore } from '../../src/state/designStore'
import { examples } from '../../src/state/examples'
import { freshDesign } from '../../src/state/fresh'
import { mostSteps } from '../../src/state/history'

// The store lives without React: importing it would fail here if it did not.
vi.mock('react', () => {
  throw new Error('the store must not need React')
})

const other = (examples[1] as { design: Design }).design

/** A fresh store, how it is now, and how often it has spoken since. */
function openStore(first?: Design) {
  const store = createDesignStore(first)
  let calls = 0
  store.subscribe(() => {
    calls += 1
  })
  return { do: store.getState(), now: store.getState, calls: () => calls }
}

describe('the design store', () => {
  it('begins with a design that flashes and nothing to undo', () => {
    const store = openStore()
    expect(store.now()).toMatchObject({
      design: freshDesign,
      past: [],
      future: [],
      dragging: false,
      notice: null,
    })
  })

  it('changes parts of the stage and texts in one step, and keeps all else the very same', () => {
    const store = openStore()
    store.do.change({ supplyVoltage: 110, title: 'Spare beacon' })
    const { design, past } = store.now()
    expect(design.stage.supplyVoltage).toBe(110)
    expect(design.title).toBe('Spare beacon')
    expect(design.stage.lamp).toBe(freshDesign.stage.lamp)
    expect(past).toEqual([freshDesign])
  })

  it('moves numbers into their ranges and keeps the earlier one where none was given', () => {
    const store = openStore()
    store.do.change({ supplyVoltage: 1e9, seriesResistance: Number.NaN })
    expect(store.now().design.stage).toMatchObject({ supplyVoltage: 20e3, seriesResistance: 2.2e6 })
  })

  it('makes no step and wakes nobody where nothing changes', () => {
    const store = openStore()
    store.do.change({ supplyVoltage: freshDesign.stage.supplyVoltage })
    store.do.change({ lamp: structuredClone(freshDesign.stage.lamp) })
    store.do.rename(freshDesign.title)
    store.do.endDrag()
    store.do.cancelDrag()
    store.do.undo()
    store.do.redo()
    expect(store.calls()).toBe(0)
    expect(store.now().design).toBe(freshDesign)
  })

  it('undoes and redoes', () => {
    const store = openStore()
    store.do.rename('One')
    store.do.rename('Two')
    store.do.undo()
    expect(store.now()).toMatchObject({ design: { title: 'One' }, future: [{ title: 'Two' }] })
    store.do.undo()
    expect(store.now().design).toBe(freshDesign)
    store.do.redo()
    store.do.redo()
    expect(store.now()).toMatchObject({ design: { title: 'Two' }, future: [] })
  })

  it('counts a drag as one step', () => {
    const store = openStore()
    store.do.beginDrag()
    expect(store.now().dragging).toBe(true)
    for (let volts = 121; volts <= 140; volts += 1) store.do.change({ supplyVoltage: volts })
    store.do.endDrag()
    expect(store.now().dragging).toBe(false)
    expect(store.now().past).toHaveLength(1)
    store.do.undo()
    expect(store.now().design).toBe(freshDesign)
  })

  it('puts back what was before a drag that is cancelled', () => {
    const store = openStore()
    store.do.rename('Mine')
    store.do.undo()
    store.do.beginDrag()
    store.do.changeKnot(2, { current: 5e-5, voltage: 50 })
    store.do.cancelDrag()
    expect(store.now()).toMatchObject({ dragging: false, past: [], future: [{ title: 'Mine' }] })
    expect(store.now().design).toBe(freshDesign)
  })

  it('makes no step of a drag that comes back to where it began', () => {
    const store = openStore()
    store.do.beginDrag()
    store.do.change({ supplyVoltage: 99 })
    store.do.change({ supplyVoltage: 120 })
    store.do.endDrag()
    expect(store.now()).toMatchObject({ past: [], dragging: false })
    expect(store.now().design).toBe(freshDesign)
  })

  it('moves a knot no further than its neighbours let it, and the first not at all', () => {
    const store = openStore()
    store.do.changeKnot(1, { current: 1, voltage: 80 })
    expect(store.now().design.stage.lamp.knots[1]).toEqual({ current: 90e-6 / 1.02, voltage: 80 })
    const { past } = store.now()
    store.do.changeKnot(0, { current: 1, voltage: 1 })
    expect(store.now().past).toBe(past)
  })

  it('adds and removes knots, and says why where it cannot', () => {
    const store = openStore()
    store.do.addKnot(2)
    expect(store.now().design.stage.lamp.knots).toHaveLength(6)
    store.do.removeKnot(3)
    expect(store.now().design).toEqual(freshDesign)
    store.do.removeKnot(0)
    expect(store.now().notice).toContain('origin')
    for (let i = 0; i < 4; i += 1) store.do.removeKnot(1)
    expect(store.now().design.stage.lamp.knots).toHaveLength(2)
    expect(store.now().notice).toContain('two knots at least')
  })

  it('keeps the lamp and says why where a whole list of knots is none', () => {
    const store = openStore()
    store.do.change({ lamp: { ...freshDesign.stage.lamp, knots: [] } })
    expect(store.now().design).toBe(freshDesign)
    expect(store.now().notice).toContain('two knots at least')
  })

  it('falls silent once something is done, or when told to', () => {
    const store = openStore()
    store.do.say('The link was damaged.')
    expect(store.now().notice).toBe('The link was damaged.')
    store.do.rename('Next')
    expect(store.now().notice).toBeNull()
    store.do.say('Something.')
    store.do.say(null)
    expect(store.now().notice).toBeNull()
  })

  it('opens another design so that the earlier one can be undone to', () => {
    const store = openStore()
    store.do.rename('Mine')
    store.do.open(other, 'Opened from the link.')
    expect(store.now()).toMatchObject({ design: other, notice: 'Opened from the link.' })
    store.do.undo()
    expect(store.now().design.title).toBe('Mine')
  })

  it('ends a drag as a step of its own when another design is opened', () => {
    const store = openStore()
    store.do.beginDrag()
    store.do.change({ supplyVoltage: 99 })
    store.do.open(other)
    expect(store.now()).toMatchObject({ dragging: false, design: other })
    expect(store.now().past.map(({ stage }) => stage.supplyVoltage)).toEqual([120, 99])
  })

  it('starts a visit with a design and no steps', () => {
    const store = openStore()
    store.do.rename('Mine')
    store.do.startWith(other)
    expect(store.now()).toMatchObject({ design: other, past: [], future: [], notice: null })
  })

  it('keeps the latest steps only', () => {
    const store = openStore()
    for (let i = 0; i < mostSteps + 5; i += 1) store.do.rename(`Name ${i}`)
    expect(store.now().past).toHaveLength(mostSteps)
    expect(store.now().past[0]?.title).toBe('Name 4')
  })
})
