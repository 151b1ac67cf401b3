/** What becomes of one row of a delimited text. */
export type RowPatch =
  | { readonly kind: "cells"; readonly cells: ReadonlyMap<number, string> }
  /** Its place stays, so that the rows below keep their numbers. */
  | { readonly kind: "emptied" }
  | { readonly kind: "removed" };

export interface CsvRow {
  /** Starts and ends of the cells, quotes included, in turn. */
  readonly spans: readonly number[];
  readonly end: number;
  /** Where the next row starts. */
  readonly next: number;
}

export interface CsvPatch {
  /** What becomes of rows, by their number in the text. */
  readonly rows: ReadonlyMap<number, RowPatch>;
  /** Rows to put directly above a row of the text, from above downward. */
  readonly above?: ReadonlyMap<number, readonly (readonly string[])[]>;
  /** The sign between cells; a comma where absent. */
  readonly delimiter?: string;
}

/** Changes rows of a delimited text, counted as a spreadsheet does; every other sign of it stays as it is. */
export function patchCsv(text: string, { rows, above = new Map(), delimiter = "," }: CsvPatch): string {
  const last = Math.max(0, ...rows.keys(), ...above.keys());
  const lineEnd = /\r\n|\r|\n/.exec(text)?.[0] ?? "\n";
  const parts: string[] = [];
  let from = 0;
  let copied = 0;
  for (let row = 1; row <= last; row++) {
    const record = rowAt(text, from, delimiter);
    const put = above.get(row);
    if (put !== undefined) {
      parts.push(text.slice(copied, from), ...put.map((cells) => writtenRow(cells, delimiter) + lineEnd));
      copied = from;
    }
    const patch = rows.get(row);
    if (patch !== undefined) {
      parts.push(text.slice(copied, from), patchedRow(text, record, { patch, delimiter }));
      const isRemoved = patch.kind === "removed";
      copied = isRemoved ? record.next : record.end;
    }
    if (record.next === record.end && row < last && patch?.kind !== "removed") {
      // The text ends here: the next row is one more.
      parts.push(text.slice(copied, record.end), lineEnd);
      copied = record.end;
    }
    from = record.next;
  }
  const patched = parts.join("") + text.slice(copied);
  return /[\r\n]$/.test(text) && !/(?:^|[\r\n])$/.test(patched) ? patched + lineEnd : patched;
}

const writtenRow = (cells: readonly string[], delimiter: string): string =>
  cells.map((cell) => written(cell, delimiter)).join(delimiter);

function patchedRow(
  text: string,
  { spans }: CsvRow,
  { patch, delimiter }: { readonly patch: RowPatch; readonly delimiter: string },
): string {
  if (patch.kind !== "cells") return "";
  const own = Array.from({ length: spans.length / 2 }, (_, at) =>
    text.slice(spans[2 * at], spans[2 * at + 1]),
  );
  const width = Math.max(own.length, ...[...patch.cells.keys()].map((column) => column + 1));
  return Array.from({ length: width }, (_, column) => {
    const cell = patch.cells.get(column);
    return cell === undefined ? (own[column] ?? "") : written(cell, delimiter);
  }).join(delimiter);
}

const written = (cell: string, delimiter: string): string =>
  cell.includes(delimiter) || /["\r\n]|^\s|\s$/.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell;

/** A cell without the quotes of its writing. */
export const unquoted = (cell: string): string =>
  isQuoted.test(cell) ? cell.trimEnd().slice(1, -1).replaceAll('""', '"') : cell;

const isQuoted = /^"(?:[^"]|"")*"\s*$/;

/** A cell that begins with a quote and is not closed as it should be. */
export const isMalformed = (cell: string): boolean => cell.startsWith('"') && !isQuoted.test(cell);

/** Every row of a delimited text: cells without quotes, and which of them are quoted wrongly. */
export function* rowsOf(text: string, delimiter: string): Generator<WrittenRow> {
  let from = 0;
  for (let row = 1; from < text.length; row++) {
    const { spans, next } = rowAt(text, from, delimiter);
    const raw = Array.from({ length: spans.length / 2 }, (_, at) =>
      text.slice(spans[2 * at], spans[2 * at + 1]),
    );
    yield {
      row,
      cells: raw.map(unquoted),
      malformed: raw.flatMap((cell, column) => (isMalformed(cell) ? [column] : [])),
    };
    from = next;
  }
}

export interface WrittenRow {
  readonly row: number;
  readonly cells: readonly string[];
  /** Columns whose quotes are not as they should be: these cells stand with them. */
  readonly malformed: readonly number[];
}

/** One row of a delimited text, from a place in it. */
export function rowAt(text: string, from: number, delimiter: string): CsvRow {
  const spans: number[] = [];
  let at = from;
  for (;;) {
    const end = cellEnd(text, at, delimiter);
    spans.push(at, end);
    if (text[end] === delimiter) {
      at = end + 1;
      continue;
    }
    const width = text.startsWith("\r\n", end) ? 2 : end < text.length ? 1 : 0;
    return { spans, end, next: end + width };
  }
}

function cellEnd(text: string, start: number, delimiter: string): number {
  // A quote that nothing closes is a sign like any other.
  let at = text[start] === '"' ? (behindClosingQuote(text, start + 1) ?? start) : start;
  while (at < text.length && text[at] !== delimiter && text[at] !== "\n" && text[at] !== "\r") at += 1;
  return at;
}

/** Where a cell goes on behind its closing quote; text that stands there belongs to it. */
function behindClosingQuote(text: string, from: number): number | undefined {
  let at = text.indexOf('"', from);
  while (at >= 0 && text[at + 1] === '"') at = text.indexOf('"', at + 2);
  return at < 0 ? undefined : at + 1;
}
