import Papa from "papaparse";
import { takeOffApostrophe } from "./apostrophes.ts";

/** Records of a comma-separated text: cells as written, with the row numbers a spreadsheet shows. */
export interface CsvRecords {
  readonly headers: readonly string[];
  readonly rows: readonly (readonly string[])[];
  readonly rowNumbers: readonly number[];
  readonly faults: readonly CsvFault[];
}

interface CsvFault {
  readonly code: "unclosed-quote" | "malformed-quote";
  readonly row: number;
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
function plainLineEnds(text: string): string {
  if (!text.includes("\r")) return text;
  const parts: string[] = [];
  let from = 0;
  let isQuoted = false;
  let isCellStart = true;
  for (let i = 0; i < text.length; i++) {
    const sign = text[i];
    if (isQuoted) {
      if (sign === '"' && text[i + 1] === '"') i += 1;
      else if (sign === '"') isQuoted = false;
    } else if (sign === '"' && isCellStart) isQuoted = true;
    else if (sign === "\r") {
      parts.push(text.slice(from, i), "\n");
      if (text[i + 1] === "\n") i += 1;
      from = i + 1;
      isCellStart = true;
      continue;
    }
    isCellStart = !isQuoted && (sign === "," || sign === "\n");
  }
  parts.push(text.slice(from));
  return parts.join("");
}

const isBlank = (record: readonly string[]): boolean => record.every((cell) => cell.trim() === "");

/** Parts comma-separated text into records. The first record with content is the header; blank rows are passed over. */
export function parseCsv(text: string): CsvRecords {
  const { data, errors } = Papa.parse(plainLineEnds(text), {
    delimiter: ",",
    newline: "\n",
    skipEmptyLines: false,
  });
  const faults = errors
    .filter(({ type }) => type === "Quotes")
    .map(({ code, row }) => ({
      code: code === "MissingQuotes" ? ("unclosed-quote" as const) : ("malformed-quote" as const),
      row: (row ?? 0) + 1,
    }));
  const filled = data
    .map((cells, index) => ({ cells, row: index + 1 }))
    .filter(({ cells }) => !isBlank(cells));
  const [header, ...rows] = filled;
  return {
    headers: header?.cells ?? [],
    rows: rows.map(({ cells }) => cells),
    rowNumbers: rows.map(({ row }) => row),
    faults,
  };
}

const otherSigns: readonly (readonly [string, string])[] = [
  [";", "semicolons"],
  ["\t", "tabs"],
  ["|", "bars"],
];

/** The sign that parts the header where it is not the comma, in words. */
export function otherDelimiter(headers: readonly string[]): string | undefined {
  const header = headers.join("");
  const commas = headers.length - 1;
  return otherSigns.find(([sign]) => header.split(sign).length - 1 > commas)?.[1];
}

/** Cells of a table that `writeCsv` wrote, with its apostrophes taken off in the columns that were guarded. */
export function readWrittenCsv(
  text: string,
  guarded: readonly string[] = [],
): Pick<CsvRecords, "headers" | "rows"> {
  const records = parseCsv(text);
  const headers = unguardedHeaders(records.headers, new Set(guarded));
  const isGuarded = headers.map((header) => guarded.includes(header));
  const rows = records.rows.map((cells) =>
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
