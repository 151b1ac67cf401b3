import { type ParsedCell, parseCell, withDecimalPoint } from "../cells.ts";
import { suggestName } from "../nearest.ts";
import type { ColumnDeclaration, RowOf, TableDeclaration } from "../tables/declare.ts";
import type { TableName } from "../tables/index.ts";
import { isFixedUnit, lengthUnit } from "../units.ts";
import type { Assembly, ReadSheet, Row } from "./context.ts";
import { onlyNumber, onlyWord } from "./one-mend.ts";
import { sectionUnit } from "./section-unit.ts";

/** The validated rows of a declared table; rows with an error are left out, and every error is told. */
export function rowsOf<T extends TableDeclaration & { readonly name: TableName }>(
  table: T,
  assembly: Assembly,
): readonly Row<T>[] {
  const read = assembly.sheets.get(table.name);
  if (!read) return [];
  const rows: Row<T>[] = [];
  const columns = Object.entries(table.columns).map(([name, column]) => ({
    name,
    column,
    index: read.sheet.columns.indexOf(name),
  }));
  const seen = new Map<string, number>();
  for (const [index, cells] of [...read.sheet.rows].entries()) {
    const row = read.sheet.rowNumbers[index];
    if (isRepeated(cells, row, { seen, read, assembly })) continue;
    const values = readRow(cells, row, { table, columns, read, assembly });
    if (values && isRowOf(values, table))
      rows.push({ cells: values, origin: { file: read.sheet.file, row } });
  }
  return rows;
}

/** True where every declared column has its parsed value; `readRow` has checked each one's type. */
const isRowOf = <T extends TableDeclaration>(values: object, table: T): values is RowOf<T> =>
  Object.keys(table.columns).every((name) => Object.hasOwn(values, name));

interface Repeats {
  readonly seen: Map<string, number>;
  readonly read: ReadSheet;
  readonly assembly: Assembly;
}

function isRepeated(cells: readonly string[], row: number, { seen, read, assembly }: Repeats): boolean {
  const content = cells.map((cell) => cell.trim()).join("\u0000");
  const first = seen.get(content);
  if (first === undefined) {
    seen.set(content, row);
    return false;
  }
  assembly.problems.add("duplicate-row", {
    file: read.sheet.file,
    row,
    found: cells.join(","),
    detail: String(first),
  });
  return true;
}

interface Reading {
  readonly table: TableDeclaration;
  /** The declared columns and where they stand in the sheet (-1: absent). */
  readonly columns: readonly {
    readonly name: string;
    readonly column: ColumnDeclaration;
    readonly index: number;
  }[];
  readonly read: ReadSheet;
  readonly assembly: Assembly;
}

function readRow(cells: readonly string[], row: number, reading: Reading): object | undefined {
  const { table, columns, read, assembly } = reading;
  const { file } = read.sheet;
  const values = new Map<string, unknown>();
  let isUsable = true;
  for (const { name, column, index } of columns) {
    const text = index === -1 ? "" : (cells[index] ?? "");
    const { value, isGood } = readCell(text, column, { name, row, file, assembly, read, cells });
    values.set(name, value);
    isUsable &&= isGood;
  }
  if (isUsable && !hasOneOf(table, values)) {
    const detail = (table.oneOf ?? []).map((set) => set.join(" and ")).join(", or ");
    assembly.problems.add("one-of", { file, row, found: "", detail });
    return undefined;
  }
  return isUsable ? Object.fromEntries(values) : undefined;
}

interface CellPlace {
  readonly name: string;
  readonly row: number;
  readonly file: string;
  readonly assembly: Assembly;
  readonly read: ReadSheet;
  /** The whole row. */
  readonly cells: readonly string[];
}

/** A blank that another rule speaks of: a missing value is told by the reading, a unit can stand in the header. */
const isToldElsewhere = (place: CellPlace): boolean =>
  place.name === "value" || (place.name === "unit" && place.read.hints.get("value")?.bracket !== undefined);

function readCell(text: string, column: ColumnDeclaration, place: CellPlace) {
  const { name, row, file, assembly } = place;
  const parsed = parseWritten(text, column, place);
  if ("code" in parsed) {
    const nearest = parsed.code === "not-in-list" ? suggestName(text.trim(), column.values ?? []) : undefined;
    assembly.problems.add(parsed.code, {
      file,
      row,
      column: name,
      found: text,
      detail: parsed.detail,
      nearest,
      now: onlyMend(text, column, place),
    });
    return { value: undefined, isGood: false };
  }
  if (parsed.value === undefined && column.required && !isToldElsewhere(place)) {
    assembly.problems.add("blank-cell", { file, row, column: name, found: text });
    return { value: undefined, isGood: false };
  }
  return {
    value: parsed.value ?? (isToldElsewhere(place) && column.required ? "" : undefined),
    isGood: true,
  };
}

/** The one content that a cell must have been meant to hold, if it is one alone and good. */
function onlyMend(text: string, column: ColumnDeclaration, place: CellPlace): string | undefined {
  const { unit, type } = column;
  const isOwnUnit = (written: string) =>
    unit === "section"
      ? lengthUnit(written) !== undefined && lengthUnit(written) === sectionUnit(place)
      : unit !== undefined && isFixedUnit(written, unit);
  const { decimal } = place.read.sheet.dialect;
  const now =
    type === "enum" ? onlyWord(text, column.values ?? []) : onlyNumber(text, { decimal, isOwnUnit });
  return now === undefined || "code" in parseWritten(now, column, place) ? undefined : now;
}

/** The cell as its column and the file's dialect say. */
function parseWritten(text: string, column: ColumnDeclaration, { name, read }: CellPlace): ParsedCell {
  const { decimal, missing } = read.sheet.dialect;
  if (missing.includes(text)) return { value: undefined };
  const isNumber = column.type === "number" || column.type === "integer" || name === "value";
  if (decimal === "point" || !isNumber) return parseCell(text, column);
  const pointed = withDecimalPoint(text);
  return pointed === undefined ? { code: "not-a-number", detail: "comma" } : parseCell(pointed, column);
}

const hasOneOf = (table: TableDeclaration, values: ReadonlyMap<string, unknown>): boolean =>
  table.oneOf === undefined || table.oneOf.some((set) => set.every((name) => values.get(name) !== undefined));
