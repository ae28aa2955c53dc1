import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { isLampId, type KeptLamp, newLampId } from '../../src/io/lampStore'
import { lampFileLimits, readLampFile, writeLampFile } from '../../src/io/lampStoreFile'
import { duplicateOf, freeName, mergeLamps } from '../../src/io/lampStoreNames'
import { anyLamp, sweptLamp } from './any-lamp'

const kept = (id: string, name: string): KeptLamp => ({ id, lamp: { ...sweptLamp, name } })

function written(lamps: readonly KeptLamp[]): string {
  const made = writeLampFile(lamps)
  if (!made.ok) throw new Error(made.message)
  return made.text
}

function opened(text: string) {
  const read = readLampFile(text)
  if (!read.ok) throw new Error(read.message)
  return read
}

const message = (text: string) => {
  const read = readLampFile(text)
  return read.ok ? '' : read.message
}

describe('a file of lamps', () => {
  it('brings all of them back, ids and all', () => {
    fc.assert(
      fc.property(
        fc.uniqueArray(anyLamp, {
          maxLength: 5,
          selector: ({ name }) => name.trim().toLowerCase(),
        }),
        (lamps) => {
          const all = lamps.map((lamp, i) => ({ id: `lamp-${i}`, lamp }))
          expect(opened(written(all))).toStrictEqual({ ok: true, lamps: all, notes: [] })
        },
      ),
      { seed: 71, numRuns: 100 },
    )
  })

  it('says what it is and in which units, and opens with a byte order mark', () => {
    const text = written([kept('a', 'Pier')])
    expect(JSON.parse(text)).toMatchObject({
      program: 'Glowloop',
      holds: 'lamps',
      format: 1,
      units: 'volts, amperes, ohms, seconds',
    })
    expect(opened(`\uFEFF${text}`).lamps).toHaveLength(1)
  })

  it('leaves out the one lamp that cannot be read, and names it', () => {
    const file = JSON.parse(written([kept('a', 'Pier'), kept('b', 'Shed')])) as {
      lamps: { lamp: { knots: unknown } }[]
    }
    file.lamps[0]!.lamp.knots = []
    const read = opened(JSON.stringify(file))
    expect(read.lamps).toStrictEqual([kept('b', 'Shed')])
    expect(read.notes).toEqual([
      expect.stringMatching(/^Lamp 1 of the file was left out\. A characteristic/),
    ])
  })

  it('gives a new id where one is missing or could do harm', () => {
    const file = JSON.parse(written([kept('a', 'Pier')])) as { lamps: { id: unknown }[] }
    for (const id of [undefined, 7, '', '../../x', 'A', 'x'.repeat(41), '__proto__']) {
      file.lamps[0]!.id = id
      const [lamp] = opened(JSON.stringify(file)).lamps
      expect(isLampId(lamp!.id)).toBe(true)
      expect(lamp!.lamp).toStrictEqual(kept('a', 'Pier').lamp)
    }
  })

  it('tells apart what occurs twice in it', () => {
    const twice = opened(
      written([kept('a', 'Pier'), kept('a', 'Pier'), kept('a', 'Shed'), kept('b', 'pier ')]),
    )
    expect(twice.lamps.map(({ lamp }) => lamp.name)).toEqual(['Pier', 'Shed', 'pier (2)'])
    expect(new Set(twice.lamps.map(({ id }) => id)).size).toBe(3)
    expect(twice.notes).toHaveLength(2)
  })

  it.each([
    ['', 'empty'],
    ['{"program":"Glow', 'damaged'],
    ['null', 'not saved by Glowloop'],
    ['[1]', 'not saved by Glowloop'],
    ['{"program":"Other"}', 'not saved by Glowloop'],
    ['{"program":"Glowloop","format":1,"design":{}}', 'holds no lamps'],
    ['{"program":"Glowloop","holds":"lamps","format":1,"lamps":{}}', 'holds no lamps'],
    ['{"program":"Glowloop","holds":"lamps","format":9,"lamps":[{}]}', 'newer Glowloop'],
    ['{"program":"Glowloop","holds":"lamps","format":1,"lamps":[null]}', 'not a lamp'],
  ])('is refused as %j', (text, words) => {
    expect(message(text)).toContain(words)
  })

  it('is refused where it is too large, before it is read', () => {
    expect(message(' '.repeat(lampFileLimits.characters + 1))).toContain('far larger')
    const many = { program: 'Glowloop', holds: 'lamps', format: 1, lamps: new Array(2001).fill(0) }
    expect(message(JSON.stringify(many))).toContain('at most 2000')
    const lamps = new Array<KeptLamp>(2001).fill(kept('a', 'Pier'))
    expect(writeLampFile(lamps)).toMatchObject({ ok: false })
  })

  it('is not written with a lamp that could not be read again', () => {
    const broken = { id: 'a', lamp: { ...sweptLamp, strikeDelay: Number.NaN } }
    expect(writeLampFile([broken])).toMatchObject({
      ok: false,
      message: expect.stringContaining('No. 3 of the bag'),
    })
  })

  it('holds two thousand lamps of one name without taking for ever', () => {
    const lamps = Array.from({ length: 2000 }, (_, i) => kept(`lamp-${i}`, 'Pier'))
    const started = performance.now()
    const read = opened(written(lamps))
    expect(performance.now() - started).toBeLessThan(4000)
    expect(new Set(read.lamps.map(({ lamp }) => lamp.name)).size).toBe(2000)
  })
})

describe('opened lamps put with one’s own', () => {
  const mine = [kept('a', 'Pier'), kept('b', 'Shed')]

  it('come in once however often they are opened', () => {
    const once = mergeLamps(mine, [kept('c', 'Attic'), kept('a', 'Pier')])
    expect(once).toMatchObject({ added: 1, alreadyThere: 1, renamed: [] })
    expect(mergeLamps(once.lamps, [kept('c', 'Attic')])).toMatchObject({ added: 0 })
  })

  it('take nothing from what there was', () => {
    const { lamps, renamed } = mergeLamps(mine, [kept('a', 'Other'), kept('d', 'SHED')])
    expect(lamps.slice(0, 2)).toStrictEqual(mine)
    expect(lamps[2]!.lamp.name).toBe('Other')
    expect(lamps[2]!.id).not.toBe('a')
    expect(lamps[3]).toStrictEqual(kept('d', 'SHED (2)'))
    expect(renamed).toEqual([{ from: 'SHED', to: 'SHED (2)' }])
  })
})

describe('names', () => {
  it('count on instead of piling up', () => {
    expect(freeName('Pier', [])).toBe('Pier')
    expect(freeName('Pier', ['pier'])).toBe('Pier (2)')
    expect(freeName('Pier (2)', ['Pier', 'Pier (2)'])).toBe('Pier (3)')
  })

  it('stay within their length and cut no character in half', () => {
    const long = '💡'.repeat(30)
    const next = freeName(long, [long])
    expect(next.length).toBeLessThanOrEqual(60)
    expect(next).toBe(`${'💡'.repeat(28)} (2)`)
  })

  it('differ for a copy, which has an id of its own', () => {
    const copy = duplicateOf(kept('a', 'Pier'), [kept('a', 'Pier')])
    expect(copy.lamp).toStrictEqual(kept('a', 'Pier (2)').lamp)
    expect(copy.id).not.toBe('a')
    expect(isLampId(newLampId())).toBe(true)
  })
})
