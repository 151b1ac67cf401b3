import { parseNumber } from "../../study/cells.ts";
import { type RecognisedColumn, recogniseColumns } from "../../study/columns.ts";
import type { TableDeclaration } from "../../study/tables/declare.ts";
import type { CsvRecord } from "../csv.ts";

/** Rows looked at for a header. */
const DEPTH = 50;

/** Rows that the search can read: a header of two rows and its units begin in the last one looked at. */
export const HEADER_REACH = DEPTH + 2;

/** The header of a table and where it was found. */
export interface FoundHeader {
  readonly headers: readonly string[];
  /** Index of the header's first record, and of the first record below it. */
  readonly from: number;
  readonly below: number;
  /** Columns recognised as declared ones. */
  readonly recognised: number;
  /** Every column that must be there is there. */
  readonly isComplete: boolean;
}

/** Columns of a table that a header lacks: names, or the alternatives in words. A unit of values can be asked for. */
export function missingColumns(columns: readonly RecognisedColumn[], table: TableDeclaration): string[] {
  const found = new Set(columns.flatMap(({ column }) => column ?? []));
  const missing = Object.entries(table.columns)
    .filter(
      ([name, { required }]) => required && !found.has(name) && !(name === "unit" && found.has("value")),
    )
    .map(([name]) => name);
  const isOneOfMet =
    table.oneOf === undefined || table.oneOf.some((set) => set.every((name) => found.has(name)));
  return isOneOfMet
    ? missing
    : [...missing, (table.oneOf ?? []).map((set) => set.join(" and ")).join(", or ")];
}

/**
 * The first row that holds every column a table must have, or two rows that do so together; else the row with the most
 * recognised columns (two at least), else the first. A row of units below belongs to the header.
 */
export function findHeader(records: readonly CsvRecord[], table: TableDeclaration): FoundHeader {
  const shown = records.slice(0, DEPTH);
  const judged: FoundHeader[] = [];
  const singleAt = (from: number): FoundHeader => {
    judged[from] ??= judge(shown[from].cells, { from, below: from + 1, table });
    return judged[from];
  };
  for (let at = 0; at < shown.length; at++) {
    const here = singleAt(at);
    const after = at + 1 < shown.length ? singleAt(at + 1) : undefined;
    const isSplit = after !== undefined && !after.isComplete && (after.recognised > 0 || !here.isComplete);
    if (isSplit) {
      const headers = joined(shown[at].cells, after.headers, table);
      const both = judge(headers, { from: at, below: at + 2, table });
      const isMore = !here.isComplete || both.recognised > here.recognised;
      if (both.isComplete && isMore) return withUnits(both, records[at + 2], table);
    }
    if (here.isComplete) return withUnits(here, records[at + 1], table);
  }
  const most = judged.reduce((best, one) => (one.recognised > best.recognised ? one : best), singleAt(0));
  return most.recognised >= 2 ? most : singleAt(0);
}

interface Placed {
  readonly from: number;
  readonly below: number;
  readonly table: TableDeclaration;
}

function judge(headers: readonly string[], { from, below, table }: Placed): FoundHeader {
  const columns = recogniseColumns(headers, table);
  const recognised = new Set(columns.flatMap(({ column }) => column ?? [])).size;
  const isComplete = recognised > 0 && missingColumns(columns, table).length === 0;
  return { headers, from, below, recognised, isComplete };
}

/** Two header rows as one: a name that reaches over several columns stands before the names below it. */
function joined(above: readonly string[], below: readonly string[], table: TableDeclaration): string[] {
  const isKnown = (header: string) => recogniseColumns([header], table)[0].column !== undefined;
  let over = "";
  return Array.from({ length: Math.max(above.length, below.length) }, (_, at) => {
    const [upper, lower] = [(above[at] ?? "").trim(), (below[at] ?? "").trim()];
    if (upper !== "") over = upper;
    if (lower === "" || over === "") return lower || upper;
    const [, name, unit] = /^(.*?)\s*([([][^)\]]*[)\]])?$/s.exec(over) ?? ["", over];
    const whole = [name, lower, unit ?? ""].join(" ").trim();
    return isKnown(whole) || !isKnown(lower) ? whole : lower;
  });
}

const isBlank = (cell: string): boolean => /^[\s\-–—]*$/.test(cell);

/** The header with the units of the row below it in brackets, where that row holds units alone. */
function withUnits(header: FoundHeader, row: CsvRecord | undefined, table: TableDeclaration): FoundHeader {
  const columns = recogniseColumns(header.headers, table);
  if (row === undefined || !isUnitRow(row.cells, columns, table)) return header;
  const headers = columns.map((column, at) => {
    const unit = (row.cells[at] ?? "").trim().replace(/^[([]|[)\]]$/g, "");
    const isSaid = column.unit === unit || column.bracket === unit;
    return isBlank(unit) || isSaid ? column.header : `${column.header.trim()} (${unit})`;
  });
  return { ...header, headers, below: header.below + 1 };
}

function isUnitRow(
  cells: readonly string[],
  columns: readonly RecognisedColumn[],
  table: TableDeclaration,
): boolean {
  let units = 0;
  for (const [at, { column }] of columns.entries()) {
    const cell = cells[at] ?? "";
    if (column === undefined || isBlank(cell)) continue;
    const { type } = table.columns[column];
    const isNumber = type === "number" || type === "integer" || column === "value";
    if (!isNumber || parseNumber(cell) !== "not-a-number" || /^[<>≤≥\d.,+-]/.test(cell.trim())) return false;
    units += 1;
  }
  return units > 0;
}
