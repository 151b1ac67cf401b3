import { needsApostrophe, putApostrophe } from "./apostrophes.ts";

export type CsvCell = string | number | boolean | undefined;

export interface WrittenCsv {
  readonly text: string;
  /** Headers of the columns in which an apostrophe was put before a sign that starts a formula. */
  readonly guarded: readonly string[];
}

const needsQuotes = /[",\r\n]|^\s|\s$/;

const quoted = (text: string): string => (needsQuotes.test(text) ? `"${text.replaceAll('"', '""')}"` : text);

/** The shortest text that reads back to the same double; undefined is blank; a number that is not finite throws. */
function cellText(cell: CsvCell, header: string): string {
  if (cell === undefined) return "";
  if (typeof cell === "boolean") return cell ? "yes" : "no";
  if (typeof cell === "string") return cell;
  if (!Number.isFinite(cell))
    throw new RangeError(`write-csv.ts: expected a finite number, got ${cell} (${header})`);
  return Object.is(cell, -0) ? "0" : String(cell);
}

/**
 * Writes a table as RFC 4180 text with line feeds. In columns where any text would start a formula in a spreadsheet
 * (= + - @ tab, not a number), those texts get an apostrophe; `guarded` names the columns, for datapackage.json to
 * record, so that reading takes it off again.
 */
export function writeCsv(headers: readonly string[], rows: Iterable<readonly CsvCell[]>): WrittenCsv {
  const guarded = new Set(headers.flatMap((header, index) => (needsApostrophe(header) ? [index] : [])));
  const lines = [headers.map((header) => quoted(putApostrophe(header))).join(",")];
  for (const row of rows) {
    const cells = headers.map((header, index) => {
      const cell = row[index];
      const text = cellText(cell, header);
      if (typeof cell !== "string" || !needsApostrophe(text)) return quoted(text);
      guarded.add(index);
      return quoted(putApostrophe(text));
    });
    lines.push(cells.length === 1 && cells[0] === "" ? '""' : cells.join(","));
  }
  return {
    text: `${lines.join("\n")}\n`,
    guarded: [...guarded].toSorted((a, b) => a - b).map((index) => headers[index]),
  };
}
