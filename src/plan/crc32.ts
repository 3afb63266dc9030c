/** The polynomial of ISO 3309 with its bits in reverse, as ZIP takes it (APPNOTE 6.3.10, 4.4.7). */
const POLYNOMIAL = 0xedb88320;

const TABLE = Int32Array.from({ length: 256 }, (_, byte) => {
  let sum = byte;
  for (let bit = 0; bit < 8; bit += 1) sum = (sum >>> 1) ^ (sum & 1 ? POLYNOMIAL : 0);
  return sum;
});

/** The CRC-32 of bytes, 0..2^32 - 1. */
export function crc32(bytes: Uint8Array): number {
  let sum = -1;
  // By index: an iterator takes three times as long.
  for (let at = 0; at < bytes.length; at += 1)
    sum = (sum >>> 8) ^ (TABLE[(sum ^ (bytes[at] as number)) & 255] as number);
  return ~sum >>> 0;
}
