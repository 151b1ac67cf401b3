import type { RecognisedColumn } from "../study/columns.ts";
import { suggestName } from "../study/nearest.ts";
import type { ProblemList } from "../study/problem-list.ts";
import type { TableDeclaration } from "../study/tables/declare.ts";
import { isFixedUnit, lengthUnits } from "../study/units.ts";
import { missingColumns } from "./dialect/header.ts";

/** Where a header stands and what it should hold. */
export interface HeaderPlace {
  readonly file: string;
  /** The header's row, as a spreadsheet counts. */
  readonly row: number;
  readonly table: TableDeclaration;
  readonly problems: ProblemList;
}

/** Tells every column that is missing, doubled, unknown or of unknown unit; false where the file cannot be used. */
export function areColumnsSound(columns: readonly RecognisedColumn[], place: HeaderPlace): boolean {
  const { file, row, table, problems } = place;
  const seen = new Set<string>();
  let isSound = true;
  for (const recognised of columns) {
    const { header, column } = recognised;
    if (column === undefined) tellUnused(header, place);
    else if (seen.has(column)) {
      problems.add("duplicate-header", { file, row, column: header, found: header });
      isSound = false;
    }
    const expected = unitsExpected(recognised, table);
    if (expected !== undefined) {
      const found = recognised.bracket ?? "";
      const nearest = suggestName(found, expected);
      problems.add("unknown-unit", {
        file,
        row,
        column: header,
        found,
        detail: expected.join(", "),
        nearest,
      });
      isSound = false;
    }
    if (column !== undefined) seen.add(column);
  }
  return tellMissing(columns, place) && isSound;
}

/** The units that a header's column can have, where the one written is none of them. */
function unitsExpected(
  { column, bracket }: RecognisedColumn,
  table: TableDeclaration,
): readonly string[] | undefined {
  const unit = column === undefined ? undefined : table.columns[column].unit;
  if (unit === undefined || bracket === undefined) return undefined;
  if (unit === "section") return lengthUnits;
  return isFixedUnit(bracket, unit) ? undefined : [unit];
}

function tellUnused(header: string, { file, row, table, problems }: HeaderPlace): void {
  const name = header.trim();
  if (name === "") problems.add("blank-header", { file, row, found: "a blank cell" });
  else if (!table.furtherColumns) {
    const nearest = suggestName(name, Object.keys(table.columns));
    problems.add("unknown-column", { file, row, column: name, found: name, nearest });
  }
}

function tellMissing(
  columns: readonly RecognisedColumn[],
  { file, row, table, problems }: HeaderPlace,
): boolean {
  const missing = missingColumns(columns, table);
  const unused = columns.filter(({ column }) => column === undefined).map(({ header }) => header);
  const found = columns.map(({ header }) => header).join(",");
  for (const detail of missing)
    problems.add("missing-column", { file, row, found, detail, nearest: suggestName(detail, unused) });
  return missing.length === 0;
}
