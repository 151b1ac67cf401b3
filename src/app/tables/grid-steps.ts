import { plural } from "../../report/wordings/words.ts";
import type { Edit } from "./edits.ts";
import type { EditStep } from "./history.ts";
import { type Block, blockPlaces, type Cell } from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";

const cellEdit = (table: ShownTable, { place, column }: Cell, now: string): Edit => ({
  kind: "cell",
  file: table.id,
  row: table.rowNumbers[place] ?? 0,
  column,
  was: table.rows[place]?.[column] ?? "",
  now,
});

const isOpen = (table: ShownTable, place: number): boolean =>
  !table.setAside.has(table.rowNumbers[place] ?? 0);

const rowsWord = (rows: readonly number[]): string =>
  rows.length === 1 ? `row ${rows[0]}` : plural(rows.length, "row");

export const typedStep = (table: ShownTable, cell: Cell, now: string): EditStep => ({
  label: `typing in ${table.title}, row ${table.rowNumbers[cell.place]}`,
  edits: isOpen(table, cell.place) ? [cellEdit(table, cell, now)] : [],
});

/** Empties every cell of a block. */
export function clearedStep(table: ShownTable, block: Block, places: readonly number[]): EditStep {
  const [first, last] = block.columns;
  const edits = blockPlaces(block, places)
    .filter((place) => isOpen(table, place))
    .flatMap((place) =>
      Array.from({ length: last - first + 1 }, (_, at) => cellEdit(table, { place, column: first + at }, "")),
    )
    .filter((edit) => edit.kind === "cell" && edit.was !== "");
  return { label: `clearing cells of ${table.title}`, edits };
}

export interface Pasting {
  readonly cells: readonly (readonly string[])[];
  readonly block: Block;
  /** Places of the rows shown. */
  readonly places: readonly number[];
}

/** Pastes cells from a block's first cell on; one cell fills the whole block; rows that are not there are added. */
export function pastedStep(table: ShownTable, { cells, block, places }: Pasting): EditStep {
  const [top, bottom] = block.rows;
  const [left, right] = block.columns;
  const [[only = ""] = []] = cells;
  const isFilling = cells.length === 1 && cells[0]?.length === 1;
  const given = isFilling
    ? Array.from({ length: bottom - top + 1 }, () => Array.from({ length: right - left + 1 }, () => only))
    : cells;
  const shown = places.slice(top, top + given.length);
  const missing = Array.from({ length: given.length - shown.length }, (_, at) => table.rows.length + at);
  const added = missing.map(
    (_, at): Edit => ({ kind: "row-added", file: table.id, row: table.nextRow + at }),
  );
  const edits = [...shown, ...missing].flatMap((place, at) =>
    !isOpen(table, place)
      ? []
      : (given[at] ?? [])
          .slice(0, table.columns.length - left)
          .map((now, column) => pastedCell(table, { place, column: left + column }, now)),
  );
  return { label: `pasting into ${table.title}`, edits: [...added, ...edits.filter(changes)] };
}

const changes = (edit: Edit): boolean => edit.kind !== "cell" || edit.was !== edit.now;

function pastedCell(table: ShownTable, cell: Cell, now: string): Edit {
  const beyond = cell.place - table.rows.length;
  if (beyond < 0) return cellEdit(table, cell, now);
  return { kind: "cell", file: table.id, row: table.nextRow + beyond, column: cell.column, was: "", now };
}

export const addedRowStep = (table: ShownTable): EditStep => ({
  label: `adding row ${table.nextRow} to ${table.title}`,
  edits: [{ kind: "row-added", file: table.id, row: table.nextRow }],
});

export const setAsideStep = (table: ShownTable, rows: readonly number[], reason: string): EditStep => ({
  label: `setting aside ${rowsWord(rows)} of ${table.title}`,
  edits: rows.map((row) => ({ kind: "row-set-aside", file: table.id, row, reason })),
});

export const takenBackStep = (file: string, rows: readonly number[]): EditStep => ({
  label: `taking back ${rowsWord(rows)} of ${file}`,
  edits: rows.map((row) => ({ kind: "row-taken-back", file, row })),
});
