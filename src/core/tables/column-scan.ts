import { type Coded, type Codes, codesFor } from "../study/coded.ts";

/** Where a cell's content stands in the bytes of its file. */
export interface Piece {
  readonly from: number;
  readonly to: number;
  /** Over its bytes as they are read. */
  readonly hash: number;
  /** The sign that stands twice for itself in it, or none. */
  readonly doubled: number;
}

export const NO_SIGN = -1;

/** A column being read: each distinct content has a number, in the order first met, and stays where it is. */
export interface ColumnScan {
  readonly pieces: Piece[];
  /** Number of a content plus one, by its hash, open addressing; 0 is free. */
  slots: Int32Array;
  codes: Codes;
}

const FIRST_SLOTS = 16;
const FIRST_ROWS = 1000;

export const columnScan = (): ColumnScan => ({
  pieces: [],
  slots: new Int32Array(FIRST_SLOTS),
  codes: new Uint8Array(FIRST_ROWS),
});

/** One step of a content's hash: 0, then over its bytes (FNV-1a). */
export const hashStep = (hash: number, byte: number): number => Math.imul(hash ^ byte, 0x01000193);

/** FNV leaves its low bits poor; this mixes the high ones in. */
const slotOf = (hash: number): number => {
  const mixed = Math.imul(hash ^ (hash >>> 15), 0x2c1b3c6d);
  return mixed ^ (mixed >>> 13);
};

/** A content where it stands. */
interface Placed {
  readonly bytes: Uint8Array;
  readonly piece: Piece;
}

/** Puts a content into a row. */
export function addCode(column: ColumnScan, row: number, { bytes, piece }: Placed): void {
  const { pieces, slots } = column;
  const mask = slots.length - 1;
  let slot = slotOf(piece.hash) & mask;
  for (let code = slots[slot] - 1; code !== -1; code = slots[slot] - 1) {
    if (isSame(bytes, pieces[code], piece)) {
      column.codes[row] = code;
      return;
    }
    slot = (slot + 1) & mask;
  }
  const code = pieces.push({ ...piece }) - 1;
  slots[slot] = code + 1;
  if (2 * pieces.length >= slots.length) moreSlots(column);
  if (code === 0x100 || code === 0x10000)
    column.codes = moved(column.codes, codesFor(code + 1, column.codes.length));
  column.codes[row] = code;
}

function moreSlots(column: ColumnScan): void {
  const slots = new Int32Array(4 * column.slots.length);
  const mask = slots.length - 1;
  for (const [code, { hash }] of column.pieces.entries()) {
    let slot = slotOf(hash) & mask;
    while (slots[slot] !== 0) slot = (slot + 1) & mask;
    slots[slot] = code + 1;
  }
  column.slots = slots;
}

function moved(codes: Codes, to: Codes): Codes {
  to.set(codes);
  return to;
}

/** Makes room for so many rows. */
export function roomFor(column: ColumnScan, rows: number): void {
  column.codes = moved(column.codes, codesFor(column.pieces.length, rows));
}

export const finished = (
  { pieces, codes }: ColumnScan,
  rows: number,
  textOf: (piece: Piece) => string,
): Coded<string> => ({ values: pieces.map(textOf), codes: codes.slice(0, rows) });

function isSame(bytes: Uint8Array, known: Piece, piece: Piece): boolean {
  if (known.hash !== piece.hash) return false;
  if (known.doubled !== NO_SIGN || piece.doubled !== NO_SIGN) return isReadTheSame(bytes, known, piece);
  const length = piece.to - piece.from;
  if (known.to - known.from !== length) return false;
  for (let at = 0; at < length; at++) if (bytes[known.from + at] !== bytes[piece.from + at]) return false;
  return true;
}

function isReadTheSame(bytes: Uint8Array, known: Piece, piece: Piece): boolean {
  const [one, other] = [contentOf(bytes, known), contentOf(bytes, piece)];
  return one.length === other.length && one.every((byte, at) => byte === other[at]);
}

/** The bytes of a content as they are read: a doubled sign once. */
export function contentOf(bytes: Uint8Array, { from, to, doubled }: Piece): Uint8Array {
  const raw = bytes.subarray(from, to);
  if (doubled === NO_SIGN) return raw;
  const content: number[] = [];
  for (let at = 0; at < raw.length; at++) {
    content.push(raw[at]);
    if (raw[at] === doubled) at += 1;
  }
  return Uint8Array.from(content);
}
