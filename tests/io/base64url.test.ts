import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { fromBase64url, toBase64url } from '../../src/io/base64url'

describe('base64url', () => {
  // RFC 4648 section 10, without the padding.
  it.each([
    ['', ''],
    ['f', 'Zg'],
    ['fo', 'Zm8'],
    ['foo', 'Zm9v'],
    ['foob', 'Zm9vYg'],
    ['fooba', 'Zm9vYmE'],
    ['foobar', 'Zm9vYmFy'],
  ])('writes %j as %j and reads it back', (text, encoded) => {
    const bytes = new TextEncoder().encode(text)
    expect(toBase64url(bytes)).toBe(encoded)
    expect(fromBase64url(encoded)).toEqual(bytes)
  })

  it('uses the two characters that need no escaping in an address', () => {
    expect(toBase64url(Uint8Array.of(0xfb, 0xff))).toBe('-_8')
  })

  it.each(['Zg==', 'Z', 'Zm9v!', 'Zm 9v', 'Zh', '+/8', 'é'])('refuses %j', (text) => {
    expect(fromBase64url(text)).toBeNull()
  })

  it('returns every sequence of bytes unchanged', () => {
    fc.assert(
      fc.property(fc.uint8Array({ maxLength: 200 }), (bytes) => {
        expect(fromBase64url(toBase64url(bytes))).toEqual(bytes)
      }),
      { seed: 42 },
    )
  })
})
