import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { checksum } from '../../src/io/checksum'

const bytesOf = (text: string) => new TextEncoder().encode(text)

describe('checksum', () => {
  it('gives the check value published for CRC-32', () => {
    // "123456789" → CBF43926: the check column for CRC-32/ISO-HDLC in the catalogue of parametrised
    // CRC algorithms.
    expect(checksum(bytesOf('123456789'))).toBe(0xcbf43926)
  })

  it('is zero for no bytes', () => {
    expect(checksum(new Uint8Array())).toBe(0)
  })

  it('tells apart any two texts that differ within four bytes in a row', () => {
    fc.assert(
      fc.property(
        fc.uint8Array({ minLength: 4, maxLength: 300 }),
        fc.nat(),
        fc.integer({ min: 1, max: 0xffffffff }),
        (bytes, at, change) => {
          const changed = bytes.slice()
          const start = at % (bytes.length - 3)
          for (let i = 0; i < 4; i += 1) {
            changed[start + i] = (bytes[start + i] ?? 0) ^ ((change >>> (8 * i)) & 0xff)
          }
          expect(checksum(changed)).not.toBe(checksum(bytes))
        },
      ),
      { seed: 41, numRuns: 500 },
    )
  })
})
