import { contentOf, NO_SIGN, type Piece } from "./column-scan.ts";
import type { PlainBytes } from "./plain-bytes.ts";

/** Pieces that are worth to be read together. */
const MANY = 100;

/** The texts of pieces; those of plain letters are read together, for one by one the decoder takes its time. */
export function textsOf(pieces: readonly Piece[], { bytes, decode }: PlainBytes): readonly string[] {
  const areAscii = pieces.every(({ from, to, doubled }) => doubled === NO_SIGN && isAscii(bytes, from, to));
  if (!areAscii || pieces.length < MANY) return pieces.map((piece) => decode(contentOf(bytes, piece)));
  const joined = new Uint8Array(pieces.reduce((sum, { from, to }) => sum + to - from, 0));
  let length = 0;
  for (const { from, to } of pieces) {
    joined.set(bytes.subarray(from, to), length);
    length += to - from;
  }
  const text = decode(joined);
  let at = 0;
  return pieces.map(({ from, to }) => {
    at += to - from;
    return text.slice(at - (to - from), at);
  });
}

function isAscii(bytes: Uint8Array, from: number, to: number): boolean {
  for (let at = from; at < to; at++) if (bytes[at] < 0x20 || bytes[at] > 0x7e) return false;
  return true;
}
