/** What was, is and will be again; while something is dragged, also where the drag began. */
export type History<T> = {
  /** Earlier states, the latest last; at most `mostSteps`. */
  readonly past: readonly T[]
  readonly present: T
  /** Undone states, the next to come back first. */
  readonly future: readonly T[]
  /** What was present when a drag began; null while nothing is dragged. */
  readonly before: T | null
}

/** Whether two states are one and the same to a person. */
export type Same<T> = (one: T, other: T) => boolean

/** Most steps that can be undone; the oldest are forgotten. */
export const mostSteps = 200

/** A history that begins here. */
export function startHistory<T>(present: T): History<T> {
  return { past: [], present, future: [], before: null }
}

/** Moves on to another state: one step, or part of the step of the drag that is under way. */
export function record<T>(history: History<T>, next: T, same: Same<T>): History<T> {
  if (same(history.present, next)) return history
  if (history.before !== null) return { ...history, present: next }
  return step(history, history.present, next)
}

/** Begins a drag: from here to `commit` all is one step. Within a drag it changes nothing. */
export function begin<T>(history: History<T>): History<T> {
  return history.before === null ? { ...history, before: history.present } : history
}

/** Ends a drag; no step if all is as it was when it began. Without a drag it changes nothing. */
export function commit<T>(history: History<T>, same: Same<T>): History<T> {
  const { before, present } = history
  if (before === null) return history
  const closed = { ...history, before: null }
  return same(before, present) ? { ...closed, present: before } : step(closed, before, present)
}

/** Ends a drag and puts back what was before it. Without a drag it changes nothing. */
export function cancel<T>(history: History<T>): History<T> {
  return history.before === null ? history : { ...history, present: history.before, before: null }
}

/** One step back, a drag under way counting as the last step; the same history at the beginning. */
export function undo<T>(history: History<T>, same: Same<T>): History<T> {
  const closed = commit(history, same)
  const previous = closed.past.at(-1)
  if (previous === undefined) return closed
  return {
    past: closed.past.slice(0, -1),
    present: previous,
    future: [closed.present, ...closed.future],
    before: null,
  }
}

/** One step forward again; the same history where nothing was undone. */
export function redo<T>(history: History<T>, same: Same<T>): History<T> {
  const closed = commit(history, same)
  const [next, ...future] = closed.future
  if (next === undefined) return closed
  return { past: [...closed.past, closed.present], present: next, future, before: null }
}

function step<T>(history: History<T>, from: T, to: T): History<T> {
  const past = [...history.past, from].slice(-mostSteps)
  return { past, present: to, future: [], before: null }
}
