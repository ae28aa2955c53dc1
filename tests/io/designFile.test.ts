import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fileNameFor, readDesignFile, writeDesignFile } from '../../src/io/designFile'
import { anyDesign, benchDesign } from './any-design'

function textOf(design: typeof benchDesign): string {
  const written = writeDesignFile(design)
  if (!written.ok) throw new Error(written.message)
  return written.text
}

function messageOf(text: string): string {
  const opened = readDesignFile(text)
  return opened.ok ? 'opened' : opened.message
}

describe('a saved file', () => {
  it('brings every design back bit for bit', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        expect(readDesignFile(textOf(design))).toStrictEqual({ ok: true, design, notes: [] })
      }),
      { seed: 71, numRuns: 200 },
    )
  })

  it('can be read by a person: named fields, a line each, and its units', () => {
    const text = textOf(benchDesign)
    expect(text).toMatch(/^\{\n {2}"program": "Glowloop",\n {2}"format": 1,\n/)
    expect(text).toContain('"units": "volts, amperes, ohms, farads, seconds')
    expect(text).toContain('\n      "seriesResistance": 2200000,\n')
    expect(text).toContain('"current": 2.1e-7')
    expect(text.endsWith('}\n')).toBe(true)
  })

  it('opens after an editor has put a byte order mark and other line ends', () => {
    const edited = `\uFEFF${textOf(benchDesign).replaceAll('\n', '\r\n')}`
    expect(readDesignFile(edited)).toMatchObject({ ok: true, design: benchDesign })
  })

  it.each<[string, string, string]>([
    ['nothing', '', 'This file is empty.'],
    ['blanks', ' \n', 'This file is empty.'],
    ['prose', 'Dear all, the beacon is out.', 'cannot be read as a design'],
    ['half a design', textOf(benchDesign).slice(0, 200), 'cannot be read as a design'],
    ['another program’s data', '{"program":"Other","format":1}', 'not a design saved by Glowloop'],
    ['a list', '[1,2,3]', 'not a design saved by Glowloop'],
    ['null', 'null', 'not a design saved by Glowloop'],
    ['a newer format', '{"program":"Glowloop","format":9,"design":{}}', 'newer Glowloop: format 9'],
    ['no design', '{"program":"Glowloop","format":1}', 'not a design'],
    ['brackets without end', '['.repeat(500_000), 'cannot be read as a design'],
    ['an infinite voltage', textOf(benchDesign).replace('118.5', '1e999'), 'here it is ∞'],
  ])('that holds %s is refused with a sentence', (_, text, sentence) => {
    expect(messageOf(text)).toContain(sentence)
  })

  it('is not even parsed above two million characters', () => {
    expect(messageOf(textOf(benchDesign) + ' '.repeat(2_000_000))).toContain('far larger')
  })

  it('is not written for a design that could not be opened again', () => {
    const stage = { ...benchDesign.stage, capacitance: -1 }
    expect(writeDesignFile({ ...benchDesign, stage })).toMatchObject({
      ok: false,
      message: expect.stringContaining('capacitor'),
    })
  })
})

describe('the name of a file', () => {
  it.each([
    ['Jetty light, north end', 'jetty-light-north-end.glowloop.json'],
    ['', 'design.glowloop.json'],
    ['../../etc/passwd', 'etc-passwd.glowloop.json'],
    ['Boje № 3 – Süd', 'boje-3-süd.glowloop.json'],
    ['浮標', '浮標.glowloop.json'],
    ['CON', 'design-con.glowloop.json'],
    ['a\u0000b\nc\u202Ed', 'a-b-c-d.glowloop.json'],
    ['—', 'design.glowloop.json'],
  ])('for %j is %s', (title, name) => {
    expect(fileNameFor({ ...benchDesign, title })).toBe(name)
  })

  it('holds only letters, marks, digits and hyphens, and is short, whatever the title', () => {
    fc.assert(
      fc.property(anyDesign, (design) => {
        const name = fileNameFor(design)
        expect(name).toMatch(
          /^[\p{L}\p{M}\p{N}][\p{L}\p{M}\p{N}-]*\.glowloop\.json$|^[\p{L}\p{M}\p{N}]+\.glowloop\.json$/u,
        )
        // File systems allow 255 bytes.
        expect(new TextEncoder().encode(name).length).toBeLessThanOrEqual(255)
      }),
      { seed: 72, numRuns: 300 },
    )
  })
})
