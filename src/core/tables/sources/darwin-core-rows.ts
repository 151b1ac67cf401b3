import { parseRecords } from "../csv.ts";
import { decodeBytes, namedEncoding } from "../dialect/encoding.ts";
import type { DescribedFile } from "./darwin-core-meta.ts";

/** A row of a Darwin Core file: values by term, the id of its core row, and where it stands. */
export interface DarwinRow {
  readonly id: string;
  readonly row: number;
  readonly values: ReadonlyMap<string, string>;
}

/** The rows of a described file; undefined where its bytes are no text in its encoding. */
export function darwinRows(file: DescribedFile, bytes: Uint8Array): readonly DarwinRow[] | undefined {
  const decoded = decodeBytes(bytes, namedEncoding(file.encoding));
  if (decoded === undefined || file.delimiter.length !== 1) return undefined;
  const quote = file.quote.length === 1 ? file.quote : "\u0001";
  const { records } = parseRecords(decoded.text, { delimiter: file.delimiter, quote });
  return records
    .filter(({ row }) => row > file.headerLines)
    .map(({ cells, row }) => ({
      id: (file.idIndex === undefined ? "" : (cells[file.idIndex] ?? "")).trim(),
      row,
      values: new Map(
        file.fields.map(({ term, index, default: given = "" }) => {
          const cell = index === undefined ? "" : (cells[index] ?? "");
          return [term, cell.trim() === "" ? given : cell];
        }),
      ),
    }));
}

/** True where a term is filled in any row. */
export const isFilled = (rows: readonly DarwinRow[], term: string): boolean =>
  rows.some(({ values }) => (values.get(term) ?? "").trim() !== "");

/** The terms that are filled in any row, in their order. */
export const filledTerms = (rows: readonly DarwinRow[]): readonly string[] =>
  [...new Set(rows.flatMap(({ values }) => [...values.keys()]))].filter((term) => isFilled(rows, term));
