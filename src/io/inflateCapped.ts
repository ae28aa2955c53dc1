import { Inflate } from 'fflate'

const stepBytes = 64

/**
 * Undoes a raw deflate, but gives up once more than `most` bytes have come out: a few bytes can
 * unfold to a thousand times their size. Fed in small steps, so that no step unfolds to much.
 */
export function inflateCapped(
  bytes: Uint8Array,
  most: number,
):
  | { readonly ok: true; readonly bytes: Uint8Array }
  | { readonly ok: false; readonly why: 'large' | 'damaged' } {
  const pieces: Uint8Array[] = []
  let size = 0
  try {
    const inflate = new Inflate((piece) => {
      pieces.push(piece)
      size += piece.length
    })
    for (let at = 0; at < bytes.length; at += stepBytes) {
      inflate.push(bytes.subarray(at, at + stepBytes), at + stepBytes >= bytes.length)
      if (size > most) return { ok: false, why: 'large' }
    }
  } catch {
    return { ok: false, why: 'damaged' }
  }
  const all = new Uint8Array(size)
  let filled = 0
  for (const piece of pieces) {
    all.set(piece, filled)
    filled += piece.length
  }
  return { ok: true, bytes: all }
}
