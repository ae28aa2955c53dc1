import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import type { Domain } from '../../src/chart/axes'
import {
  type Edit,
  type Handle,
  type HandleId,
  type HandleSetting,
  handlesOf,
  knotName,
  knotOf,
  type PartChoice,
  placeHandle,
  seriesThrough,
  stepHandle,
  steppedPart,
  tidy,
} from '../../src/chart/handles'
import {
  branchesOf,
  isPreferred,
  loadCurrent,
  loadLineOf,
  nearestPreferred,
  preferredValues,
  type Stage,
} from '../../src/core'
import { moveKnot } from '../../src/state/knots'
import { byRatio, stages } from '../support/lampArbitrary'
import { stageOf } from '../support/stages'
import { kinds, planeOf, plateWidths } from './drawing'

const share = fc.double({ min: 0, max: 1, noNaN: true })
const ways = fc.constantFrom('up' as const, 'down' as const)
const series = fc.constantFrom('E6' as const, 'E12' as const, 'E24' as const)

/** The stage as an edit leaves it. */
function edited(stage: Stage, edit: Edit): Stage {
  if (edit.kind === 'supply') return { ...stage, supplyVoltage: edit.voltage }
  if (edit.kind === 'series') return { ...stage, seriesResistance: edit.resistance }
  const knots = moveKnot(stage.lamp.knots, edit.index, edit.knot)
  return { ...stage, lamp: { ...stage.lamp, knots } }
}

function settingOf(
  stage: Stage,
  kind: (typeof kinds)[number],
  more: { width?: number; choice?: PartChoice; zoom?: { current?: Domain; voltage?: Domain } } = {},
): HandleSetting {
  const { path, x, y } = planeOf(stage, kind, more.width, more.zoom)
  return { stage, path, x, y, choice: more.choice ?? 'any' }
}

/** The same axes with another stage: they stand still while something is dragged. */
const moved = (setting: HandleSetting, edit: Edit): HandleSetting => {
  const stage = edited(setting.stage, edit)
  return { ...setting, stage, path: branchesOf(stage.lamp.knots, stage.leadResistance) }
}

const find = (setting: HandleSetting, id: HandleId): Handle | undefined =>
  handlesOf(setting).find((handle) => handle.id === id)

/** Stages with leakage, lead and source resistor among them, on either axis, at some width. */
const settings = fc
  .tuple(stages(), fc.constantFrom(...kinds), fc.constantFrom(...plateWidths))
  .map(([stage, kind, width]) => settingOf(stage, kind, { width }))

const spotIn = ({ x, y }: HandleSetting, across: number, up: number) => ({
  x: x.range[0] + 1 + across * (x.range[1] - x.range[0] - 2),
  y: y.range[0] + up * (y.range[1] - y.range[0]),
})

describe('a handle put somewhere', () => {
  it('stands there: the supply end of the load line, to a pixel', () => {
    fc.assert(
      fc.property(settings, share, share, (setting, across, up) => {
        const at = spotIn(setting, across, up)
        const edit = placeHandle(setting, 'supply', at)!
        fc.pre(edit.kind === 'supply' && edit.voltage < 20e3)
        const handle = find(moved(setting, edit), 'supply')!
        expect(Math.abs(handle.y - at.y)).toBeLessThan(1)
        expect(handle.x).toBe(setting.x.range[0])
      }),
      { seed: 831, numRuns: 300 },
    )
  })

  it('stands there: the slope of the load line, to a pixel', () => {
    fc.assert(
      fc.property(settings, share, share, (setting, across, up) => {
        const at = spotIn(setting, across, up)
        const edit = placeHandle(setting, 'slope', at)
        fc.pre(
          edit !== null && edit.kind === 'series' && edit.resistance > 1 && edit.resistance < 1e13,
        )
        const handle = find(moved(setting, edit!), 'slope')!
        expect(Math.abs(handle.x - at.x)).toBeLessThan(1)
      }),
      { seed: 832, numRuns: 500 },
    )
  })

  it('stands there: each knot, to a pixel both ways, where its neighbours let it', () => {
    fc.assert(
      fc.property(settings, share, share, share, (setting, which, across, up) => {
        const count = setting.stage.lamp.knots.length - 1
        const index = 1 + Math.min(count - 1, Math.floor(which * count))
        const at = spotIn(setting, across, up)
        const edit = placeHandle(setting, `knot-${index}`, at)!
        fc.pre(edit.kind === 'knot' && edit.knot.voltage > 0)
        const next = moved(setting, edit)
        fc.pre(edit.kind === 'knot' && next.stage.lamp.knots[index]!.current === edit.knot.current)
        const handle = find(next, `knot-${index}`)!
        expect(Math.abs(handle.x - at.x)).toBeLessThan(1)
        expect(Math.abs(handle.y - at.y)).toBeLessThan(1)
      }),
      { seed: 833, numRuns: 500 },
    )
  })

  it('stands there however far one has zoomed in', () => {
    const zoom = { current: [1.1e-6, 1.2e-6], voltage: [70, 70.5] } as const
    fc.assert(
      fc.property(fc.constantFrom(...kinds), share, share, (kind, across, up) => {
        const setting = settingOf(stageOf(), kind, { zoom })
        const at = spotIn(setting, across, up)
        for (const id of ['supply', 'slope', 'knot-2'] as const) {
          const handle = find(moved(setting, placeHandle(setting, id, at)!), id)!
          if (id !== 'supply') expect(Math.abs(handle.x - at.x)).toBeLessThan(1)
          if (id !== 'slope') expect(Math.abs(handle.y - at.y)).toBeLessThan(1)
        }
      }),
      { seed: 834 },
    )
  })

  it('stays where it is when put where it stands', () => {
    fc.assert(
      fc.property(settings, (setting) => {
        for (const handle of handlesOf(setting)) {
          if (handle.x < setting.x.range[0] + 1 && handle.id !== 'supply') continue
          const edit = placeHandle(setting, handle.id, handle)!
          const next = moved(setting, edit)
          // Beyond 100 A no knot may stand.
          if (
            edit.kind === 'knot' &&
            next.stage.lamp.knots[edit.index]!.current !== edit.knot.current
          )
            continue
          const again = find(next, handle.id)!
          expect(Math.hypot(again.x - handle.x, again.y - handle.y)).toBeLessThan(1.5)
        }
      }),
      { seed: 835, numRuns: 200 },
    )
  })

  it('keeps numbers short: three figures on a whole plane of logarithmic current', () => {
    const setting = settingOf(stageOf(), 'logarithmic')
    const edit = placeHandle(setting, 'slope', { x: 300, y: 200 })!
    expect(edit.kind === 'series' && Number(edit.resistance.toPrecision(3))).toBe(
      edit.kind === 'series' && edit.resistance,
    )
    const supply = placeHandle(setting, 'supply', { x: 54, y: 123.4 })!
    expect(supply.kind === 'supply' && supply.voltage * 5).toBe(
      Math.round(supply.kind === 'supply' ? supply.voltage * 5 : 0),
    )
  })

  it('takes the load line through the place to the nearest preferred value, when kept to them', () => {
    fc.assert(
      fc.property(stages(), series, share, share, (stage, choice, across, up) => {
        const setting = settingOf(stage, 'logarithmic', { choice })
        const at = spotIn(setting, across, up)
        const edit = placeHandle(setting, 'slope', at)
        fc.pre(edit?.kind === 'series')
        if (edit?.kind !== 'series') return
        const free = placeHandle({ ...setting, choice: 'any' }, 'slope', at)
        expect(isPreferred(edit.resistance, choice)).toBe(true)
        if (free?.kind !== 'series' || free.resistance <= 1) return
        const ratio = edit.resistance / free.resistance
        const gap = { E6: 1.6, E12: 1.28, E24: 1.15 }[choice]
        expect(Math.max(ratio, 1 / ratio)).toBeLessThan(Math.sqrt(gap) * 1.01)
      }),
      { seed: 836 },
    )
  })

  it('never asks for more than a design allows, wherever the pointer goes', () => {
    fc.assert(
      fc.property(
        settings,
        fc.double({ min: -1e4, max: 1e4, noNaN: true }),
        fc.double({ min: -1e4, max: 1e4, noNaN: true }),
        (setting, x, y) => {
          const ids: HandleId[] = ['supply', 'slope', 'knot-1', 'knot-2']
          for (const id of ids) {
            const edit = placeHandle(setting, id, { x, y })
            if (edit === null) continue
            if (edit.kind === 'supply') {
              expect(edit.voltage >= 0 && edit.voltage <= 20e3).toBe(true)
            } else if (edit.kind === 'series') {
              expect(edit.resistance >= 1 && edit.resistance <= 1e13).toBe(true)
            } else {
              expect(edit.knot.current > 0 && edit.knot.voltage >= 0).toBe(true)
              expect(Number.isFinite(edit.knot.current + edit.knot.voltage)).toBe(true)
            }
          }
        },
      ),
      { seed: 837, numRuns: 200 },
    )
  })
})

describe('the load line taken through a place', () => {
  it('passes it, leakage and source resistance included', () => {
    fc.assert(
      fc.property(stages(), share, byRatio(1e-8, 1e-3), (stage, height, current) => {
        const level = height * stage.supplyVoltage * 0.98
        const edit = seriesThrough(stage, level, current, 'any')
        fc.pre(edit?.kind === 'series' && edit.resistance > 1)
        const line = loadLineOf(edited(stage, edit!))
        const leak = level / stage.leakageResistance
        // Three figures of the series resistor.
        expect(Math.abs(loadCurrent(line, level) - current)).toBeLessThan(0.006 * (current + leak))
      }),
      { seed: 838, numRuns: 300 },
    )
  })

  it('goes nowhere above what the supply gives, nor where the source alone holds it lower', () => {
    expect(seriesThrough(stageOf(), 130, 1e-6, 'any')).toBeNull()
    expect(seriesThrough(stageOf({ sourceResistance: 1e6 }), 60, 1e-3, 'any')).toBeNull()
  })
})

describe('handlesOf', () => {
  it('has one for the supply end, one for the slope and one for each knot but the first', () => {
    const ids = handlesOf(settingOf(stageOf(), 'logarithmic')).map((handle) => handle.id)
    expect(ids).toEqual(['supply', 'slope', 'knot-1', 'knot-2', 'knot-3', 'knot-4', 'knot-5'])
  })

  it('leaves out what is not in sight', () => {
    const setting = settingOf(stageOf(), 'linear')
    const ids = handlesOf(setting).map((handle) => handle.id)
    expect(ids).toContain('knot-2')
    expect(ids).not.toContain('knot-5')
    fc.assert(
      fc.property(settings, (any) => {
        for (const { x, y } of handlesOf(any)) {
          expect(x >= any.x.range[0] - 1 && x <= any.x.range[1] + 1).toBe(true)
          expect(y <= any.y.range[0] + 1 && y >= any.y.range[1] - 1).toBe(true)
        }
      }),
      { seed: 839 },
    )
  })

  it('gives each a name of its own, in one colour for the circuit and one for the lamp', () => {
    const handles = handlesOf(settingOf(stageOf(), 'logarithmic'))
    expect(new Set(handles.map(({ name }) => name)).size).toBe(handles.length)
    for (const { id, tone } of handles) expect(tone).toBe(knotOf(id) >= 0 ? 'lamp' : 'circuit')
  })
})

describe('names of knots', () => {
  const { knots } = stageOf().lamp

  it('are knee and valley for those, and numbers for the others', () => {
    expect(knots.map((_, index) => knotName(knots, index))).toEqual([
      'Knot 1',
      'Knee',
      'Knot 3',
      'Valley',
      'Knot 5',
      'Knot 6',
    ])
  })

  it('are numbers only where the voltage never falls', () => {
    const rising = [
      { current: 0, voltage: 0 },
      { current: 1e-6, voltage: 70 },
    ]
    expect(rising.map((_, index) => knotName(rising, index))).toEqual(['Knot 1', 'Knot 2'])
  })

  it('belong to the handles by number', () => {
    expect(knotOf('knot-12')).toBe(12)
    expect(knotOf('supply')).toBe(-1)
    expect(knotOf('slope')).toBe(-1)
  })
})

describe('steps by key', () => {
  const step = (along: 'voltage' | 'current', direction: 'up' | 'down', coarse: boolean) => ({
    along,
    direction,
    coarse,
  })

  it('move the supply by 1 V, or 10 V, and back', () => {
    const at = (volts: number) => settingOf(stageOf({ supplyVoltage: volts }), 'logarithmic')
    expect(stepHandle(at(120), 'supply', step('voltage', 'up', false))).toEqual({
      kind: 'supply',
      voltage: 121,
    })
    expect(stepHandle(at(120), 'supply', step('voltage', 'down', true))).toMatchObject({
      voltage: 110,
    })
    expect(stepHandle(at(0.5), 'supply', step('voltage', 'down', false))).toMatchObject({
      voltage: 0,
    })
    expect(stepHandle(at(20e3), 'supply', step('voltage', 'up', true))).toMatchObject({
      voltage: 20e3,
    })
  })

  it('come back, up and down again, for preferred values, whether to the neighbour or by a decade', () => {
    fc.assert(
      fc.property(
        series,
        fc.integer({ min: 0, max: 23 }),
        fc.integer({ min: 1, max: 11 }),
        fc.boolean(),
        (choice, position, power, coarse) => {
          const values = preferredValues(choice)
          const value = Number(`${values[position % values.length]}e${power}`)
          const up = steppedPart(value, choice, { direction: 'up', coarse }, 1, 1e13)
          const down = steppedPart(value, choice, { direction: 'down', coarse }, 1, 1e13)
          expect(up).toBeGreaterThan(value)
          expect(down).toBeLessThan(value)
          expect(isPreferred(up, choice) && isPreferred(down, choice)).toBe(true)
          expect(steppedPart(up, choice, { direction: 'down', coarse }, 1, 1e13)).toBe(value)
          expect(steppedPart(down, choice, { direction: 'up', coarse }, 1, 1e13)).toBe(value)
        },
      ),
      { seed: 840, numRuns: 300 },
    )
  })

  it('go on to the neighbour in the series from between two values', () => {
    fc.assert(
      fc.property(series, byRatio(10, 1e12), ways, (choice, value, direction) => {
        const next = steppedPart(value, choice, { direction, coarse: false }, 1, 1e13)
        expect(isPreferred(next, choice)).toBe(true)
        expect(direction === 'up' ? next > value : next < value).toBe(true)
        const nearest = nearestPreferred(value, choice)!
        const between = direction === 'up' ? nearest > value * 1.0001 : nearest < value / 1.0001
        if (between) expect(next).toBe(nearest)
      }),
      { seed: 841, numRuns: 300 },
    )
  })

  it('move a part of any value by 1 or 10 per cent, never stuck and never out of its limits', () => {
    fc.assert(
      fc.property(byRatio(1, 1e13), ways, fc.boolean(), (value, direction, coarse) => {
        const next = steppedPart(value, 'any', { direction, coarse }, 1, 1e13)
        expect(next >= 1 && next <= 1e13).toBe(true)
        const wanted = (coarse ? 1.1 : 1.01) ** (direction === 'up' ? 1 : -1) * value
        expect(next / Math.min(1e13, Math.max(1, wanted))).toBeCloseTo(1, 3)
        if (wanted > 1 && wanted < 1e13) expect(next).not.toBe(value)
      }),
      { seed: 842, numRuns: 300 },
    )
  })

  it('give a part of nothing its least value', () => {
    for (const choice of ['any', 'E12'] as const) {
      expect(steppedPart(0, choice, { direction: 'up', coarse: false }, 1, 1e13)).toBe(1)
    }
  })

  it('step the series resistor through the values kept to', () => {
    const setting = settingOf(stageOf({ seriesResistance: 2.2e6 }), 'linear', { choice: 'E12' })
    expect(stepHandle(setting, 'slope', step('current', 'up', false))).toEqual({
      kind: 'series',
      resistance: 2.7e6,
    })
    expect(stepHandle(setting, 'slope', step('voltage', 'down', true))).toEqual({
      kind: 'series',
      resistance: 220e3,
    })
  })

  it('move a knot along one axis and leave the other as it was', () => {
    const setting = settingOf(stageOf(), 'logarithmic')
    const knee = setting.stage.lamp.knots[1]!
    const move = (one: ReturnType<typeof step>) => {
      const edit = stepHandle(setting, 'knot-1', one)
      return edit?.kind === 'knot' ? edit.knot : null
    }
    expect(move(step('voltage', 'up', false))).toEqual({ ...knee, voltage: 75.5 })
    expect(move(step('voltage', 'down', true))).toEqual({ ...knee, voltage: 70 })
    expect(move(step('current', 'up', false))).toEqual({ ...knee, current: 0.204e-6 })
    expect(move(step('current', 'down', true))).toEqual({ ...knee, current: 0.16e-6 })
  })

  it('do nothing to a knot that is not there', () => {
    const setting = settingOf(stageOf(), 'logarithmic')
    expect(stepHandle(setting, 'knot-40', step('voltage', 'up', false))).toBeNull()
  })
})

describe('tidy', () => {
  it('rounds to 1, 2 or 5 of a power of ten, within half of the step', () => {
    expect(tidy(123.456, 1)).toBe(123)
    expect(tidy(123.456, 0.3)).toBe(123.4)
    expect(tidy(123.456, 0.7)).toBe(123.5)
    expect(tidy(123.456, 30)).toBe(120)
    fc.assert(
      fc.property(
        fc.double({ min: -2e4, max: 2e4, noNaN: true }),
        byRatio(1e-6, 1e3),
        (value, step) => {
          expect(Math.abs(tidy(value, step) - value)).toBeLessThanOrEqual(step / 2 + 1e-9)
        },
      ),
      { seed: 843 },
    )
  })

  it('leaves a value as it is where the step is finer than its figures', () => {
    expect(tidy(4.7e20, 1e-9)).toBe(4.7e20)
  })
})
