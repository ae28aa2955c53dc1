/** Bytes in the alphabet of RFC 4648 section 5, which needs no escaping in an address; unpadded. */
export function toBase64url(bytes: Uint8Array): string {
  const binary = Array.from(bytes, (byte) => String.fromCharCode(byte)).join('')
  return btoa(binary).replace(/\+/g, '-').replace(/\//g, '_').replace(/=+$/, '')
}

/**
 * The bytes of such a text. Null if it holds other characters, cannot end where it ends, or has
 * stray bits in its last character: one sequence of bytes has one spelling.
 */
export function fromBase64url(text: string): Uint8Array | null {
  if (!/^[\w-]*$/.test(text) || text.length % 4 === 1) return null
  const binary = atob(text.replace(/-/g, '+').replace(/_/g, '/'))
  const bytes = Uint8Array.from(binary, (character) => character.charCodeAt(0))
  return toBase64url(bytes) === text ? bytes : null
}
