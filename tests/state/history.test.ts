import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import {
  begin,
  cancel,
  commit,
  type History,
  mostSteps,
  record,
  redo,
  startHistory,
  undo,
} from '../../src/state/history'

const same = Object.is
const at = (history: History<number>) => history.present

/** A history that went through these numbers. */
function through(first: number, ...rest: readonly number[]): History<number> {
  return rest.reduce((history, next) => record(history, next, same), startHistory(first))
}

describe('history', () => {
  it('goes back and forward one step at a time, and stays at either end', () => {
    const back = undo(undo(through(1, 2, 3), same), same)
    expect(at(back)).toBe(1)
    expect(undo(back, same)).toBe(back)
    const forward = redo(redo(back, same), same)
    expect(forward).toEqual(through(1, 2, 3))
    expect(redo(forward, same)).toBe(forward)
  })

  it('makes no step where nothing changed', () => {
    const history = through(1, 2)
    expect(record(history, 2, same)).toBe(history)
  })

  it('forgets what was undone once something else is done', () => {
    const other = record(undo(through(1, 2, 3), same), 9, same)
    expect(other).toEqual({ past: [1, 2], present: 9, future: [], before: null })
  })

  it('counts a whole drag as one step', () => {
    let history = begin(through(1, 2))
    for (const value of [3, 4, 5]) history = record(history, value, same)
    expect(history.past).toEqual([1])
    history = commit(history, same)
    expect(history).toEqual({ past: [1, 2], present: 5, future: [], before: null })
    expect(at(undo(history, same))).toBe(2)
  })

  it('makes no step of a drag that ends where it began, and keeps what was undone', () => {
    const start = undo(through(1, 2, 3), same)
    const ended = commit(record(record(begin(start), 7, same), 2, same), same)
    expect(ended).toEqual(start)
  })

  it('puts back what was before a drag that is cancelled', () => {
    const start = undo(through(1, 2, 3), same)
    expect(cancel(record(begin(start), 7, same))).toEqual(start)
  })

  it('takes a second begin, and an end without one, for nothing', () => {
    const history = through(1, 2)
    const dragged = record(begin(history), 3, same)
    expect(begin(dragged)).toBe(dragged)
    expect(commit(history, same)).toBe(history)
    expect(cancel(history)).toBe(history)
  })

  it('undoes a drag under way as one step, which can be redone', () => {
    const undone = undo(record(begin(through(1, 2)), 3, same), same)
    expect(at(undone)).toBe(2)
    expect(undone.before).toBeNull()
    expect(at(redo(undone, same))).toBe(3)
  })

  it('forgets the oldest steps beyond the most it keeps', () => {
    const history = through(...(Array.from({ length: mostSteps + 50 }, (_, i) => i) as [number]))
    expect(history.past).toHaveLength(mostSteps)
    expect(history.past[0]).toBe(49)
    expect(mostSteps).toBe(200)
  })

  it('comes back to the first state by undoing, and to the last by redoing, whatever was done', () => {
    const anyAct = fc.oneof(
      fc.integer({ min: 0, max: 9 }),
      fc.constantFrom(
        'begin' as const,
        'commit' as const,
        'cancel' as const,
        'undo' as const,
        'redo' as const,
      ),
    )
    fc.assert(
      fc.property(fc.array(anyAct, { maxLength: 60 }), (acts) => {
        let history = startHistory(-1)
        for (const act of acts) {
          if (typeof act === 'number') history = record(history, act, same)
          else if (act === 'begin') history = begin(history)
          else if (act === 'cancel') history = cancel(history)
          else history = { commit, undo, redo }[act](history, same)
        }
        const closed = commit(history, same)
        const steps = [...closed.past, closed.present, ...closed.future]
        // Neighbouring steps always differ.
        for (let i = 1; i < steps.length; i += 1) expect(steps[i]).not.toBe(steps[i - 1])
        let back = closed
        while (back.past.length > 0) back = undo(back, same)
        expect(at(back)).toBe(-1)
        let forward = back
        while (forward.future.length > 0) forward = redo(forward, same)
        expect(at(forward)).toBe(steps.at(-1))
        expect([...forward.past, forward.present]).toEqual(steps)
      }),
      { seed: 81, numRuns: 500 },
    )
  })
})
