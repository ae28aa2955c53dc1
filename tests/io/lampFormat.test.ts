import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { catalogue } from '../../src/core/lamp/catalogue'
import { recordOf } from '../../src/core/lamp/catalogueRecord'
import {
  checkLamp,
  decodeLamp,
  encodeLamp,
  newestLampFormat,
} from '../../src/io/formats/lampFormat'
import { faultInPlainData, plainDataLimits } from '../../src/io/formats/lampPlainData'
import { anyLamp, sweptLamp } from './any-lamp'

const viaText = (value: unknown) => JSON.parse(JSON.stringify(value)) as unknown
const changed = (change: object) => decodeLamp({ format: 1, lamp: { ...sweptLamp, ...change } })
const message = (change: object) => {
  const read = changed(change)
  return read.ok ? '' : read.message
}

describe('the format of a lamp', () => {
  it('brings any lamp back as it was', () => {
    fc.assert(
      fc.property(anyLamp, (lamp) => {
        expect(decodeLamp(viaText(encodeLamp(lamp)))).toStrictEqual({ ok: true, lamp })
      }),
      { seed: 61, numRuns: 300 },
    )
  })

  it('holds every lamp of the catalogue', () => {
    for (const entry of catalogue) {
      const lamp = recordOf(entry)
      expect(decodeLamp(viaText(encodeLamp(lamp)))).toStrictEqual({ ok: true, lamp })
    }
  })

  it('opens a lamp written in format 1, as it stood when the format was made', () => {
    const frozen =
      '{"format":1,"lamp":{"name":"Pier","note":"","origin":"rates","knots":[{"current":0,"voltage":0},' +
      '{"current":2e-7,"voltage":75},{"current":9e-5,"voltage":55},{"current":0.008,"voltage":84}],' +
      '"reverseKnots":null,"baseResistance":30000,"recoveryTime":0.0001,"strikeDelay":0,"spread":null,' +
      '"facts":[],"measured":{"counts":[[90,31,60]]}}}'
    expect(decodeLamp(JSON.parse(frozen))).toStrictEqual({
      ok: true,
      lamp: {
        name: 'Pier',
        note: '',
        origin: 'rates',
        knots: [
          { current: 0, voltage: 0 },
          { current: 2e-7, voltage: 75 },
          { current: 9e-5, voltage: 55 },
          { current: 0.008, voltage: 84 },
        ],
        reverseKnots: null,
        baseResistance: 30_000,
        recoveryTime: 1e-4,
        strikeDelay: 0,
        spread: null,
        facts: [],
        measured: { counts: [[90, 31, 60]] },
      },
    })
    expect(newestLampFormat).toBe(1)
  })

  it.each([
    [{ name: 'x'.repeat(61) }, 'at most 60 characters'],
    [{ name: 7 }, 'must be text'],
    [{ note: 'x'.repeat(401) }, 'at most 400'],
    [{ origin: 'elsewhere' }, 'origin'],
    [{ knots: [] }, 'two knots'],
    [{ knots: 'none' }, 'must be a list'],
    [{ knots: sweptLamp.knots.map((knot) => ({ ...knot, voltage: '75' })) }, 'voltage of knot 1'],
    [{ knots: new Array(100_000).fill({ current: 0, voltage: 0 }) }, 'this one has 100000'],
    [{ reverseKnots: [{ current: 1, voltage: 0 }] }, 'other way round'],
    [{ baseResistance: -1 }, 'base'],
    [{ recoveryTime: 1e9 }, 'recovery time'],
    [{ strikeDelay: null }, 'strike delay'],
    [{ spread: { strike: { low: 2, typical: 1, high: 3 } } }, 'out of order'],
    [{ facts: new Array(1000).fill(sweptLamp.facts[0]) }, 'besides'],
    [{ measured: undefined }, 'readings'],
    [{ measured: { rows: [Number.NaN] } }, 'a number in it is none'],
    [
      {
        spread: {
          strike: { low: 1, typical: 50, high: 90 },
          extinction: { low: 1, typical: 60, high: 90 },
        },
      },
      'below the typical strike',
    ],
  ])('says what is wrong: change %#', (change, words) => {
    expect(message(change)).toContain(words)
  })

  it.each([null, 3, 'lamp', [], {}, { format: 'one' }, { format: 0 }])(
    'refuses %j, which is no lamp',
    (value) => {
      expect(decodeLamp(value)).toMatchObject({ ok: false })
    },
  )

  it('says when a newer program has made it', () => {
    const newer = decodeLamp({ format: 2, lamp: {} })
    expect(!newer.ok && newer.message).toContain('newer Glowloop')
  })

  it('never throws, whatever it is given', () => {
    fc.assert(
      fc.property(fc.anything(), (value) => {
        expect(decodeLamp({ format: 1, lamp: value }).ok).toBe(false)
      }),
      { seed: 62, numRuns: 300 },
    )
  })

  it('drops fields it does not know', () => {
    const read = changed({ extra: 1 })
    expect(read.ok && 'extra' in read.lamp).toBe(false)
  })

  it('refuses to write what it could not read', () => {
    expect(checkLamp({ ...sweptLamp, strikeDelay: Number.POSITIVE_INFINITY }).ok).toBe(false)
    expect(checkLamp(sweptLamp)).toStrictEqual({ ok: true, lamp: sweptLamp })
  })
})

describe('measured data', () => {
  it('may be a sweep of 100 000 rows', () => {
    const rows = Array.from({ length: 100_000 }, (_, i) => [i, 0.5 * i, null])
    expect(faultInPlainData({ rows })).toBeNull()
  })

  it('is refused where it is too large or nested without end', () => {
    expect(faultInPlainData(new Array(plainDataLimits.values + 1).fill(0))).toContain('too much')
    const deep = JSON.parse(`${'['.repeat(5000)}${']'.repeat(5000)}`) as unknown
    expect(faultInPlainData(deep)).toContain('too deeply')
    const ring: unknown[] = []
    ring.push(ring)
    expect(faultInPlainData(ring)).toContain('too deeply')
  })

  it('is refused where it reaches for a prototype, or is no data', () => {
    for (const text of ['{"__proto__":{"a":1}}', '{"a":[{"constructor":1}]}']) {
      expect(faultInPlainData(JSON.parse(text))).toContain('field called')
    }
    for (const value of [undefined, () => 1, new Date(), new Map(), 1n, Number.NaN]) {
      expect(faultInPlainData({ value })).not.toBeNull()
    }
  })
})
