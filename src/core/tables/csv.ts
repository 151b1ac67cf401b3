import Papa from "papaparse";
import { takeOffApostrophe } from "./apostrophes.ts";
import { type CsvFault, recordsWithOddQuotes } from "./odd-quotes.ts";

/** A row that holds something: cells as written, with the row number a spreadsheet shows. */
export interface CsvRecord {
  readonly cells: readonly string[];
  readonly row: number;
}

/** Records of a delimited text; blank rows are passed over. */
export interface CsvRecords {
  readonly records: readonly CsvRecord[];
  readonly faults: readonly CsvFault[];
}

export interface CsvWriting {
  /** The sign between cells; a comma where absent. */
  readonly delimiter?: string;
  /** The sign around cells; a double quote where absent. */
  readonly quote?: string;
}

/** Text of UTF-8 bytes without byte-order mark, or undefined where the bytes are not UTF-8 text. */
export function decodeText(bytes: Uint8Array): string | undefined {
  try {
    const text = new TextDecoder("utf-8", { fatal: true }).decode(bytes);
    return text.includes("\0") ? undefined : text;
  } catch {
    return undefined;
  }
}

/** Line ends outside quoted cells as single line feeds, so that CRLF, CR and LF read alike and quoted ones stay. */
function plainLineEnds(text: string, { delimiter, quote }: Required<CsvWriting>): string {
  if (!text.includes("\r")) return text;
  const parts: string[] = [];
  let from = 0;
  let isQuoted = false;
  let isCellStart = true;
  for (let i = 0; i < text.length; i++) {
    const sign = text[i];
    if (isQuoted) {
      if (sign === quote && text[i + 1] === quote) i += 1;
      else if (sign === quote) isQuoted = false;
    } else if (sign === quote && isCellStart) isQuoted = true;
    else if (sign === "\r") {
      parts.push(text.slice(from, i), "\n");
      if (text[i + 1] === "\n") i += 1;
      from = i + 1;
      isCellStart = true;
      continue;
    }
    isCellStart = !isQuoted && (sign === delimiter || sign === "\n");
  }
  parts.push(text.slice(from));
  return parts.join("");
}

const isBlank = (record: readonly string[]): boolean => record.every((cell) => cell.trim() === "");

/** Parts delimited text into records; where quotes are not as they should be, row by row. */
export function parseRecords(text: string, { delimiter = ",", quote = '"' }: CsvWriting = {}): CsvRecords {
  const { data, errors } = Papa.parse(plainLineEnds(text, { delimiter, quote }), {
    delimiter,
    quoteChar: quote,
    escapeChar: quote,
    newline: "\n",
    skipEmptyLines: false,
  });
  if (errors.some(({ type }) => type === "Quotes")) {
    const { records, faults } = recordsWithOddQuotes(text, { delimiter, quote });
    return { records: records.filter(({ cells }) => !isBlank(cells)), faults };
  }
  const records = data
    .map((cells, index) => ({ cells, row: index + 1 }))
    .filter(({ cells }) => !isBlank(cells));
  return { records, faults: [] };
}

interface WrittenTable {
  readonly headers: readonly string[];
  readonly rows: readonly (readonly string[])[];
}

/** Cells of a table that `writeCsv` wrote, with its apostrophes taken off in the columns that were guarded. */
export function readWrittenCsv(text: string, guarded: readonly string[] = []): WrittenTable {
  const [header, ...below] = parseRecords(text).records;
  const headers = unguardedHeaders(header?.cells ?? [], new Set(guarded));
  const isGuarded = headers.map((header) => guarded.includes(header));
  const rows = below.map(({ cells }) =>
    cells.map((cell, index) => (isGuarded[index] ? takeOffApostrophe(cell) : cell)),
  );
  return { headers, rows };
}

/** Headers without the apostrophe of writing, where the record of guarded columns names them without it. */
export const unguardedHeaders = (
  headers: readonly string[],
  guarded: ReadonlySet<string>,
): readonly string[] =>
  headers.map((header) => {
    const own = takeOffApostrophe(header);
    return guarded.has(own) ? own : header;
  });
