import { plural } from "../../report/wordings/words.ts";
import type { Edit } from "./edits.ts";
import type { EditStep } from "./history.ts";
import { type Block, blockPlaces, type Cell } from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";

export const rowId = (table: ShownTable, place: number): number => table.rowIds[place] ?? 0;

const textAt = (table: ShownTable, { place, column }: Cell): string => table.rows[place]?.[column] ?? "";

function cellEdit(table: ShownTable, cell: Cell, now: string): Edit {
  const row = rowId(table, cell.place);
  const isMalformed = table.unread.get(row)?.includes(cell.column) === true;
  const own = { kind: "cell" as const, file: table.id, row, column: cell.column, now };
  return isMalformed ? own : { ...own, was: textAt(table, cell) };
}

const isOpen = (table: ShownTable, place: number): boolean => !table.setAside.has(rowId(table, place));

const rowsWord = (rows: readonly number[]): string =>
  rows.length === 1 ? `row ${rows[0]}` : plural(rows.length, "row");

export const typedStep = (table: ShownTable, cell: Cell, now: string): EditStep => ({
  label: `typing in ${table.title}, row ${table.rowNumbers[cell.place]}`,
  edits: isOpen(table, cell.place) ? [cellEdit(table, cell, now)] : [],
});

/** Calls a column by another name. A header of several rows becomes one of a single row that says the same. */
export function renamedStep(table: ShownTable, column: number, now: string): EditStep {
  const [row, ...further] = table.headerRows;
  const names = table.columns.filter(({ isBeyond }) => isBeyond !== true).map(({ header }) => header);
  const file = table.id;
  const was = names[column] ?? "";
  const label = `renaming ${was} in ${table.title}`;
  const name = { kind: "cell" as const, file, column, was, now };
  if (row === undefined) return { label, edits: [] };
  if (further.length === 0 || was === now) return { label, edits: [{ ...name, row }] };
  const whole = names.map(
    (header, at): Edit => ({ kind: "cell", file, row, column: at, now: at === column ? now : header }),
  );
  const emptied = further.flatMap((row) =>
    names.map((_, at): Edit => ({ kind: "cell", file, row, column: at, now: "" })),
  );
  return { label, edits: [...whole, ...emptied] };
}

const columnsOf = ({ columns: [first, last] }: Block): readonly number[] =>
  Array.from({ length: last - first + 1 }, (_, at) => first + at);

/** Empties every cell of a block. */
export function clearedStep(table: ShownTable, block: Block, places: readonly number[]): EditStep {
  const edits = blockPlaces(block, places)
    .filter((place) => isOpen(table, place))
    .flatMap((place) => columnsOf(block).map((column) => cellEdit(table, { place, column }, "")))
    .filter((edit) => edit.kind === "cell" && edit.was !== "");
  return { label: `clearing cells of ${table.title}`, edits };
}

/** Writes the cells of a block's first row in all its rows; of one row, those of the row shown above it. */
export function filledDownStep(table: ShownTable, block: Block, places: readonly number[]): EditStep {
  const [top, bottom] = block.rows;
  const source = places[top === bottom ? top - 1 : top];
  const below = blockPlaces(block, places).slice(top === bottom ? 0 : 1);
  const edits =
    source === undefined
      ? []
      : below
          .filter((place) => isOpen(table, place))
          .flatMap((place) =>
            columnsOf(block).map((column) =>
              cellEdit(table, { place, column }, textAt(table, { place: source, column })),
            ),
          )
          .filter(changes);
  return { label: `filling down in ${table.title}`, edits };
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
    (_, at): Edit => ({ kind: "row-added", file: table.id, row: table.nextRow.id + at }),
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
  return { kind: "cell", file: table.id, row: table.nextRow.id + beyond, column: cell.column, was: "", now };
}

export const addedRowStep = (table: ShownTable): EditStep => ({
  label: `adding row ${table.nextRow.shown} to ${table.title}`,
  edits: [{ kind: "row-added", file: table.id, row: table.nextRow.id }],
});

/** A blank row above the row of a place; behind all rows where there is none. */
export function insertedRowStep(table: ShownTable, place: number): EditStep {
  const above = table.rowIds[place];
  if (above === undefined) return addedRowStep(table);
  return {
    label: `inserting row ${table.rowNumbers[place]} in ${table.title}`,
    edits: [{ kind: "row-added", file: table.id, row: table.nextRow.id, above }],
  };
}

export const setAsideStep = (table: ShownTable, places: readonly number[], reason: string): EditStep => ({
  label: `setting aside ${rowsWord(places.map((place) => table.rowNumbers[place] ?? 0))} of ${table.title}`,
  edits: places.map((place) => ({
    kind: "row-set-aside",
    file: table.id,
    row: rowId(table, place),
    reason,
  })),
});

/** Takes back rows that were set aside, by the numbers by which edits know them. */
export const takenBackStep = (file: string, rows: readonly number[]): EditStep => ({
  label: `taking back ${plural(rows.length, "row")} of ${file}`,
  edits: rows.map((row) => ({ kind: "row-taken-back", file, row })),
});
