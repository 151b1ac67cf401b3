import type { Coded } from "../study/coded.ts";
import {
  addCode,
  type ColumnScan,
  columnScan,
  contentOf,
  endIfRepeated,
  finished,
  hashStep,
  NO_SIGN,
  type Piece,
  roomFor,
} from "./column-scan.ts";
import { textsOf } from "./piece-texts.ts";

export interface Scanning {
  /** A sign of one byte. */
  readonly delimiter: string;
  readonly quote: string;
  /** Columns of the table. */
  readonly width: number;
  /** Records before the first one to keep; blank ones are not counted. */
  readonly skip: number;
  /** The text of bytes; throws where they are none. */
  readonly decode: (bytes: Uint8Array) => string;
}

/** The cells of a table, column by column, and the rows that have another number of cells. */
export interface ScannedCells {
  readonly columns: readonly Coded<string>[];
  /** The row numbers that a spreadsheet shows. */
  readonly rows: Int32Array;
  readonly uneven: readonly UnevenRow[];
}

interface UnevenRow {
  readonly index: number;
  readonly cells: number;
  /** True where a cell beyond the last column holds something. */
  readonly isOverfull: boolean;
  /** Where it stands among the bytes. */
  readonly from: number;
  readonly to: number;
}

const LINE_FEED = 10;
const RETURN = 13;

/** Rows whose length tells how much room all of them need. */
const SAMPLED_ROWS = 1000;

/**
 * Reads every cell of a delimited text into coded columns, from bytes in which ASCII signs stand for themselves: one
 * pass, and a string for each distinct cell alone. Blank records are passed over, cells that a row lacks are blank.
 * Undefined where a quote stands where none belongs: that is for a reader that can tell what is wrong.
 */
export function scanCells(bytes: Uint8Array, scanning: Scanning): ScannedCells | undefined {
  const { width, skip, decode } = scanning;
  const record = recordScan(bytes, scanning);
  let columns = Array.from({ length: width }, columnScan);
  let rows: Int32Array = new Int32Array(SAMPLED_ROWS);
  const uneven: UnevenRow[] = [];
  let passed = 0;
  let count = 0;
  for (let row = 1; record.at < bytes.length; row++) {
    const from = record.at;
    if (!scanRecord(record, columns, count)) return undefined;
    if (!record.isFilled) continue;
    if (passed < skip) {
      passed += 1;
      columns = columns.map(columnScan);
      continue;
    }
    const { cells, isOverfull, at: to } = record;
    for (let column = cells; column < width; column++)
      addCode(columns[column], count, { bytes, piece: NOTHING });
    if (cells < width || isOverfull) uneven.push({ index: count, cells, isOverfull, from, to });
    rows[count] = row;
    count += 1;
    if (count === rows.length) rows = widened(rows, columns, bytes.length / to);
  }
  return {
    columns: columns.map((column) => finished(column, count, (pieces) => textsOf(pieces, { bytes, decode }))),
    rows: rows.subarray(0, count),
    uneven,
  };
}

const NOTHING: Piece = { from: 0, to: 0, hash: 0, doubled: NO_SIGN };

const recordScan = (bytes: Uint8Array, { delimiter, quote, decode }: Scanning): RecordScan => ({
  bytes,
  ends: Uint8Array.from({ length: 0x100 }, (_, byte) =>
    byte === delimiter.charCodeAt(0) || byte === LINE_FEED || byte === RETURN ? 1 : 0,
  ),
  delimiter: delimiter.charCodeAt(0),
  quote: quote.charCodeAt(0),
  decode,
  piece: { ...NOTHING },
  at: 0,
  cells: 0,
  isFilled: false,
  isOverfull: false,
});

/** Room for the rows that the rest of the bytes may hold, by what was read of them. */
function widened(rows: Int32Array, columns: readonly ColumnScan[], times: number): Int32Array {
  const room = Math.ceil(rows.length * Math.min(Math.max(1.05 * times, 1.1), 1e4));
  for (const column of columns) roomFor(column, room);
  const more = new Int32Array(room);
  more.set(rows);
  return more;
}

interface RecordScan {
  readonly bytes: Uint8Array;
  readonly delimiter: number;
  readonly quote: number;
  readonly decode: Scanning["decode"];
  /** By byte: 1 where it ends a cell without quotes. */
  readonly ends: Uint8Array;
  /** The content of the cell being read. */
  readonly piece: { -readonly [K in keyof Piece]: Piece[K] };
  /** Where the next record begins. */
  at: number;
  cells: number;
  isFilled: boolean;
  isOverfull: boolean;
}

/** Reads one record into a row of the columns; false where a quote stands where none belongs. */
function scanRecord(record: RecordScan, columns: readonly ColumnScan[], row: number): boolean {
  const { bytes, delimiter, quote, piece, ends } = record;
  const end = bytes.length;
  record.isFilled = false;
  record.isOverfull = false;
  let { at } = record;
  for (let column = 0; ; column++) {
    const scan = column < columns.length ? columns[column] : undefined;
    const isQuoted = at < end && bytes[at] === quote;
    const repeated = scan?.isSteady === true && !isQuoted ? endIfRepeated(scan, bytes, at) : -1;
    if (isQuoted) {
      if (!takeQuoted(record, at)) return false;
      at = piece.to + 1;
      if (at < end && ends[bytes[at]] === 0) return false;
    } else if (scan !== undefined && repeated !== -1 && (repeated >= end || ends[bytes[repeated]] === 1)) {
      scan.codes[row] = scan.last;
      piece.from = at;
      piece.to = repeated;
      at = repeated;
      if (!record.isFilled) noteVisible(record, scan);
      if (at < end && bytes[at] === delimiter) {
        at += 1;
        continue;
      }
      return endRecord(record, column, at);
    } else {
      at = takePlain(record, at);
    }
    if (scan !== undefined) addCode(scan, row, record);
    if (scan !== undefined && isQuoted) scan.isSteady = false;
    if (!record.isFilled || scan === undefined) noteVisible(record, scan);
    if (at < end && bytes[at] === delimiter) at += 1;
    else return endRecord(record, column, at);
  }
}

function endRecord(record: RecordScan, column: number, at: number): true {
  const { bytes } = record;
  record.cells = column + 1;
  record.at = bytes[at] === RETURN && bytes[at + 1] === LINE_FEED ? at + 2 : at + 1;
  return true;
}

/** Finds the content of a cell without quotes, and where it ends. */
function takePlain({ bytes, piece, ends }: RecordScan, start: number): number {
  const end = bytes.length;
  let hash = 0;
  let at = start;
  while (at < end) {
    const byte = bytes[at];
    if (ends[byte] === 1) break;
    hash = hashStep(hash, byte);
    at += 1;
  }
  piece.from = start;
  piece.to = at;
  piece.hash = hash;
  piece.doubled = NO_SIGN;
  return at;
}

function noteVisible(record: RecordScan, column: ColumnScan | undefined): void {
  if (!isVisible(record)) return;
  record.isFilled = true;
  record.isOverfull ||= column === undefined;
}

/** True for a content that is more than white space. */
function isVisible({ bytes, decode, piece }: RecordScan): boolean {
  const { from, to } = piece;
  let isAscii = true;
  for (let at = from; at < to; at++) {
    const byte = bytes[at];
    if (byte < 0x80 && byte !== 0x20 && (byte < 0x09 || byte > 0x0d)) return true;
    isAscii &&= byte < 0x80;
  }
  return !isAscii && decode(contentOf(bytes, piece)).trim() !== "";
}

/** Finds the content of a cell in quotes; false where its quote never closes. */
function takeQuoted({ bytes, quote, piece }: RecordScan, start: number): boolean {
  let hash = 0;
  piece.doubled = NO_SIGN;
  for (let at = start + 1; at < bytes.length; at++) {
    const byte = bytes[at];
    if (byte === quote) {
      if (bytes[at + 1] !== quote) {
        [piece.from, piece.to, piece.hash] = [start + 1, at, hash];
        return true;
      }
      piece.doubled = quote;
      at += 1;
    }
    hash = hashStep(hash, byte);
  }
  return false;
}
