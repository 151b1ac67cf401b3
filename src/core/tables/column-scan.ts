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

/** Numbers that a content is known by: where it begins and ends, its hash, the sign doubled in it. */
const FROM = 0;
const TO = 1;
const HASH = 2;
const DOUBLED = 3;
const NUMBERS = 4;

/** A column being read: each distinct content has a code, in the order first met, and stays where it is. */
export interface ColumnScan {
  /** The numbers of each content, one after the other. */
  contents: Int32Array;
  /** How many contents there are. */
  count: number;
  /** Code of a content plus one, by its hash, open addressing; 0 is free. */
  slots: Int32Array;
  codes: Codes;
  /** The code of the row before, and whether it was that of the row before it too. */
  last: number;
  isSteady: boolean;
}

const FIRST_SLOTS = 16;
const FIRST_ROWS = 1000;

export const columnScan = (): ColumnScan => ({
  contents: new Int32Array(NUMBERS * FIRST_SLOTS),
  count: 0,
  slots: new Int32Array(FIRST_SLOTS),
  codes: new Uint8Array(FIRST_ROWS),
  last: -1,
  isSteady: false,
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
  const { slots } = column;
  const mask = slots.length - 1;
  let slot = slotOf(piece.hash) & mask;
  let code = slots[slot] - 1;
  while (code !== -1 && !isSame(bytes, column.contents, { code, piece })) {
    slot = (slot + 1) & mask;
    code = slots[slot] - 1;
  }
  if (code === -1) {
    code = addContent(column, piece);
    slots[slot] = code + 1;
    if (2 * column.count >= slots.length) moreSlots(column);
  }
  column.isSteady = code === column.last;
  column.last = code;
  column.codes[row] = code;
}

function addContent(column: ColumnScan, { from, to, hash, doubled }: Piece): number {
  const code = column.count;
  column.count += 1;
  if (NUMBERS * column.count > column.contents.length)
    column.contents = moved(column.contents, new Int32Array(2 * column.contents.length));
  const { contents } = column;
  const at = NUMBERS * code;
  contents[at + FROM] = from;
  contents[at + TO] = to;
  contents[at + HASH] = hash;
  contents[at + DOUBLED] = doubled;
  if (code === 0x100 || code === 0x10000)
    column.codes = moved(column.codes, codesFor(code + 1, column.codes.length));
  return code;
}

/**
 * Where the cell ends if the content of the row before stands again at a place and ends there; else -1. Only plain
 * content can be told from its bytes alone.
 */
export function endIfRepeated({ contents, last }: ColumnScan, bytes: Uint8Array, start: number): number {
  const place = NUMBERS * last;
  if (contents[place + DOUBLED] !== NO_SIGN) return -1;
  const from = contents[place + FROM];
  const length = contents[place + TO] - from;
  for (let at = 0; at < length; at++) if (bytes[from + at] !== bytes[start + at]) return -1;
  return start + length;
}

function moreSlots(column: ColumnScan): void {
  const slots = new Int32Array(4 * column.slots.length);
  const mask = slots.length - 1;
  for (let code = 0; code < column.count; code++) {
    let slot = slotOf(column.contents[NUMBERS * code + HASH]) & mask;
    while (slots[slot] !== 0) slot = (slot + 1) & mask;
    slots[slot] = code + 1;
  }
  column.slots = slots;
}

function moved<T extends Codes>(codes: Codes, to: T): T {
  to.set(codes);
  return to;
}

/** Makes room for so many rows. */
export function roomFor(column: ColumnScan, rows: number): void {
  column.codes = moved(column.codes, codesFor(column.count, rows));
}

export const finished = (
  { contents, count, codes }: ColumnScan,
  rows: number,
  textsOf: (pieces: readonly Piece[]) => readonly string[],
): Coded<string> => ({
  values: textsOf(Array.from({ length: count }, (_, code) => pieceAt(contents, code))),
  codes: codes.subarray(0, rows),
});

const pieceAt = (contents: Int32Array, code: number): Piece => {
  const at = NUMBERS * code;
  return {
    from: contents[at + FROM],
    to: contents[at + TO],
    hash: contents[at + HASH],
    doubled: contents[at + DOUBLED],
  };
};

interface Known {
  readonly code: number;
  readonly piece: Piece;
}

function isSame(bytes: Uint8Array, contents: Int32Array, { code, piece }: Known): boolean {
  const place = NUMBERS * code;
  if (contents[place + HASH] !== piece.hash) return false;
  if (contents[place + DOUBLED] !== NO_SIGN || piece.doubled !== NO_SIGN)
    return isReadTheSame(bytes, pieceAt(contents, code), piece);
  const from = contents[place + FROM];
  const length = piece.to - piece.from;
  if (contents[place + TO] - from !== length) return false;
  for (let at = 0; at < length; at++) if (bytes[from + at] !== bytes[piece.from + at]) return false;
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
