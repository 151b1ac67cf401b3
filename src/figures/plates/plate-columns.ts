import type { ReactNode } from "react";
import type { LegendEntry } from "../legend.tsx";
import type { PatternId } from "../lithology/pattern-tiles.ts";

/** One column of a plate: what it needs across, and how it is drawn from its left edge. */
export interface PlateColumn {
  readonly key: string;
  readonly width: number;
  /** Room kept free to its right; default that of a column. */
  readonly gap?: number;
  readonly draw: (x: number) => ReactNode;
  readonly legend?: readonly LegendEntry[];
  readonly patterns?: readonly PatternId[];
}

export interface PlacedColumn extends PlateColumn {
  readonly x: number;
}

export const COLUMN_GAP = 9;

/** Columns side by side from the left edge given; the row ends at the right edge of the last. */
export function placeColumns(
  columns: readonly PlateColumn[],
  left: number,
): { readonly placed: readonly PlacedColumn[]; readonly right: number } {
  const placed: PlacedColumn[] = [];
  let [x, right] = [left, left];
  for (const column of columns) {
    placed.push({ ...column, x });
    right = x + column.width;
    x = right + (column.gap ?? COLUMN_GAP);
  }
  return { placed, right };
}
