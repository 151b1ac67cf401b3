import type { Coded } from "../study/coded.ts";
import {
  addCode,
  type ColumnScan,
  columnScan,
  endIfRepeated,
  finished,
  hashStep,
  NO_SIGN,
  type Piece,
  roomFor,
} from "./column-scan.ts";
import { textsOf } from "./piece-texts.ts";
import { type QuoteFault, type UnevenRow, unevenRows } from "./uneven-rows.ts";

export interface Scanning {
  /** A sign of one byte. */
  readonly delimiter: string;
  readonly quote: string;
  /** Columns of the table. */
  readonly width: number;
  /** Records before the first one to keep; blank ones are not counted. */
  readonly skip: number;
  /** Rows times columns that are read. */
  readonly mostCells: number;
  /** The text of bytes; throws where they are none. */
  readonly decode: (bytes: Uint8Array) => string;
}

/** The cells of a table, column by column, and the rows that have another number of cells or odd quotes. */
export interface ScannedCells {
  readonly columns: readonly Coded<string>[];
  /** The row numbers that a spreadsheet shows. */
  readonly rows: Int32Array;
  readonly uneven: Iterable<UnevenRow>;
}

const LINE_FEED = 10;
const RETURN = 13;

/** Rows whose length tells how much room all of them need. */
const SAMPLED_ROWS = 1000;

/**
 * Reads every cell of a delimited text into coded columns, from bytes in which ASCII signs stand for themselves: one
 * pass, and a string for each distinct cell alone. Blank records are passed over, cells that a row lacks are blank.
 * A cell with text after its closing quote goes on to the next sign that parts cells; a quote that nothing closes is a
 * sign like any other. Both stand as they are written, and their row is told. Undefined for more cells than are read.
 */
export function scanCells(bytes: Uint8Array, scanning: Scanning): ScannedCells | undefined {
  const { width, skip, mostCells, decode } = scanning;
  const record = recordScan(bytes, scanning);
  let columns = Array.from({ length: width }, columnScan);
  let rows: Int32Array = new Int32Array(SAMPLED_ROWS);
  const uneven = unevenRows();
  let passed = 0;
  let count = 0;
  for (let row = 1; record.at < bytes.length; row++) {
    const from = record.at;
    scanRecord(record, columns, count);
    if (!record.isFilled) continue;
    if (passed < skip) {
      passed += 1;
      columns = columns.map(columnScan);
      continue;
    }
    const { cells, isOverfull, quotes, at: to } = record;
    for (let column = cells; column < width; column++)
      addCode(columns[column], count, { bytes, piece: NOTHING });
    if (cells < width || isOverfull || quotes !== undefined)
      uneven.add({ index: count, cells, isOverfull, quotes, from, to });
    rows[count] = row;
    count += 1;
    if (count * width > mostCells) return undefined;
    if (count === rows.length)
      rows = widened(rows, columns, { times: bytes.length / to, most: mostCells / width + 1 });
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
  quotes: undefined,
});

/** Room for the rows that the rest of the bytes may hold, by what was read of them. */
function widened(
  rows: Int32Array,
  columns: readonly ColumnScan[],
  { times, most }: { readonly times: number; readonly most: number },
): Int32Array {
  const room = Math.ceil(
    Math.min(rows.length * Math.max(1.05 * times, 1.1), Math.max(most, rows.length + 1)),
  );
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
  quotes: QuoteFault;
}

/** Reads one record into a row of the columns. */
function scanRecord(record: RecordScan, columns: readonly ColumnScan[], row: number): void {
  const { bytes, delimiter, quote, piece, ends } = record;
  const end = bytes.length;
  record.isFilled = false;
  record.isOverfull = false;
  record.quotes = undefined;
  let { at } = record;
  for (let column = 0; ; column++) {
    const scan = column < columns.length ? columns[column] : undefined;
    const isQuoted = at < end && bytes[at] === quote;
    const repeated = scan?.isSteady === true && !isQuoted ? endIfRepeated(scan, bytes, at) : -1;
    if (isQuoted) {
      at = takeQuoted(record, at);
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

function endRecord(record: RecordScan, column: number, at: number): void {
  const { bytes } = record;
  record.cells = column + 1;
  record.at = bytes[at] === RETURN && bytes[at + 1] === LINE_FEED ? at + 2 : at + 1;
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
const isVisible = (record: RecordScan): boolean =>
  isVisibleBetween(record, record.piece.from, record.piece.to);

function isVisibleBetween({ bytes, decode }: RecordScan, from: number, to: number): boolean {
  let isAscii = true;
  for (let at = from; at < to; at++) {
    const byte = bytes[at];
    if (byte < 0x80 && byte !== 0x20 && (byte < 0x09 || byte > 0x0d)) return true;
    isAscii &&= byte < 0x80;
  }
  return !isAscii && decode(bytes.subarray(from, to)).trim() !== "";
}

/** Finds the content of a cell that begins with a quote, and where it ends. */
function takeQuoted(record: RecordScan, start: number): number {
  const { bytes, quote, ends, piece } = record;
  const end = bytes.length;
  let hash = 0;
  let doubled = NO_SIGN;
  for (let at = start + 1; at < end; at++) {
    const byte = bytes[at];
    if (byte === quote) {
      if (bytes[at + 1] !== quote) {
        let after = at + 1;
        while (after < end && ends[bytes[after]] === 0) after += 1;
        if (after > at + 1 && isVisibleBetween(record, at + 1, after))
          return takeOdd(record, { start, end: after });
        piece.from = start + 1;
        piece.to = at;
        piece.hash = hash;
        piece.doubled = doubled;
        return after;
      }
      doubled = quote;
      at += 1;
    }
    hash = hashStep(hash, byte);
  }
  return takeOdd(record, { start });
}

/** A cell whose quotes are not as they should be, as it is written; without an end, it ends as a cell without quotes. */
function takeOdd(
  record: RecordScan,
  { start, end }: { readonly start: number; readonly end?: number },
): number {
  const { bytes, piece } = record;
  record.quotes ??= end === undefined ? "unclosed" : "malformed";
  if (end === undefined) return takePlain(record, start);
  piece.from = start;
  piece.to = end;
  piece.doubled = NO_SIGN;
  piece.hash = 0;
  for (let at = start; at < end; at++) piece.hash = hashStep(piece.hash, bytes[at]);
  return end;
}
