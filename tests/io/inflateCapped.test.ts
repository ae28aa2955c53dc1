import { deflateRawSync } from 'node:zlib'
import { deflateSync } from 'fflate'
import { describe, expect, it } from 'vitest'
import { inflateCapped } from '../../src/io/inflateCapped'

const text = new TextEncoder().encode('a glow lamp, a resistor and a capacitor; '.repeat(20))

describe('inflateCapped', () => {
  it('undoes a raw deflate, of another maker too', () => {
    expect(inflateCapped(deflateSync(text), 10_000)).toEqual({ ok: true, bytes: text })
    expect(inflateCapped(new Uint8Array(deflateRawSync(text)), 10_000)).toEqual({
      ok: true,
      bytes: text,
    })
  })

  it('gives up on a few bytes that unfold to very many', () => {
    const bomb = deflateSync(new Uint8Array(50_000_000), { level: 9 })
    expect(bomb.length).toBeLessThan(60_000)
    const before = performance.now()
    expect(inflateCapped(bomb, 64_000)).toEqual({ ok: false, why: 'large' })
    expect(performance.now() - before).toBeLessThan(1000)
  })

  it('says so when the data is cut short or is no deflate at all', () => {
    const data = deflateSync(text)
    for (let length = 0; length < data.length; length += 1) {
      const cut = inflateCapped(data.subarray(0, length), 10_000)
      if (length > 0) expect(cut, `${length} bytes`).toEqual({ ok: false, why: 'damaged' })
    }
    expect(inflateCapped(Uint8Array.of(7, 7, 7, 7), 10_000)).toEqual({ ok: false, why: 'damaged' })
  })
})
