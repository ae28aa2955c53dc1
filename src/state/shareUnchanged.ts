/**
 * `next`, with every part that equals its counterpart in `before` replaced by that very part, and
 * `before` itself where all is equal: what looks at one part sees at a glance that it is the same.
 * For plain data: numbers, texts, lists and objects of them.
 */
export function shareUnchanged<T>(before: T, next: T): T {
  if (Object.is(before, next)) return before
  if (!isTree(before) || !isTree(next) || Array.isArray(before) !== Array.isArray(next)) return next
  const keys = Object.keys(next)
  const shared: [string, unknown][] = keys.map((key) => [
    key,
    shareUnchanged(before[key], next[key]),
  ])
  const same =
    keys.length === Object.keys(before).length &&
    shared.every(([key, part]) => Object.hasOwn(before, key) && Object.is(part, before[key]))
  if (same) return before
  return (Array.isArray(next) ? shared.map(([, part]) => part) : Object.fromEntries(shared)) as T
}

/** Whether two pieces of plain data are equal throughout. */
export function sameData<T>(one: T, other: T): boolean {
  return shareUnchanged(one, other) === one || Object.is(one, other)
}

function isTree(value: unknown): value is Readonly<Record<string, unknown>> {
  return typeof value === 'object' && value !== null
}
