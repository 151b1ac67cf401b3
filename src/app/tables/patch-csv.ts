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

/** Changes rows of a delimited text, counted as a spreadsheet does; every other sign of it stays as it is. */
export function patchCsv(
  text: string,
  patches: ReadonlyMap<number, RowPatch>,
  delimiter: string = ",",
): string {
  const last = Math.max(0, ...patches.keys());
  const lineEnd = /\r\n|\r|\n/.exec(text)?.[0] ?? "\n";
  const parts: string[] = [];
  let from = 0;
  let copied = 0;
  for (let row = 1; row <= last; row++) {
    const record = rowAt(text, from, delimiter);
    const patch = patches.get(row);
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
  /^"(?:[^"]|"")*"$/.test(cell) ? cell.slice(1, -1).replaceAll('""', '"') : cell;

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
  let at = start;
  if (text[at] === '"') {
    at = closingQuote(text, at + 1, delimiter);
  }
  while (at < text.length && text[at] !== delimiter && text[at] !== "\n" && text[at] !== "\r") at += 1;
  return at;
}

/** The quote that ends a cell stands, spaces aside, before what parts cells or rows. */
function closingQuote(text: string, from: number, delimiter: string): number {
  let at = from;
  for (;;) {
    at = text.indexOf('"', at);
    if (at < 0) return text.length;
    if (text[at + 1] === '"') {
      at += 2;
      continue;
    }
    let after = at + 1;
    while (text[after] === " ") after += 1;
    const sign = text[after];
    if (sign === undefined || sign === delimiter || sign === "\n" || sign === "\r") return after;
    at += 1;
  }
}
