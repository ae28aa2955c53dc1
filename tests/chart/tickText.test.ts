import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Axis, currentAxis, type Domain, linearAxis, magnify } from '../../src/chart/axes'
import { planeDomain, timeDomain } from '../../src/chart/domains'
import { rightOf } from '../../src/chart/plateLayout'
import { axisWriting, tickWriter } from '../../src/chart/tickText'
import { traceOf } from '../../src/chart/traceOf'
import { formatQuantity, parseQuantity, type Stage, type Unit } from '../../src/core'
import { examples } from '../../src/state/examples'
import { byRatio, stages } from '../support/lampArbitrary'
import { drawingOf, extremeStages, planeOf, plateWidths } from './drawing'

/** Width of a digit of Source Sans 3 at 13 px: 0.497 em. Points and spaces are narrower. */
const characterWidth = 6.5

/** Expects the numbers along an axis to differ, and each to stand clear of the next. */
function expectReadable(axis: Axis, text: (value: number) => string): void {
  const labels = axis.ticks
    .filter((tick) => tick.labelled)
    .map((tick) => ({ at: tick.at, text: text(tick.value) }))
  expect(new Set(labels.map((label) => label.text)).size).toBe(labels.length)
  labels.slice(1).forEach((label, k) => {
    const before = labels[k]!
    const needed = (characterWidth * (label.text.length + before.text.length)) / 2 + 3
    expect(label.at - before.at, `${before.text} … ${label.text}`).toBeGreaterThan(needed)
  })
}

const exampleStages: readonly (readonly [string, Stage])[] = examples.map((example) => [
  example.id,
  example.design.stage,
])

describe('tickWriter', () => {
  it('writes bare numbers without the dust of binary fractions', () => {
    expect(tickWriter(0.1 + 0.2)).toBe('0.3')
    expect(tickWriter(20000)).toBe('20000')
    expect(tickWriter(0)).toBe('0')
    expect(tickWriter(-0)).toBe('0')
  })

  it('writes a minus sign, not a hyphen', () => {
    expect(tickWriter(-12.5)).toBe('−12.5')
  })
})

describe('axisWriting', () => {
  it('chooses one prefix for the whole axis, so that its numbers are short', () => {
    const written = (domain: Domain, unit: Unit, value: number) => {
      const { unit: title, text } = axisWriting(domain, unit)
      return `${text(value)} ${title}`
    }
    expect(written([0, 95e-6], 'A', 50e-6)).toBe('50 µA')
    expect(written([0, 0.9], 's', 0.2)).toBe('200 ms')
    expect(written([0, 9], 's', 2)).toBe('2 s')
    expect(written([0, 4e4], 's', 1e4)).toBe('10000 s')
    expect(written([0, 3e-9], 'A', 1e-9)).toBe('1 nA')
    expect(written([0, 3e-14], 'A', 1e-14)).toBe('10 fA')
  })

  it('writes numbers that are right with the unit in the title', () => {
    fc.assert(
      fc.property(
        byRatio(1e-14, 1e5),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.constantFrom<Unit>('A', 's'),
        (most, part, unit) => {
          const { unit: title, text } = axisWriting([0, most], unit)
          const value = part * most
          const read = parseQuantity(`${text(value)} ${title}`, unit)
          expect(read.ok && Math.abs(read.value - value)).toBeLessThanOrEqual(1e-6 * most)
        },
      ),
      { seed: 721, numRuns: 300 },
    )
  })

  it('keeps the numbers of an axis from zero within six characters', () => {
    fc.assert(
      fc.property(byRatio(1e-14, 1e5), (most) => {
        const axis = linearAxis([0, most], [0, 500], 80)
        const { text } = axisWriting(axis.domain, 'A')
        for (const { value } of axis.ticks) expect(text(value).length).toBeLessThanOrEqual(6)
      }),
      { seed: 722, numRuns: 300 },
    )
  })

  it('counts a short stretch far from zero from a round number, which it names', () => {
    const flash = axisWriting([1.23399, 1.234561], 's')
    expect(flash.unit).toBe('µs beyond 1.233\u00A0s')
    expect([1.234, 1.2342, 1.2344].map(flash.text)).toEqual(['1000', '1200', '1400'])
    expect(axisWriting([1.2, 1.3], 's').unit).toBe('ms')
  })

  it('writes zero where an axis has no length', () => {
    const { unit, text } = axisWriting([0, 0], 'A')
    expect(`${text(0)} ${unit}`).toBe('0 A')
  })
})

describe('the numbers along the axes, at every width of the plate', () => {
  const all = [...exampleStages, ...extremeStages]

  it.each(all)('are apart on the plane: %s', (_, stage) => {
    for (const width of plateWidths) {
      const { x: even } = planeOf(stage, 'linear', width)
      expectReadable(even, axisWriting(even.domain, 'A').text)
      const { x: uneven } = planeOf(stage, 'logarithmic', width)
      expectReadable(uneven, (value) => formatQuantity(value, 'A'))
    }
  })

  it.each(all)('are apart along the time: %s', (_, stage) => {
    for (const width of plateWidths) {
      const { solution, layout } = drawingOf(stage, 'linear', width)
      for (const span of ['cycles', 'flash', 'switch-on'] as const) {
        const domain = timeDomain(span, solution, traceOf(stage, solution, span).length)
        const time = linearAxis(domain, [layout.trace.x, rightOf(layout.trace)], 80)
        expectReadable(time, axisWriting(domain, 's').text)
      }
    }
  })

  it('are apart and differ on a plane magnified up to a hundred times', () => {
    fc.assert(
      fc.property(
        stages(),
        fc.constantFrom(...plateWidths),
        fc.double({ min: 0, max: 1, noNaN: true }),
        fc.constantFrom(2, 10, 100),
        (stage, width, part, factor) => {
          const { path, layout } = planeOf(stage, 'linear', width)
          const { plane } = layout
          for (const kind of ['linear', 'logarithmic'] as const) {
            const range = [plane.x, rightOf(plane)] as const
            const whole = currentAxis(kind, planeDomain(kind, stage, path), range)
            const about = whole.value(plane.x + part * plane.width)
            const x = currentAxis(kind, magnify(whole, kind, about, factor), range)
            const { text } = axisWriting(x.domain, 'A')
            expectReadable(x, kind === 'linear' ? text : (value) => formatQuantity(value, 'A'))
          }
        },
      ),
      { seed: 723, numRuns: 200 },
    )
  })

  it('are apart and differ along one flash, however short against the period', () => {
    fc.assert(
      fc.property(stages(), fc.constantFrom(...plateWidths), (stage, width) => {
        const { solution, layout } = drawingOf(stage, 'linear', width)
        const domain = timeDomain('flash', solution, traceOf(stage, solution, 'flash').length)
        // Where the flash lasts less than a ten-millionth of the period no number of eight figures tells.
        fc.pre(domain[1] - domain[0] > 1e-7 * domain[1])
        const time = linearAxis(domain, [layout.trace.x, rightOf(layout.trace)], 80)
        expectReadable(time, axisWriting(domain, 's').text)
      }),
      { seed: 724, numRuns: 120 },
    )
  })
})
