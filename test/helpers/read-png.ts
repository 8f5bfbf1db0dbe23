import { inflateSync } from 'node:zlib';

/** Reads an 8-bit RGBA or RGB PNG without interlace (W3C 2003, sections 9 and 11). @throws on any other */
export function readPng(bytes: Uint8Array): {
  readonly width: number;
  readonly height: number;
  readonly perMetre: number | null;
  readonly pixels: Uint8Array;
} {
  const view = Buffer.from(bytes);
  if (view.toString('latin1', 1, 4) !== 'PNG') throw new Error('not a PNG');
  let [width, height, channels] = [0, 0, 4];
  let perMetre: number | null = null;
  const parts: Buffer[] = [];
  for (let i = 8; i < view.length; ) {
    const length = view.readUInt32BE(i);
    const type = view.toString('latin1', i + 4, i + 8);
    const data = view.subarray(i + 8, i + 8 + length);
    if (type === 'IHDR') {
      [width, height] = [data.readUInt32BE(0), data.readUInt32BE(4)];
      if (data[8] !== 8 || data[12] !== 0) throw new Error('unexpected kind of PNG');
      channels = data[9] === 6 ? 4 : 3;
    } else if (type === 'pHYs') perMetre = data.readUInt32BE(0);
    else if (type === 'IDAT') parts.push(data);
    i += 12 + length;
  }
  const raw = inflateSync(Buffer.concat(parts));
  const stride = width * channels;
  const out = new Uint8Array(width * height * 4).fill(255);
  let above = new Uint8Array(stride);
  for (let y = 0; y < height; y++) {
    const filter = raw[y * (stride + 1)] as number;
    const line = Uint8Array.from(raw.subarray(y * (stride + 1) + 1, (y + 1) * (stride + 1)));
    for (let x = 0; x < stride; x++) {
      const left = x >= channels ? line[x - channels]! : 0;
      const up = above[x]!;
      const corner = x >= channels ? above[x - channels]! : 0;
      line[x] = line[x]! + [0, left, up, (left + up) >> 1, paeth(left, up, corner)][filter]!;
    }
    for (let x = 0; x < width; x++) out.set(line.subarray(x * channels, x * channels + channels), (y * width + x) * 4);
    above = line;
  }
  return { width, height, perMetre, pixels: out };
}

function paeth(a: number, b: number, c: number): number {
  const [pa, pb, pc] = [Math.abs(b - c), Math.abs(a - c), Math.abs(a + b - 2 * c)];
  return pa <= pb && pa <= pc ? a : pb <= pc ? b : c;
}
