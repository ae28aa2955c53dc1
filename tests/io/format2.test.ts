import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { type Design, noConditions, typedDetails } from '../../src/core'
import { decodeDesign, encodeDesign, packDesign, unpackDesign } from '../../src/io/designFormat'
import { linkFragment, longestFragment, openFragment } from '../../src/io/link'
import { anyDesign, benchDesign } from './any-design'
import { anyLamp, sweptLamp } from './any-lamp'

const conditions = {
  ...noConditions,
  on: true,
  surroundings: 'dark' as const,
  temperature: -5,
  timeOfUse: 3.6e6,
}

const detailed: Design = {
  ...benchDesign,
  lampDetails: {
    ...typedDetails,
    origin: 'sweep',
    note: 'Lens slightly grey.',
    baseResistance: 22e3,
    otherWay: sweptLamp.reverseKnots,
    spread: sweptLamp.spread,
    facts: sweptLamp.facts,
    measured: sweptLamp.measured,
    conditions,
  },
}

const anyDetailed: fc.Arbitrary<Design> = fc
  .tuple(anyDesign, anyLamp, fc.constantFrom(noConditions, conditions))
  .map(([design, lamp, given]) => ({
    ...design,
    lampDetails: {
      origin: lamp.origin,
      note: lamp.note,
      baseResistance: lamp.baseResistance,
      otherWay: lamp.reverseKnots,
      spread: lamp.spread,
      facts: lamp.facts,
      measured: lamp.measured,
      conditions: given,
    },
  }))

describe('format 2, which carries what is known of the lamp', () => {
  it('brings every design back, named and packed', () => {
    fc.assert(
      fc.property(anyDetailed, (design) => {
        const named = decodeDesign(JSON.parse(JSON.stringify(encodeDesign(design))))
        expect(named).toStrictEqual({ ok: true, design, notes: [] })
        const packed = unpackDesign(2, JSON.parse(JSON.stringify(packDesign(design))))
        // A lamp of which nothing is known beyond its figures travels without details.
        const bare = JSON.stringify(design.lampDetails) === JSON.stringify(typedDetails)
        if (!bare) expect(packed).toStrictEqual({ ok: true, design, notes: [] })
      }),
      { seed: 2, numRuns: 200 },
    )
  })

  it('writes a design without such knowledge in format 1, so that older pages can read it', () => {
    const link = linkFragment(benchDesign)
    expect(link.ok && link.fragment.slice(0, 3)).toBe('#1.')
    expect(encodeDesign(benchDesign).format).toBe(1)
    expect(encodeDesign(detailed).format).toBe(2)
  })

  it('carries it in a link', () => {
    const link = linkFragment(detailed)
    if (!link.ok) throw new Error(link.message)
    expect(link.leftOut).toBeNull()
    expect(openFragment(link.fragment)).toStrictEqual({ ok: true, design: detailed, notes: [] })
  })

  it('leaves the readings behind where the link would be too long, and says so', () => {
    const rows = Array.from({ length: 900 }, (_, k) => [k, Math.round(1e6 * Math.sin(k)) / 7])
    const measured: Design = { ...detailed, lampDetails: { ...typedDetails, measured: rows } }
    const link = linkFragment(measured)
    if (!link.ok) throw new Error(link.message)
    expect(link.fragment.length).toBeLessThanOrEqual(longestFragment)
    expect(link.leftOut).toContain('readings')
    const opened = openFragment(link.fragment)
    expect(opened?.ok && opened.design.stage).toStrictEqual(measured.stage)
  })

  it.each([
    [
      'a spread out of order',
      { spread: { ...sweptLamp.spread, strike: { low: 9, typical: 8, high: 7 } } },
    ],
    ['conditions that are none', { conditions: { ...conditions, temperature: 5000 } }],
    ['a base resistor below nothing', { baseResistance: -1 }],
    ['an origin of its own', { origin: 'hearsay' }],
    ['a curve that is none', { otherWay: [{ current: 1, voltage: 1 }] }],
    ['far too many facts', { facts: Array.from({ length: 5000 }, () => null) }],
    ['a fact that is none', { facts: [{ label: 1 }] }],
  ])('refuses %s with a sentence', (_, lampDetails) => {
    const { design } = encodeDesign(benchDesign) as { design: object }
    const opened = decodeDesign({ format: 2, design: { ...design, lampDetails } })
    expect(!opened.ok && opened.message).toContain('about the lamp cannot be read')
  })

  it('refuses fields that would reach a prototype', () => {
    const { design } = encodeDesign(benchDesign) as { design: object }
    const measured = JSON.parse('{"__proto__":{"polluted":1}}')
    const opened = decodeDesign({ format: 2, design: { ...design, lampDetails: { measured } } })
    expect(opened.ok).toBe(false)
    expect(({} as Record<string, unknown>).polluted).toBeUndefined()
  })

  it('names what it does not know and leaves it out', () => {
    const { design } = encodeDesign(benchDesign) as { design: object }
    const opened = decodeDesign({
      format: 2,
      design: { ...design, lampDetails: { colour: 'red' } },
    })
    expect(opened.ok && opened.notes[0]).toContain('“colour”')
  })
})
