import fc from 'fast-check'
import { deflateSync, strToU8 } from 'fflate'
import { describe, expect, it } from 'vitest'
import type { Design } from '../../src/core'
import { toBase64url } from '../../src/io/base64url'
import { checksum } from '../../src/io/checksum'
import { packDesign } from '../../src/io/designFormat'
import { linkFragment, longestFragment, openFragment } from '../../src/io/link'
import { anyDesign, benchDesign } from './any-design'
import { frozenLinks } from './frozen-links'

function fragmentOf(design: Design): string {
  const link = linkFragment(design)
  if (!link.ok) throw new Error(link.message)
  return link.fragment
}

/** A link made by hand around any data, with a right checksum. */
function forge(format: number, data: Uint8Array): string {
  const sum = checksum(Uint8Array.of(...strToU8(`${format}.`), ...data))
  return `#${format}.${sum.toString(16).padStart(8, '0')}.${toBase64url(data)}`
}

function messageOf(hash: string): string {
  const opened = openFragment(hash)
  return opened === null ? 'nothing' : opened.ok ? 'opened' : opened.message
}

const opensBench = { ok: true, design: benchDesign, notes: [] }
const good = fragmentOf(benchDesign)
const everyAlphabetCharacter = 'ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789-_'

describe('a link', () => {
  it('of every version ever sent out still opens the same design', () => {
    expect(frozenLinks.length).toBeGreaterThan(0)
    for (const { version, fragment, design } of frozenLinks) {
      expect(openFragment(fragment), `version ${version}`).toStrictEqual({
        ok: true,
        design,
        notes: [],
      })
    }
  })

  it('brings every design back bit for bit, or says that it is too long', () => {
    let linked = 0
    fc.assert(
      fc.property(anyDesign, (design) => {
        const link = linkFragment(design)
        if (link.ok) {
          linked += 1
          expect(link.fragment.length).toBeLessThanOrEqual(longestFragment)
          expect(link.fragment).toMatch(/^#1\.[0-9a-f]{8}\.[\w-]+$/)
          expect(openFragment(link.fragment)).toStrictEqual({ ok: true, design, notes: [] })
        } else expect(link.message).toContain('shorten the note, or save a file')
      }),
      { seed: 61, numRuns: 400 },
    )
    expect(linked).toBeGreaterThan(200)
  })

  it('stays well under 400 characters for a usual design', () => {
    expect(good.length).toBeLessThan(400)
  })

  it('fits for 64 knots read from a meter to four figures, with all texts full', () => {
    const words =
      'The boathouse stack was changed in spring and the lamp is the third from the bag. '
    const knots = Array.from({ length: 64 }, (_, i) => ({
      current: i === 0 ? 0 : Number((1e-8 * 1.27 ** i).toPrecision(4)),
      voltage: i === 0 ? 0 : Number((60 + 17 * Math.sin(i * i)).toPrecision(4)),
    }))
    const design: Design = {
      title: words.slice(0, 80),
      note: words.repeat(6).slice(0, 400),
      lampName: words.slice(0, 60),
      stage: { ...benchDesign.stage, lamp: { ...benchDesign.stage.lamp, knots } },
    }
    expect(fragmentOf(design).length).toBeLessThan(1500)
  })

  it('fits for 64 knots of full precision without texts', () => {
    const knots = Array.from({ length: 64 }, (_, i) => ({
      current: i === 0 ? 0 : 1e-8 * 1.2345678901234 ** i,
      voltage: i === 0 ? 0 : 60 + 17 * Math.sin(i * i),
    }))
    const stage = { ...benchDesign.stage, lamp: { ...benchDesign.stage.lamp, knots } }
    expect(fragmentOf({ title: '', note: '', lampName: '', stage }).length).toBeLessThan(2000)
  })

  it('is refused for a design that could not be opened again', () => {
    const stage = { ...benchDesign.stage, supplyVoltage: Number.POSITIVE_INFINITY }
    expect(linkFragment({ ...benchDesign, stage })).toMatchObject({
      ok: false,
      message: expect.stringContaining('supply voltage'),
    })
  })
})

describe('opening a link', () => {
  it('finds nothing in an empty one', () => {
    for (const hash of ['', '#', ' ', '#\n', '%20']) expect(openFragment(hash)).toBeNull()
  })

  it('takes it with or without its leading sign', () => {
    expect(openFragment(good)).toStrictEqual(opensBench)
    expect(openFragment(good.slice(1))).toStrictEqual(opensBench)
  })

  it.each<[string, (link: string) => string]>([
    ['percent-encoded dots', (link) => link.replaceAll('.', '%2E')],
    [
      'every character percent-encoded',
      (link) => link.replace(/./g, (one) => `%${one.charCodeAt(0).toString(16).padStart(2, '0')}`),
    ],
    ['a full stop', (link) => `${link}.`],
    ['a closing bracket and a comma', (link) => `${link}),`],
    ['a quote and an angle bracket', (link) => `${link}”>`],
    ['an encoded bracket', (link) => `${link}%3E`],
    ['padding', (link) => `${link}==`],
    ['spaces and a line end', (link) => ` ${link} \r\n`],
    ['a line broken by mail', (link) => `${link.slice(0, 76)}\r\n ${link.slice(76)}`],
    ['invisible spaces', (link) => `${link.slice(0, 40)}\u200B${link.slice(40)}\uFEFF`],
    ['its sign doubled', (link) => `#${link}`],
  ])('forgives %s', (_, treat) => {
    expect(openFragment(treat(good))).toStrictEqual(opensBench)
  })

  it('never opens one with a single character changed', () => {
    let tried = 0
    for (let at = 1; at < good.length; at += 1) {
      for (const other of everyAlphabetCharacter) {
        if (other === good[at]) continue
        const changed = good.slice(0, at) + other + good.slice(at + 1)
        expect(openFragment(changed)?.ok, changed).toBe(false)
        tried += 1
      }
    }
    expect(tried).toBe(
      (good.length - 1) * 64 - [...good.slice(1)].filter((one) => one !== '.').length,
    )
  })

  it('never opens one with a character changed to anything else, or lost, or two swapped', () => {
    fc.assert(
      fc.property(
        anyDesign,
        fc.nat(),
        fc.string({ unit: 'binary', minLength: 0, maxLength: 1 }),
        (design, place, other) => {
          const link = linkFragment(design)
          fc.pre(link.ok)
          const { fragment } = link as { fragment: string }
          const at = 1 + (place % (fragment.length - 2))
          const before = fragment.slice(0, at)
          for (const changed of [
            before + other + fragment.slice(at + 1),
            before + fragment.charAt(at + 1) + fragment.charAt(at) + fragment.slice(at + 2),
          ]) {
            const opened = openFragment(changed)
            // Swapping two equal characters changes nothing; anything else must show.
            if (opened?.ok) expect(changed).toBe(fragment)
          }
        },
      ),
      { seed: 62, numRuns: 400 },
    )
  })

  it('never opens one cut short, wherever it is cut', () => {
    for (let length = 2; length < good.length; length += 1) {
      expect(openFragment(good.slice(0, length))?.ok, good.slice(0, length)).toBe(false)
    }
  })

  it('says that it is damaged, in words', () => {
    const damaged = 'This link is damaged'
    expect(messageOf(good.slice(0, -5))).toContain(damaged)
    expect(messageOf(good.replace(/\w$/, '!x'))).toContain(damaged)
    expect(messageOf('#1.00000000.')).toContain(damaged)
    expect(messageOf('#1.')).toContain(damaged)
    expect(messageOf(forge(1, Uint8Array.of(7, 7, 7)))).toContain(damaged)
    expect(messageOf(forge(1, deflateSync(strToU8('{"half"'))))).toContain(damaged)
    expect(messageOf(forge(1, deflateSync(Uint8Array.of(0xff, 0xfe))))).toContain(damaged)
  })

  it('tells a link of another kind and a newer one apart', () => {
    expect(messageOf('#plane')).toBe('The end of this address is not a design of Glowloop.')
    expect(messageOf('#%E0%A4%A')).toContain('not a design of Glowloop')
    expect(messageOf(good.replace('#1.', '#7.'))).toBe(
      'It was made by a newer Glowloop: format 7, this one reads up to 2.',
    )
    expect(messageOf(good.replace('#1.', '#0.'))).toContain('in which format')
  })

  it('refuses what is too long before it unpacks anything', () => {
    expect(messageOf(`#1.00000000.${'A'.repeat(2000)}`)).toContain('too long')
    expect(messageOf('%'.repeat(1e7))).toContain('too long')
  })

  it('refuses a short link that unpacks to far too much', () => {
    const bomb = forge(1, deflateSync(new Uint8Array(1_000_000).fill(32), { level: 9 }))
    expect(bomb.length).toBeLessThan(longestFragment)
    expect(messageOf(bomb)).toContain('far more than a design can be')
  })

  it('refuses well-packed data of the wrong shape', () => {
    const packed = packDesign(benchDesign) as unknown[]
    const send = (value: unknown) =>
      messageOf(forge(1, deflateSync(strToU8(JSON.stringify(value)))))
    expect(send(packed)).toBe('opened')
    expect(send(null)).toContain('not a design')
    expect(send({ __proto__: null, title: 'x' })).toContain('not a design')
    expect(send([...packed, 1])).toContain('not a design')
    expect(send([7, ...packed.slice(1)])).toContain('not a design')
    expect(send(['x'.repeat(81), ...packed.slice(1)])).toContain('The title may be at most 80')
    expect(messageOf(forge(1, deflateSync(strToU8('[1e999]'))))).toContain('not a design')
    expect(messageOf(forge(1, deflateSync(strToU8('['.repeat(60_000)))))).not.toBe('opened')
  })

  it('answers anything typed after the sign without throwing', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'binary', maxLength: 60 }), (text) => {
        expect(openFragment(`#${text}`)?.ok).not.toBe(true)
        expect(openFragment(`#1.${text}`)?.ok).toBe(false)
      }),
      { seed: 63, numRuns: 1000 },
    )
  })
})
