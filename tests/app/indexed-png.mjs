import { crc32, deflateSync } from "node:zlib";

const MOST = 256;
const SIGNATURE = Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]);

/** A PNG of the commonest 256 colours, each pixel in the nearest: a third of the size for a page of few colours. */
export function indexedPng({ width, height, pixels }) {
  const palette = commonest(pixels);
  const indexOf = nearestIn(palette);
  const rows = Buffer.alloc(height * (width + 1));
  for (let y = 0; y < height; y++)
    for (let x = 0; x < width; x++) rows[y * (width + 1) + 1 + x] = indexOf(colourAt(pixels, y * width + x));
  const header = Buffer.alloc(13);
  header.writeUInt32BE(width, 0);
  header.writeUInt32BE(height, 4);
  header.set([8, 3, 0, 0, 0], 8);
  return Buffer.concat([
    SIGNATURE,
    chunk("IHDR", header),
    chunk("PLTE", Buffer.from(palette.flatMap(channels))),
    chunk("IDAT", deflateSync(rows, { level: 9 })),
    chunk("IEND", Buffer.alloc(0)),
  ]);
}

const colourAt = (pixels, i) => (pixels[4 * i] << 16) | (pixels[4 * i + 1] << 8) | pixels[4 * i + 2];
const channels = (colour) => [colour >> 16, (colour >> 8) & 255, colour & 255];

function commonest(pixels) {
  const counts = new Map();
  for (let i = 0; i < pixels.length / 4; i++) {
    const colour = colourAt(pixels, i);
    counts.set(colour, (counts.get(colour) ?? 0) + 1);
  }
  return [...counts]
    .toSorted((a, b) => b[1] - a[1] || a[0] - b[0])
    .slice(0, MOST)
    .map(([colour]) => colour);
}

const away = (a, b) => channels(a).reduce((sum, value, k) => sum + (value - channels(b)[k]) ** 2, 0);

function nearestIn(palette) {
  const known = new Map(palette.map((colour, i) => [colour, i]));
  return (colour) => {
    const before = known.get(colour);
    if (before !== undefined) return before;
    let best = 0;
    for (let i = 1; i < palette.length; i++)
      if (away(palette[i], colour) < away(palette[best], colour)) best = i;
    known.set(colour, best);
    return best;
  };
}

function chunk(type, content) {
  const body = Buffer.concat([Buffer.from(type, "latin1"), content]);
  const [length, check] = [Buffer.alloc(4), Buffer.alloc(4)];
  length.writeUInt32BE(content.length);
  check.writeUInt32BE(crc32(body));
  return Buffer.concat([length, body, check]);
}
