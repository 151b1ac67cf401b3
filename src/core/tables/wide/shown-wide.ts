import type { Dialect, Sheet } from "../../study/model.ts";
import type { Recognition } from "../../study/recognised.ts";
import { samples } from "../../study/tables/samples.ts";
import { recognition, sampleValues } from "../recognition.ts";
import { columnCells, type Grid } from "./grid.ts";
import type { WideLayout } from "./wide-layout.ts";
import type { WideShape } from "./wide-shape.ts";

/** The sheet as it stands in its file, to look at and to mend. */
export function shownSheet(
  { shape, records, grid, layout }: WideShape,
  dialect: Dialect,
  file: string,
): Sheet {
  const below = shape === "taxa-down" ? 1 : layout.below;
  const rows = records.slice(below);
  const width = records.reduce((most, { cells }) => Math.max(most, cells.length), 0);
  const headerOf = new Map([
    ...layout.leading.map(({ at, header }) => [at, header] as const),
    ...layout.taxa.map(({ column, name }) => [column, name] as const),
  ]);
  const headers = Array.from({ length: width }, (_, at) =>
    shape === "taxa-down" ? (records[0]?.cells[at] ?? "") : (headerOf.get(at) ?? ""),
  );
  const usedAt = new Map(layout.leading.map(({ at, column, isUsed }) => [at, isUsed ? column : undefined]));
  return {
    file,
    table: "occurrences",
    dialect,
    headers,
    columns: headers.map((_, at) => (shape === "taxa-down" ? undefined : usedAt.get(at))),
    recognised: recognisedIn(grid, layout),
    rows: rows.map(({ cells }) => headers.map((_, at) => cells[at] ?? "")),
    rowNumbers: rows.map(({ row }) => row),
  };
}

function recognisedIn(grid: Grid, layout: WideLayout): readonly Recognition[] {
  const { below, leading, taxa } = layout;
  const valuesOf = (at: number) =>
    sampleValues(
      columnCells(grid, at, below).map((cell) => [cell]),
      0,
    );
  const all = [
    ...leading.map((column) => ({
      at: column.at,
      one: { ...recognition(column, samples), values: valuesOf(column.at) },
      isUsed: column.isUsed && column.column !== "taxon" && column.column !== "group",
    })),
    ...taxa.map(({ column, name, by = "name" as const }) => ({
      at: column,
      one: { header: name, is: "taxon", by, values: valuesOf(column) },
      isUsed: true,
    })),
  ];
  return all
    .toSorted((a, b) => a.at - b.at)
    .flatMap(({ one, isUsed }) =>
      one.header === "" && !isUsed ? [] : [isUsed ? one : { ...one, is: "unused" }],
    );
}
