import type { ColumnChoice } from "../../study/tables/declare.ts";
import type { CsvRecord } from "../csv.ts";
import type { TableSetting } from "../dialect/declared.ts";
import { type Grid, gridOf } from "./grid.ts";
import { headerReader } from "./leading.ts";
import { isNote } from "./legend.ts";
import { type WideLayout, wideLayout } from "./wide-layout.ts";

/** A wide sheet among parted records: whether it has to be turned, and where everything stands. */
export interface WideShape {
  readonly shape: "samples-down" | "taxa-down";
  readonly records: readonly CsvRecord[];
  readonly notes: readonly CsvRecord[];
  readonly grid: Grid;
  readonly layout: WideLayout;
}

/** The shape in which most names of taxa stand; undefined where the records are no wide sheet. */
export function wideShape(
  records: readonly CsvRecord[],
  {
    chosen,
    shape,
  }: { readonly chosen: ReadonlyMap<string, ColumnChoice>; readonly shape?: TableSetting["shape"] },
): WideShape | undefined {
  if (shape === "long") return undefined;
  const notes = records.filter(({ cells }) => isNote(cells));
  const table = records.filter((record) => !notes.includes(record));
  const reader = headerReader(chosen);
  const shapes = (["samples-down", "taxa-down"] as const)
    .filter((one) => shape === undefined || shape === one)
    .flatMap((one): WideShape[] => {
      const grid = gridOf(table, one === "taxa-down");
      const layout = wideLayout(grid, reader);
      return layout === undefined ? [] : [{ shape: one, records: table, notes, grid, layout }];
    });
  return shapes.reduce<WideShape | undefined>(
    (best, one) => (best === undefined || one.layout.sure > best.layout.sure ? one : best),
    undefined,
  );
}
