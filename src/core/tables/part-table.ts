import { type Coded, encode } from "../study/coded.ts";
import type { Delimiter } from "../study/model.ts";
import { type CsvRecord, parseRecords } from "./csv.ts";
import { bestParting, type Preview, previews } from "./dialect/delimiter.ts";
import { type EncodingChoice, encodingsOf } from "./dialect/encoding.ts";
import { type FoundHeader, findHeader, HEADER_REACH } from "./dialect/header.ts";
import { headText, NotText, type PlainBytes, plainBytes } from "./plain-bytes.ts";
import type { SheetSource } from "./read-sheet.ts";
import { scanCells } from "./scan-cells.ts";
import type { QuoteFault } from "./uneven-rows.ts";

/** A row that has not as many cells as the header, or a quote where none belongs. */
export interface OddRow {
  readonly index: number;
  readonly kind: "short" | "overfull" | "malformed" | "unclosed";
  readonly cells: number;
  /** What stands there; of a short row nothing. */
  readonly written: () => readonly string[];
}

/** A file's bytes parted into the cells below its header. */
export interface PartedTable extends EncodingChoice {
  readonly kind: "parted";
  readonly delimiter: Delimiter;
  /** The records down to the header's end. */
  readonly head: readonly CsvRecord[];
  readonly header: FoundHeader;
  readonly columns: readonly Coded<string>[];
  readonly rows: Int32Array;
  readonly odd: Iterable<OddRow>;
}

/** Why bytes are not parted. */
export type PartFault =
  | { readonly kind: "not-text" }
  | { readonly kind: "empty" }
  | { readonly kind: "too-wide"; readonly columns: number }
  | { readonly kind: "too-large" };

interface Parting {
  readonly plain: PlainBytes;
  readonly choice: EncodingChoice;
  readonly source: SheetSource;
  readonly limits: PartLimits;
}

export interface PartLimits {
  readonly mostColumns: number;
  readonly mostCells: number;
  /** Of a table that is read as a whole. */
  readonly mostAtOnce: number;
}

/** Parts the bytes of a table in the first encoding that they are text of. */
export function partTable(source: SheetSource, limits: PartLimits): PartedTable | PartFault {
  const { bytes, declared } = source;
  for (const choice of encodingsOf(bytes, declared.encoding)) {
    try {
      return partPlain({ plain: plainBytes(bytes, choice.encoding), choice, source, limits });
    } catch (fault) {
      if (!(fault instanceof NotText)) throw fault;
    }
  }
  return { kind: "not-text" };
}

function partPlain(parting: Parting): PartedTable | PartFault {
  const { plain, source, limits } = parting;
  const { mostColumns, mostCells } = limits;
  const { text, isWhole } = headText(plain);
  const ways = previews(text, source.declared);
  const columns = widest(ways);
  if (columns > mostColumns) return { kind: "too-wide", columns };
  const delimiter = bestParting(ways, source.table)?.delimiter ?? ",";
  const head = ways.find((way) => way.delimiter === delimiter)?.records ?? [];
  if (!isWhole && head.length < HEADER_REACH) return partWhole(delimiter, parting);
  if (head.length === 0) return partWhole(delimiter, parting);
  const header = headerOf(head, source);
  if (header.headers.length > mostColumns) return { kind: "too-wide", columns: header.headers.length };
  const { quote = '"' } = source.declared;
  const scanned = scanCells(plain.bytes, {
    delimiter,
    quote,
    width: header.headers.length,
    skip: header.below,
    mostCells,
    decode: plain.decode,
  });
  if (scanned === undefined) return { kind: "too-large" };
  const writtenAt = (from: number, to: number) =>
    parseRecords(plain.decode(plain.bytes.subarray(from, to)), { delimiter, quote }).records[0]?.cells ?? [];
  const { uneven } = scanned;
  const odd = {
    *[Symbol.iterator](): Generator<OddRow> {
      for (const { index, cells, isOverfull, quotes, from, to } of uneven) {
        const kind = quotes ?? (isOverfull ? "overfull" : "short");
        yield { index, kind, cells, written: () => (kind === "short" ? [] : writtenAt(from, to)) };
      }
    },
  };
  const { columns: cells, rows } = scanned;
  return { kind: "parted", ...parting.choice, delimiter, head, header, columns: cells, rows, odd };
}

/** Reads the whole text at once, record by record: where the header does not stand in its beginning. */
function partWhole(
  delimiter: Delimiter,
  { plain, choice, source, limits }: Parting,
): PartedTable | PartFault {
  const { mostColumns, mostAtOnce } = limits;
  if (isBeyond(plain.bytes, delimiter, mostAtOnce)) return { kind: "too-large" };
  const read = parseRecords(plain.decode(plain.bytes), { delimiter, quote: source.declared.quote });
  const { records, faults } = read;
  if (records.length === 0) return { kind: "empty" };
  const header = headerOf(records, source);
  const width = header.headers.length;
  if (width > mostColumns) return { kind: "too-wide", columns: width };
  const below = records.slice(header.below);
  const byRow = new Map(
    faults.map(({ row, code }) => [row, code === "unclosed-quote" ? "unclosed" : "malformed"] as const),
  );
  return {
    kind: "parted",
    ...choice,
    delimiter,
    head: records,
    header,
    columns: header.headers.map((_, column) => encode(below.map(({ cells }) => cells[column] ?? ""))),
    rows: Int32Array.from(below, ({ row }) => row),
    odd: below.flatMap(({ cells, row }, index) => oddRow(cells, { index, width, quotes: byRow.get(row) })),
  };
}

function oddRow(
  written: readonly string[],
  { index, width, quotes }: { readonly index: number; readonly width: number; readonly quotes: QuoteFault },
): readonly OddRow[] {
  const cells = written.length;
  if (quotes !== undefined) return [{ index, kind: quotes, cells, written: () => written }];
  if (written.slice(width).some((cell) => cell.trim() !== ""))
    return [{ index, kind: "overfull", cells, written: () => written }];
  return cells < width ? [{ index, kind: "short", cells, written: () => [] }] : [];
}

const widest = (ways: readonly Preview[]): number =>
  ways.reduce((most, { records }) => records.reduce((m, { cells }) => Math.max(m, cells.length), most), 0);

const headerOf = (records: readonly CsvRecord[], { declared, table }: SheetSource): FoundHeader =>
  declared.headers === undefined
    ? findHeader(records, table)
    : { headers: declared.headers, from: 0, below: 0, recognised: 0, isComplete: false };

/** True for bytes that hold more cells than so many, as their signs show. */
export function isBeyond(bytes: Uint8Array, delimiter: string, most: number): boolean {
  const sign = delimiter.charCodeAt(0);
  let cells = 0;
  for (let at = 0; at < bytes.length && cells <= most; at++)
    if (bytes[at] === sign || bytes[at] === 10 || bytes[at] === 13) cells += 1;
  return cells > most;
}
