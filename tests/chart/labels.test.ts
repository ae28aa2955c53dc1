import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Label, labelBox, placeLabels } from '../../src/chart/labels'

const bounds = { left: 0, right: 400, top: 0, bottom: 200 }

const label = (id: string, x: number, y: number, more: Partial<Label> = {}): Label => ({
  id,
  text: 'knee',
  places: [{ x, y, anchor: 'start' }],
  ...more,
})

type Box = ReturnType<typeof labelBox>
const meet = (a: Box, b: Box) =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom

const anyLabel = (index: number) =>
  fc.record({
    id: fc.constant(`label-${index}`),
    text: fc.string({ minLength: 1, maxLength: 24 }),
    places: fc.array(
      fc.record({
        x: fc.integer({ min: -40, max: 440 }),
        y: fc.integer({ min: -20, max: 220 }),
        anchor: fc.constantFrom('start' as const, 'middle' as const, 'end' as const),
      }),
      { maxLength: 6 },
    ),
    optional: fc.boolean(),
  })

const anyLabels = fc.tuple(...Array.from({ length: 10 }, (_, k) => anyLabel(k)))
const anySpots = fc.array(
  fc.tuple(fc.integer({ min: 0, max: 380 }), fc.integer({ min: 0, max: 180 })).map(([x, y]) => ({
    left: x,
    right: x + 20,
    top: y,
    bottom: y + 20,
  })),
  { maxLength: 20 },
)

describe('labelBox', () => {
  it('stands to the right of a start, to the left of an end and about a middle', () => {
    const at = { x: 100, y: 50 }
    const start = labelBox('valley', { ...at, anchor: 'start' })
    const middle = labelBox('valley', { ...at, anchor: 'middle' })
    const end = labelBox('valley', { ...at, anchor: 'end' })
    expect(start.left).toBe(100)
    expect(end.right).toBe(100)
    expect((middle.left + middle.right) / 2).toBeCloseTo(100, 9)
    for (const box of [start, middle, end]) {
      expect(box.right - box.left).toBeCloseTo(start.right - start.left, 9)
      expect(box.top).toBeLessThan(50)
      expect(box.bottom).toBeGreaterThan(50)
    }
  })

  it('grows with the text', () => {
    const width = (text: string) => {
      const { left, right } = labelBox(text, { x: 0, y: 0, anchor: 'start' })
      return right - left
    }
    expect(width('load line')).toBeGreaterThan(width('load'))
  })
})

describe('placeLabels', () => {
  it('takes the first place of each that is free', () => {
    const second = label('b', 12, 50, {
      places: [
        { x: 12, y: 50, anchor: 'start' },
        { x: 200, y: 50, anchor: 'start' },
        { x: 300, y: 50, anchor: 'start' },
      ],
    })
    const placed = placeLabels([label('a', 10, 50), second], bounds)
    expect(placed.map(({ id, x }) => [id, x])).toEqual([
      ['a', 10],
      ['b', 200],
    ])
  })

  it('lets a name that must stand cross a curve, and leaves out one that need not', () => {
    const curve = [{ left: 0, right: 400, top: 40, bottom: 60 }]
    const must = label('must', 10, 50)
    const may = label('may', 100, 50, { optional: true })
    expect(placeLabels([may, must], bounds, curve).map(({ id }) => id)).toEqual(['must'])
  })

  it('leaves out what has no place within the bounds', () => {
    expect(placeLabels([label('a', 390, 50), label('b', 10, 5)], bounds)).toEqual([])
    expect(placeLabels([label('a', 0, 0, { places: [] })], bounds)).toEqual([])
  })

  it('never lets names overlap or leave the bounds, whatever is asked', () => {
    fc.assert(
      fc.property(anyLabels, anySpots, (labels, taken) => {
        const placed = placeLabels(labels, bounds, taken)
        const boxes = placed.map((one) => labelBox(one.text, one))
        boxes.forEach((box, k) => {
          expect(box.left >= 0 && box.right <= 400 && box.top >= 0 && box.bottom <= 200).toBe(true)
          expect(boxes.slice(k + 1).some((other) => meet(box, other))).toBe(false)
        })
      }),
      { seed: 761, numRuns: 300 },
    )
  })

  it('never stands an optional name on a curve', () => {
    fc.assert(
      fc.property(anyLabels, anySpots, (labels, taken) => {
        const optional = new Set<string>(labels.filter((one) => one.optional).map((one) => one.id))
        for (const one of placeLabels(labels, bounds, taken)) {
          if (!optional.has(one.id)) continue
          expect(taken.some((spot) => meet(labelBox(one.text, one), spot))).toBe(false)
        }
      }),
      { seed: 762, numRuns: 300 },
    )
  })

  it('places each at one of its own places, in the order given, and none that has a free one is left out', () => {
    fc.assert(
      fc.property(anyLabels, (labels) => {
        const placed = placeLabels(labels, bounds)
        const order = placed.map(({ id }) => labels.findIndex((one) => one.id === id))
        expect(order).toEqual([...order].sort((a, b) => a - b))
        for (const { id, text, ...place } of placed) {
          const asked = labels.find((one) => one.id === id)!
          expect(asked.text).toBe(text)
          expect(asked.places).toContainEqual(place)
        }
        const boxes = placed.map((one) => labelBox(one.text, one))
        for (const one of labels) {
          if (placed.some(({ id }) => id === one.id)) continue
          for (const place of one.places) {
            const box = labelBox(one.text, place)
            const outside = box.left < 0 || box.right > 400 || box.top < 0 || box.bottom > 200
            expect(outside || boxes.some((other) => meet(box, other))).toBe(true)
          }
        }
      }),
      { seed: 763, numRuns: 200 },
    )
  })
})
