import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { labelBox } from '../../src/chart/labels'
import { planeLabels } from '../../src/chart/planeLabels'
import { planePicture } from '../../src/chart/planePicture'
import type { Stage } from '../../src/core'
import { examples } from '../../src/state/examples'
import { stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'
import { anyStage, cornersOf, drawingOf, extremeStages, kinds, plateWidths } from './drawing'

const anyKind = fc.constantFrom(...kinds)
const anyWidth = fc.constantFrom(...plateWidths)

function labelled(stage: Stage, kind: (typeof kinds)[number], width?: number) {
  const input = drawingOf(stage, kind, width)
  const picture = planePicture(input)
  return { ...input, picture, labels: planeLabels(input, picture) }
}

type Box = ReturnType<typeof labelBox>
const meet = (a: Box, b: Box) =>
  a.left < b.right && b.left < a.right && a.top < b.bottom && b.top < a.bottom

function expectApart({ labels, x, y }: ReturnType<typeof labelled>): void {
  const boxes = labels.map((label) => labelBox(label.text, label))
  boxes.forEach((box, k) => {
    const out =
      box.left < x.range[0] ||
      box.right > x.range[1] ||
      box.bottom > y.range[0] ||
      box.top < y.range[1]
    expect(out, labels[k]!.text).toBe(false)
    const covered = labels.filter((_, n) => n > k && meet(box, boxes[n]!))
    expect(covered.map(({ text }) => `${text} on ${labels[k]!.text}`)).toEqual([])
  })
}

const textOf = (labels: readonly { id: string; text: string }[], id: string) =>
  labels.find((label) => label.id === id)?.text.replaceAll('\u00A0', ' ')

describe('planeLabels', () => {
  it('never overlap one another nor leave the plane, whatever the stage, axis and width', () => {
    fc.assert(
      fc.property(fc.oneof(stages(), anyStage), anyKind, anyWidth, (stage, kind, width) => {
        expectApart(labelled(stage, kind, width))
      }),
      { seed: 811, numRuns: 150 },
    )
  })

  it.each(extremeStages)('stand apart at the ends of what a design allows: %s', (_, stage) => {
    for (const kind of kinds)
      for (const width of plateWidths) expectApart(labelled(stage, kind, width))
  })

  it('name knee, valley, load line, supply, both edges and the region of a flasher on a wide plate', () => {
    const { labels } = labelled(examples[0]!.design.stage, 'logarithmic')
    expect(textOf(labels, 'lamp-knee')).toBe('knee')
    expect(textOf(labels, 'lamp-valley')).toBe('valley')
    expect(textOf(labels, 'load-line')).toBe('load line, 2.2 MΩ')
    expect(textOf(labels, 'load-supply')).toBe('supply 120 V')
    expect(textOf(labels, 'edge-dark')).toBe('dark above 225 MΩ')
    // (120 V − 55 V)/90 µA less 1600 Ω of source resistance; (120 V − 75 V)/0.2 µA.
    expect(textOf(labels, 'edge-lit')).toBe('lit below 721 kΩ')
    expect(textOf(labels, 'edge-region')).toBe('flashes within')
  })

  it.each(examples.map((example) => [example.id, example.design.stage] as const))(
    'name the load line and the supply on pages of 390 px and more: %s',
    (_, stage) => {
      for (const kind of kinds) {
        for (const width of plateWidths.filter((one) => one > 300)) {
          const ids = labelled(stage, kind, width).labels.map(({ id }) => id)
          expect(ids).toContain('load-line')
          expect(ids).toContain('load-supply')
        }
      }
    },
  )

  it('say where each rest is, and that there is none on the falling region', () => {
    const latch = stageOf({ supplyVoltage: 74, seriesResistance: 100e3 })
    const texts = labelled(latch, 'logarithmic').labels.map(({ text }) => text)
    expect(texts.some((text) => text.startsWith('rests dark'))).toBe(true)
    expect(texts.some((text) => text.startsWith('rests lit'))).toBe(true)
    const flasher = labelled(stageOf(), 'logarithmic')
    expect(flasher.labels.map(({ text }) => text)).toContain('no rest here')
  })

  it('say, on a linear axis, where the glow branch goes that runs off to the right', () => {
    const { labels } = labelled(stageOf(), 'linear')
    expect(textOf(labels, 'lamp-name')).toBe('glow branch, on to 8 mA at 84 V →')
  })

  it('take the colour of what they belong to', () => {
    const { labels } = labelled(stageOf(), 'logarithmic')
    const tones = Object.fromEntries(labels.map(({ id, tone }) => [id, tone]))
    expect(tones).toMatchObject({
      'load-line': 'circuit',
      'load-supply': 'circuit',
      'lamp-knee': 'lamp',
      'edge-dark': 'edge',
    })
  })

  it('stand beside the characteristic, not on it, on a wide plate', () => {
    const { labels, picture } = labelled(stageOf(), 'logarithmic')
    const curve = cornersOf(picture.characteristic).flat()
    for (const id of ['lamp-knee', 'lamp-valley', 'load-line', 'edge-region']) {
      const label = labels.find((one) => one.id === id)!
      const box = labelBox(label.text, label)
      const crossed = curve.some(
        ([x, y]) => x > box.left && x < box.right && y > box.top && y < box.bottom,
      )
      expect(crossed, id).toBe(false)
    }
  })
})
