import type { PlainData } from '../../core'

/** Most values, and deepest nesting, of a lamp's measured data: a sweep of 10⁵ rows passes. */
export const plainDataLimits = { values: 2_000_000, depth: 12 } as const

/** Keys that would reach an object's prototype when copied carelessly. */
const refusedKeys: ReadonlySet<string> = new Set(['__proto__', 'constructor', 'prototype'])

/** Says what keeps a value from being plain data that JSON holds unchanged; null when nothing does. */
export function faultInPlainData(value: unknown): string | null {
  // By a list of what is left to look into: nesting without end must not overflow the stack.
  const left: { readonly inside: object; readonly depth: number }[] = []
  let seen = 0
  const look = (inner: unknown, depth: number): string | null => {
    seen++
    if (seen > plainDataLimits.values) return 'there is too much of it'
    if (depth > plainDataLimits.depth) return 'it is nested too deeply'
    const fault = faultInOne(inner)
    if (fault === null && typeof inner === 'object' && inner !== null) {
      left.push({ inside: inner, depth: depth + 1 })
    }
    return fault
  }
  const first = look(value, 0)
  if (first !== null) return first
  for (let next = left.pop(); next !== undefined; next = left.pop()) {
    const { inside, depth } = next
    const isList = Array.isArray(inside)
    const inners: readonly unknown[] = isList ? inside : Object.values(inside)
    const key = isList ? undefined : Object.keys(inside).find((name) => refusedKeys.has(name))
    if (key !== undefined) return `it has a field called “${key}”`
    for (const inner of inners) {
      const fault = look(inner, depth)
      if (fault !== null) return fault
    }
  }
  return null
}

function faultInOne(value: unknown): string | null {
  if (value === null || typeof value === 'string' || typeof value === 'boolean') return null
  if (typeof value === 'number') return Number.isFinite(value) ? null : 'a number in it is none'
  if (typeof value !== 'object') return 'it holds something other than text and numbers'
  if (Array.isArray(value)) return null
  const prototype = Object.getPrototypeOf(value)
  return prototype === Object.prototype || prototype === null
    ? null
    : 'it holds something other than text and numbers'
}

/** Whether a value is plain data. */
export function isPlainData(value: unknown): value is PlainData {
  return faultInPlainData(value) === null
}
