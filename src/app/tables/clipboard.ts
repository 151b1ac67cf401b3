import { rowAt, unquoted } from "./patch-csv.ts";

const needsQuotes = /["\t\r\n]/;

/** Cells as spreadsheets hand them over: tabs between cells, a line for each row. */
export const blockText = (rows: readonly (readonly string[])[]): string =>
  rows
    .map((row) =>
      row.map((cell) => (needsQuotes.test(cell) ? `"${cell.replaceAll('"', '""')}"` : cell)).join("\t"),
    )
    .join("\n");

/** The cells of a block that was copied in a spreadsheet; one empty cell where there is no text. */
export function blockCells(text: string): readonly (readonly string[])[] {
  const lines = rowsOf(text.replace(/(?:\r\n|\r|\n)$/, ""));
  const width = Math.max(...lines.map((row) => row.length));
  return lines.map((row) => [...row, ...Array.from({ length: width - row.length }, () => "")]);
}

function rowsOf(text: string): readonly (readonly string[])[] {
  const rows: string[][] = [];
  let from = 0;
  for (;;) {
    const { spans, end, next } = rowAt(text, from, "\t");
    rows.push(
      Array.from({ length: spans.length / 2 }, (_, at) =>
        unquoted(text.slice(spans[2 * at], spans[2 * at + 1])),
      ),
    );
    if (next === end) return rows;
    from = next;
  }
}
