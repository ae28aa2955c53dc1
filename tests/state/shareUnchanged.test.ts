import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { sameData, shareUnchanged } from '../../src/state/shareUnchanged'
import { anyDesign } from '../io/any-design'

describe('shareUnchanged', () => {
  it('hands back the very same data where all is equal', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        expect(shareUnchanged(design, structuredClone(design))).toBe(design)
      }),
      { seed: 82, numRuns: 100 },
    )
  })

  it('equals what was wanted, and keeps each part that did not change', () => {
    fc.assert(
      fc.property(anyDesign, anyDesign, (before, other) => {
        const next = { ...structuredClone(before), title: other.title, stage: other.stage }
        expect(shareUnchanged(before, next)).toStrictEqual(next)
      }),
      { seed: 83, numRuns: 100 },
    )
    const before = { a: { deep: [1, 2] }, b: { deep: [3] } }
    const next = shareUnchanged(before, { a: { deep: [1, 2] }, b: { deep: [4] } })
    expect(next.a).toBe(before.a)
    expect(next.b).toEqual({ deep: [4] })
  })

  it('sees a part added, left out, or of another kind', () => {
    expect(shareUnchanged<object>({ a: 1 }, { a: 1, b: 2 })).toEqual({ a: 1, b: 2 })
    expect(shareUnchanged<object>({ a: 1, b: 2 }, { a: 1 })).toEqual({ a: 1 })
    expect(shareUnchanged<object>({ a: undefined }, { b: undefined })).toEqual({ b: undefined })
    expect(shareUnchanged<object>([], {})).toEqual({})
    expect(shareUnchanged<unknown>([1, 2], [1])).toEqual([1])
    expect(shareUnchanged<unknown>({ a: 1 }, null)).toBeNull()
  })
})

describe('sameData', () => {
  it('compares throughout', () => {
    expect(sameData({ a: [1, { b: Number.NaN }] }, { a: [1, { b: Number.NaN }] })).toBe(true)
    expect(sameData({ a: [1, { b: 2 }] }, { a: [1, { b: 3 }] })).toBe(false)
  })
})
