import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Design, faultInStage } from '../../src/core'
import {
  checkDesign,
  decodeDesign,
  encodeDesign,
  newestFormat,
  packDesign,
  unpackDesign,
} from '../../src/io/designFormat'
import { anyDesign, benchDesign } from './any-design'

type Tree = { [key: string]: unknown }

/** The encoded bench design with one field, named by its path, replaced or (undefined) removed. */
function withField(path: string, value: unknown): unknown {
  const encoded = structuredClone(encodeDesign(benchDesign)) as unknown as Tree
  const keys = path.split('.')
  const last = keys.pop() ?? ''
  const parent = keys.reduce<Tree>((tree, key) => tree[key] as Tree, encoded)
  if (value === undefined) delete parent[last]
  else parent[last] = value
  return encoded
}

function messageOf(value: unknown): string {
  const opened = decodeDesign(value)
  return opened.ok ? 'opened' : opened.message
}

const plain = (text: string) => text.replace(/\u00A0/g, ' ')

describe('the format of a design', () => {
  it('brings every design back through JSON bit for bit, with named fields and packed', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        const named = JSON.parse(JSON.stringify(encodeDesign(design)))
        expect(decodeDesign(named)).toStrictEqual({ ok: true, design, notes: [] })
        const packed = JSON.parse(JSON.stringify(packDesign(design)))
        expect(unpackDesign(newestFormat, packed)).toStrictEqual({ ok: true, design, notes: [] })
      }),
      { seed: 51, numRuns: 300 },
    )
  })

  it('opens nothing that the core would find fault with', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        const opened = checkDesign(design)
        expect(opened.ok && faultInStage(opened.design.stage)).toBeNull()
      }),
      { seed: 53, numRuns: 200 },
    )
    expect(messageOf(withField('design.stage.strayCapacitance', 0))).not.toBe('opened')
  })

  it.each<[string, unknown, string]>([
    [
      'design.stage.supplyVoltage',
      25000,
      'The supply voltage must be a number from 0 V to 20 kV; here it is 25 kV.',
    ],
    ['design.stage.supplyVoltage', -1, 'here it is −1 V.'],
    ['design.stage.supplyVoltage', '90', 'here it is not a number.'],
    ['design.stage.supplyVoltage', null, 'here it is empty.'],
    ['design.stage.supplyVoltage', Number.NaN, 'here it is not a number.'],
    ['design.stage.supplyVoltage', Number.POSITIVE_INFINITY, 'here it is ∞ V.'],
    ['design.stage.seriesResistance', 2e13, 'from 0 Ω to 10 TΩ; here it is 20 TΩ.'],
    ['design.stage.sourceResistance', undefined, 'The source resistance must be a number'],
    [
      'design.stage.capacitance',
      1.5,
      'The capacitor must be a number from 0 F to 1 F; here it is 1.5 F.',
    ],
    [
      'design.stage.leakageResistance',
      0,
      'must be a number above 1 µΩ and up to 10 TΩ, or none; here it is 0 Ω.',
    ],
    ['design.stage.leakageResistance', Number.POSITIVE_INFINITY, 'here it is ∞ Ω.'],
    ['design.stage.strayCapacitance', 1e-5, 'The stray capacitance must be'],
    [
      'design.stage.lamp.recoveryTime',
      1001,
      'The recovery time must be a number from 0 s to 1000 s',
    ],
    ['design.stage.lamp.strikeDelay', -1e-9, 'The strike delay must be'],
    [
      'design.stage.lamp.knots.2.current',
      101,
      'The current of knot 3 must be a number from 0 A to 100 A',
    ],
    ['design.stage.lamp.knots.1.voltage', 20001, 'The voltage of knot 2 must be'],
    ['design.stage.lamp.knots.0.voltage', 1, 'A characteristic starts at 0 A and 0 V.'],
    ['design.stage.lamp.knots.2.current', 2.1e-7, 'Knot 3: the current must be greater'],
    ['design.stage.lamp.knots', [{ current: 0, voltage: 0 }], 'needs two knots at least.'],
    ['design.stage.lamp.knots', Array(100_000).fill(null), '2 to 64 knots; this one has 100000.'],
    ['design.stage.lamp.knots', 'all', 'must be a list'],
    ['design.stage.lamp', null, '“stage lamp” is missing'],
    ['design.stage', 'here', '“stage” is missing'],
    ['design', undefined, 'What was opened is not a design.'],
    ['design.title', 7, 'The title must be text; here it is something else.'],
    ['design.title', undefined, 'here it is missing.'],
    [
      'design.note',
      'x'.repeat(401),
      'The note may be at most 400 characters long; here it has 401.',
    ],
    ['design.lampName', 'x'.repeat(61), 'The name of the lamp may be at most 60'],
  ])('refuses %s = %j with a sentence', (path, value, sentence) => {
    const message = plain(messageOf(withField(path, value)))
    expect(message).toContain(sentence)
  })

  it('accepts the ends of the ranges', () => {
    for (const [path, value] of [
      ['design.stage.supplyVoltage', 20e3],
      ['design.stage.capacitance', 0],
      ['design.stage.leakageResistance', 1e13],
      ['design.stage.leakageResistance', 1.01e-6],
      ['design.stage.leakageResistance', null],
      ['design.stage.strayCapacitance', 1e-6],
      ['design.title', 'x'.repeat(80)],
    ] as const) {
      expect(messageOf(withField(path, value)), path).toBe('opened')
    }
  })

  it('tells a newer format apart from none at all', () => {
    expect(messageOf({ format: 7, design: {} })).toBe(
      'It was made by a newer Glowloop: format 7, this one reads up to 2.',
    )
    for (const format of [0, -1, 1.5, '1', null, undefined]) {
      expect(messageOf(withField('format', format))).toContain('in which format')
    }
    for (const value of [null, undefined, 7, 'design', [], [1]]) {
      expect(messageOf(value)).toBe('What was opened is not a design.')
    }
  })

  it('leaves out fields it does not know and says which', () => {
    const opened = decodeDesign(withField('design.stage.colour', 'orange'))
    expect(opened).toStrictEqual({
      ok: true,
      design: benchDesign,
      notes: ['Left out, because it is not known here: “stage.colour”.'],
    })
    const many = withField('design.stage.lamp.knots.1', {
      ...benchDesign.stage.lamp.knots[1],
      a: 1,
      b: 1,
      c: 1,
      d: 1,
      e: 1,
    })
    const notes = decodeDesign(many)
    expect(notes.ok && notes.notes[0]).toContain('“stage.lamp.knots.d”, and more.')
  })

  it('is not led astray by fields named like parts of every object', () => {
    const hostile = JSON.parse(
      JSON.stringify(encodeDesign(benchDesign)).replace(
        '"title"',
        '"__proto__":{"polluted":true,"title":"other"},"constructor":{"prototype":{"polluted":true}},"title"',
      ),
    )
    const opened = decodeDesign(hostile)
    expect(opened.ok && opened.design).toStrictEqual(benchDesign)
    expect(opened.ok && opened.notes[0]).toContain('“__proto__”')
    expect('polluted' in {}).toBe(false)
    expect(messageOf({ format: 1, design: JSON.parse('{"__proto__":{"title":"x"}}') })).not.toBe(
      'opened',
    )
  })

  it('turns a zero with a sign into plain zero', () => {
    const opened = decodeDesign(withField('design.stage.leadResistance', -0))
    expect(opened.ok && Object.is(opened.design.stage.leadResistance, 0)).toBe(true)
  })

  it('does not write what could not be read back', () => {
    const broken: Design = {
      ...benchDesign,
      stage: { ...benchDesign.stage, supplyVoltage: Number.NaN },
    }
    expect(checkDesign(broken)).toMatchObject({ ok: false })
    const noLeakage = {
      ...benchDesign,
      stage: { ...benchDesign.stage, leakageResistance: Number.NaN },
    }
    expect(checkDesign(noLeakage)).toMatchObject({ ok: false })
    expect(checkDesign(benchDesign)).toMatchObject({ ok: true })
  })

  it.each<[string, unknown]>([
    ['a text', 'x'],
    ['an object', {}],
    ['no lists', ['', '', '', 1, 2]],
    ['too few numbers', ['', '', '', [1, 2], [1, 2]]],
    ['too many numbers', ['', '', '', [1, 0, 1, 0, null, 0, 0, 0, 0, 0], [1, 2]]],
    ['a number left empty', ['', '', '', [null, 0, 1, 0, null, 0, 0, 0], [1, 2]]],
    ['a knot cut in half', ['', '', '', [90, 0, 1, 0, null, 0, 0, 0], [1, 2, 3]]],
    ['no knots', ['', '', '', [90, 0, 1, 0, null, 0, 0, 0], []]],
    ['one list too many', ['', '', '', [90, 0, 1, 0, null, 0, 0, 0], [1, 2], []]],
    ['very many knots', ['', '', '', [90, 0, 1, 0, null, 0, 0, 0], Array(1e5).fill(1)]],
  ])('refuses packed data that is %s', (_, value) => {
    expect(unpackDesign(1, value)).toMatchObject({
      ok: false,
      message: expect.stringMatching(/\.$/),
    })
  })

  it('refuses anything else without throwing', () => {
    fc.assert(
      fc.property(fc.jsonValue({ maxDepth: 4 }), (value) => {
        expect(decodeDesign({ format: 1, design: value }).ok).toBe(false)
        expect(unpackDesign(1, value).ok).toBe(false)
      }),
      { seed: 52, numRuns: 500 },
    )
  })
})
