import { crc32 } from 'node:zlib';

/** Bytes of a PNG before its first chunk ends: the signature and the header chunk. */
const AFTER_HEADER = 8 + 25;

/**
 * A PNG with its resolution stated in a `pHYs` chunk, so that programs print it at its true size.
 * @see Portable Network Graphics (PNG) Specification, second edition (W3C, 2003), 11.3.5.3
 */
export function withResolution(png: Uint8Array, dpi: number): Uint8Array {
  const perMetre = Math.round(dpi / 0.0254);
  const chunk = Buffer.alloc(21);
  chunk.writeUInt32BE(9, 0);
  chunk.write('pHYs', 4, 'latin1');
  chunk.writeUInt32BE(perMetre, 8);
  chunk.writeUInt32BE(perMetre, 12);
  chunk.writeUInt8(1, 16);
  chunk.writeUInt32BE(crc32(chunk.subarray(4, 17)), 17);
  return new Uint8Array(Buffer.concat([png.subarray(0, AFTER_HEADER), chunk, png.subarray(AFTER_HEADER)]));
}
