import type { HeaderHint, ReadSheet } from "../../study/assembly/context.ts";
import { encode } from "../../study/coded.ts";
import type { Sheet } from "../../study/model.ts";
import { parseName } from "../../study/open-nomenclature.ts";
import type { Grid } from "./grid.ts";
import type { WideLayout } from "./wide-layout.ts";
import type { LongRow } from "./wide-rows.ts";

/** A long table as reading needs it, made of rows of a wide sheet. */
export function longSheet(
  shown: Sheet,
  table: "occurrences" | "samples" | "taxa",
  { columns, rows, hints }: LongSheet,
): ReadSheet {
  const sheet: Sheet = {
    file: shown.file,
    table,
    dialect: shown.dialect,
    headers: columns,
    columns,
    recognised: [],
    rows: rows.map(({ cells }) => columns.map((column) => cells[column] ?? "")),
    rowNumbers: rows.map(({ row }) => row),
  };
  if (table !== "occurrences") return { sheet, hints, shown };
  const stands = shown.headers.map((column) => ({ file: shown.file, column }));
  const none = { file: shown.file };
  return {
    sheet,
    hints,
    shown,
    stands: encode(rows.map(({ column }) => (column === undefined ? none : stands[column]))),
  };
}

interface LongSheet {
  readonly columns: readonly string[];
  readonly rows: readonly LongRow[];
  readonly hints: ReadonlyMap<string, HeaderHint>;
}

/** What the headers beside the taxa say of axis and unit. */
export const leadingHints = ({ leading }: WideLayout): ReadonlyMap<string, HeaderHint> =>
  new Map(
    leading.flatMap(({ column, isUsed, header, axis, unit, bracket }) =>
      column === undefined || !isUsed ? [] : [[column, { header, axis, unit, bracket }] as const],
    ),
  );

/** The group of each taxon, where a row of the sheet names them; a name reaches to the next. */
export function groupRows(grid: Grid, { groupRow, taxa }: WideLayout): readonly LongRow[] {
  if (groupRow === undefined) return [];
  let group = "";
  const groups = new Map<string, LongRow>();
  for (const { column, name } of taxa) {
    group = grid.at(groupRow, column) || group;
    const taxon = parseName(name).name;
    if (group !== "" && !groups.has(taxon))
      groups.set(taxon, { cells: { taxon, group }, row: grid.rowOf(groupRow, column) });
  }
  return [...groups.values()];
}
