import type { Looked, ReadSheet } from "../../study/assembly/context.ts";
import { withDecimalPoint } from "../../study/cells.ts";
import type { Dialect, Sheet } from "../../study/model.ts";
import type { ProblemList } from "../../study/problem-list.ts";
import type { CodeMeaning, WideReading } from "../../study/recognised.ts";
import type { Settings } from "../../study/settings.ts";
import type { ColumnChoice } from "../../study/tables/declare.ts";
import type { TableName } from "../../study/tables/index.ts";
import { occurrences } from "../../study/tables/occurrences.ts";
import { samples } from "../../study/tables/samples.ts";
import { type CsvRecords, parseRecords } from "../csv.ts";
import { decimalSign } from "../dialect/decimal.ts";
import { type DeclaredDialect, type TableSetting, tablePath } from "../dialect/declared.ts";
import { decodeBytes } from "../dialect/encoding.ts";
import { tellDialect } from "../dialect/tell-dialect.ts";
import { MOST_CELLS_AT_ONCE, MOST_COLUMNS } from "../limits.ts";
import { isBeyond } from "../part-table.ts";
import { legendOf } from "./legend.ts";
import { groupRows, leadingHints, longSheet } from "./long-sheets.ts";
import { shownSheet } from "./shown-wide.ts";
import type { WideLayout } from "./wide-layout.ts";
import { type WideRows, wideRows } from "./wide-rows.ts";
import { type WideShape, wideShape } from "./wide-shape.ts";

export interface WideSource {
  readonly file: string;
  readonly bytes: Uint8Array;
  readonly declared: DeclaredDialect;
  readonly delimiter: Dialect["delimiter"];
  readonly said: TableSetting | undefined;
  readonly chosen: ReadonlyMap<string, ColumnChoice>;
  readonly scales: Settings["taxa"]["scales"];
  /** The section of a sheet without a column for it. */
  readonly section: () => NonNullable<Sheet["section"]>;
  readonly problems: ProblemList;
}

/** Reads a wide sheet as the long tables it stands for; undefined, told, where it cannot be used. */
export function readWide(source: WideSource): ReadonlyMap<TableName, ReadSheet> | undefined {
  const { file, bytes, declared, delimiter, problems, said } = source;
  const decoded = decodeBytes(bytes, declared.encoding);
  if (decoded === undefined) return undefined;
  if (isBeyond(bytes, delimiter, MOST_CELLS_AT_ONCE)) {
    problems.add("table-too-large", { file, found: "more cells", detail: String(MOST_CELLS_AT_ONCE) });
    return undefined;
  }
  const parsed = parseRecords(decoded.text, { delimiter, quote: declared.quote });
  const records = withoutOddQuotes(parsed, source);
  if (records.some(({ cells }) => cells.length > MOST_COLUMNS)) return undefined;
  const shaped = wideShape(records, { chosen: source.chosen, shape: said?.shape });
  if (shaped === undefined) return undefined;
  const decimal = decimalOf(shaped, source);
  if (decimal === undefined) return undefined;
  const dialect = dialectOf(shaped, {
    encoding: decoded.encoding,
    delimiter,
    decimal,
    missing: declared.missing ?? [],
  });
  tellDialect(dialect, { file, declared, isEncodingTaken: decoded.isTaken, problems });
  const codes = codesOf(shaped, source);
  const hasSection = shaped.layout.leading.some(({ column }) => column === "section");
  const section = hasSection ? undefined : source.section();
  const rows = wideRows(shaped.grid, shaped.layout, {
    codes: new Map([...codes].map(([code, { means }]) => [code, means])),
    section: section?.name,
    numberOf: (text) => numberOf(text, decimal),
  });
  if (rows.samples.length === 0) {
    problems.add("header-only", { file, found: "headers without a sample" });
    return undefined;
  }
  const wide: WideReading = {
    shape: shaped.shape,
    samples: rows.samples.length,
    taxa: shaped.layout.taxa.length,
    blank: { means: said?.blank ?? "not-searched", by: said?.blank === undefined ? "default" : "chosen" },
    codes: [...rows.codes].map(([code, cells]) => ({ code, cells, ...codes.get(code) })),
  };
  const shown = { ...shownSheet(shaped, dialect, file), wide, ...(section === undefined ? {} : { section }) };
  tellWide(shown, rows, source);
  return longTables(shown, rows, shaped);
}

/** The records whose quotes are as they should be; the others are told. */
function withoutOddQuotes({ records, faults }: CsvRecords, { file, problems }: WideSource) {
  const odd = new Map(faults.map(({ row, code }) => [row, code]));
  return records.filter(({ row, cells }) => {
    const code = odd.get(row);
    if (code !== undefined) problems.add(code, { file, row, found: cells.join(",") });
    return code === undefined;
  });
}

function decimalOf({ grid, layout }: WideShape, source: WideSource): Dialect["decimal"] | undefined {
  const { declared, delimiter, file, problems } = source;
  if (declared.decimal !== undefined) return declared.decimal;
  const kinds = new Map(layout.leading.map(({ at, column }) => [at, column]));
  const columns = Array.from({ length: grid.width }, (_, at) => ({
    header: "",
    column: kinds.has(at) ? kinds.get(at) : "position",
  })).map(({ header, column }) =>
    column !== undefined && column in samples.columns ? { header, column } : { header },
  );
  const rows = Array.from({ length: grid.height - layout.below }, (_, row) =>
    columns.map((_, column) => grid.at(layout.below + row, column)),
  );
  const sign = decimalSign(rows, columns, { table: samples, delimiter });
  if (sign.kind === "decided") return sign.decimal;
  problems.add("decimal-ambiguous", { file, found: sign.found, detail: tablePath(file) });
  return undefined;
}

function numberOf(text: string, decimal: Dialect["decimal"]): number | undefined {
  const plain = decimal === "comma" ? (withDecimalPoint(text) ?? "") : text;
  return /^\d+(?:\.\d+)?$/.test(plain) ? Number(plain) : undefined;
}

function dialectOf(
  { shape, records, notes, layout }: WideShape,
  parts: Pick<Dialect, "encoding" | "delimiter" | "decimal" | "missing">,
): Dialect {
  const header =
    shape === "taxa-down" ? records.slice(0, 1) : records.slice(headerFrom(layout), layout.below);
  const first = header.at(0)?.row ?? 1;
  const above = [...notes, ...records].filter(({ row }) => row < first).toSorted((a, b) => a.row - b.row);
  return { ...parts, headerRows: header.map(({ row }) => row), notes: above };
}

const headerFrom = ({ taxonRow, groupRow }: WideLayout): number => Math.min(taxonRow, groupRow ?? taxonRow);

interface ToldCode {
  readonly means: CodeMeaning;
  readonly by: "notes" | "scale" | "chosen";
}

type Codes = ReadonlyMap<string, ToldCode>;

/** What codes mean: as chosen, else as a scale of the settings has it, else as the sheet's own notes say. */
function codesOf({ notes, records, layout, shape }: WideShape, { said, scales }: WideSource): Codes {
  const above = shape === "taxa-down" ? [] : records.slice(0, headerFrom(layout));
  const words = [...notes, ...above].map(({ cells }) =>
    cells.filter((cell) => cell.trim() !== "").join(", "),
  );
  const inScales = Object.values(scales).flatMap((scale) => Object.entries(scale));
  const codes = new Map<string, ToldCode>();
  for (const [code, means] of legendOf(words)) codes.set(code, { means, by: "notes" });
  for (const [code, rank] of inScales)
    codes.set(code, { means: rank > 0 ? "found" : "not-found", by: "scale" });
  for (const [code, means] of Object.entries(said?.codes ?? {})) codes.set(code, { means, by: "chosen" });
  return codes;
}

/** Tells what was taken how, and every cell that cannot be. */
function tellWide(shown: Sheet, rows: WideRows, { file, problems }: WideSource): void {
  const { wide, recognised } = shown;
  if (wide === undefined) return;
  const path = tablePath(file);
  const way = wide.shape === "samples-down" ? "samples down, taxa across" : "taxa down, samples across";
  const found = `${wide.samples} samples and ${wide.taxa} taxa, ${way}`;
  const detail = { presence: "presence", count: "counts", scale: "a scale" }[rows.counting];
  problems.add("read-wide", { file, found, detail, nearest: path });
  for (const { header, is, by } of recognised) {
    if (by !== "content") continue;
    const own = tablePath(file, "columns", header, "is");
    problems.addOnce(is, "taken-by-content", {
      file,
      column: header,
      found: header || "a blank cell",
      detail: is,
      nearest: own,
    });
  }
  for (const { code, row, taxon } of rows.unknown) {
    const own = tablePath(file, "codes", code);
    problems.addOnce(code, "code-unknown", { file, row, column: taxon, found: code, nearest: own });
  }
  for (const { text, row, taxon } of rows.odd)
    problems.add("not-a-wide-cell", { file, row, column: taxon, found: text });
}

function longTables(
  shown: Sheet,
  rows: WideRows,
  { grid, layout }: WideShape,
): ReadonlyMap<TableName, ReadSheet> {
  const hints = leadingHints(layout);
  const has = (name: string) => layout.leading.some(({ column, isUsed }) => isUsed && column === name);
  const unit = hints.get("effort")?.bracket;
  const looked: Looked = {
    file: shown.file,
    taxa: layout.taxa.map(({ name }) => name),
    rows: rows.looked,
    counting: rows.counting,
    ...(unit === undefined ? {} : { effortUnit: unit }),
    blank: shown.wide?.blank.means ?? "not-searched",
    isBlankChosen: shown.wide?.blank.by === "chosen",
  };
  const finds = longSheet(shown, "occurrences", {
    columns: Object.keys(occurrences.columns),
    rows: rows.occurrences,
    hints: new Map(),
  });
  const tables = new Map<TableName, ReadSheet>([["occurrences", { ...finds, looked: [looked] }]]);
  if (has("position") || has("base"))
    tables.set(
      "samples",
      longSheet(shown, "samples", { columns: Object.keys(samples.columns), rows: rows.samples, hints }),
    );
  const groups = groupRows(grid, layout);
  if (groups.length > 0)
    tables.set(
      "taxa",
      longSheet(shown, "taxa", { columns: ["taxon", "group"], rows: groups, hints: new Map() }),
    );
  return tables;
}
