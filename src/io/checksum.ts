// CRC-32 as in ISO 3309 and ITU-T V.42: polynomial 0x04C11DB7, bits reflected.
const table = Uint32Array.from({ length: 256 }, (_, byte) => {
  let rest = byte
  for (let bit = 0; bit < 8; bit += 1) rest = rest & 1 ? (rest >>> 1) ^ 0xedb88320 : rest >>> 1
  return rest
})

/** CRC-32 of bytes as an unsigned whole number; finds every change confined to 32 bits in a row. */
export function checksum(bytes: Uint8Array): number {
  let crc = 0xffffffff
  for (const byte of bytes) crc = (crc >>> 8) ^ (table[(crc ^ byte) & 0xff] ?? 0)
  return (crc ^ 0xffffffff) >>> 0
}
