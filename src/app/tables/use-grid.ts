import {
  type ClipboardEvent,
  type FocusEvent,
  type KeyboardEvent,
  type MouseEvent,
  type RefObject,
  useRef,
} from "react";
import type { Leaving } from "./cell-editor.tsx";
import { blockCells, blockText } from "./clipboard.ts";
import { cellUnder } from "./grid-row.tsx";
import { clearedStep, filledDownStep, pastedStep, renamedStep, rowId, typedStep } from "./grid-steps.ts";
import type { EditStep } from "./history.ts";
import {
  blockOf,
  blockPlaces,
  type Cell,
  HEADER,
  isHeader,
  movedBy,
  type Selection,
  type View,
} from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";
import type { Finding } from "./use-find.ts";

interface GridUse {
  readonly table: ShownTable;
  readonly view: Omit<View, "pageRows">;
  /** How many rows fit in the frame. */
  readonly pageRows: () => number;
  readonly selection: Selection;
  readonly select: (selection: Selection) => void;
  readonly edit: (step: EditStep) => void;
  /** Puts a blank row above the row of a place, and goes to it. */
  readonly insert: (place: number) => void;
  readonly find: Finding;
  readonly draft: Draft;
  readonly setDraft: (draft: Draft) => void;
  readonly tell: (words: string) => void;
}

/** The text with which the active cell is being written in; undefined while none is. */
export type Draft = string | undefined;

const LEAVING_KEYS: Readonly<Record<Exclude<Leaving, "stay">, string>> = {
  down: "ArrowDown",
  up: "ArrowUp",
  right: "Tab",
  left: "Tab",
};

/** Keys, pointer and clipboard of a grid, as spreadsheets have them. */
export function useGrid(grid: RefObject<HTMLTableElement | null>, use: GridUse) {
  const { table, view, pageRows, selection, select, edit, tell, draft, setDraft } = use;
  // A person who came by Tab leaves by Tab, until another key says that they work here.
  const isPassing = useRef(true);
  const isPressed = useRef(false);
  const { active } = selection;
  const block = blockOf(selection, view.places);
  const isInHeader = isHeader(selection);

  const move = (key: string, isControl = false, isShift = false) => {
    const next = movedBy({ key, isControl, isShift }, selection, { ...view, pageRows: pageRows() });
    if (next !== undefined) select(next);
    return next !== undefined;
  };

  const onKeyDown = (event: KeyboardEvent) => {
    const { key, shiftKey, altKey } = event;
    const isControl = event.ctrlKey || event.metaKey;
    if (key === "Escape") isPassing.current = true;
    else if (key === "Tab" && isPassing.current) return;
    else if (key !== "Tab" && key !== "Shift") isPassing.current = false;
    const isDone = altKey
      ? insertBy(key)
      : key === "Enter" && shiftKey
        ? move("ArrowUp")
        : move(key, isControl, shiftKey) || command(key, isControl, shiftKey) || write(key, isControl);
    if (isDone) event.preventDefault();
  };

  const insertBy = (key: string): boolean => {
    if (!table.isEditable || isInHeader || !(key === "ArrowUp" || key === "ArrowDown")) return false;
    use.insert(active.place + (key === "ArrowDown" ? 1 : 0));
    return true;
  };

  const command = (key: string, isControl: boolean, isShift: boolean): boolean => {
    const name = key.toLowerCase();
    if (isControl && name === "a") selectAll();
    else if (isControl && name === "f") use.find.open();
    else if (key === "F3") use.find.next(isShift);
    else if (isControl && name === "d" && table.isEditable) edit(filledDownStep(table, block, view.places));
    else return false;
    return true;
  };

  const write = (key: string, isControl: boolean): boolean => {
    if (!table.isEditable || isControl) return false;
    if (key === "Delete" || key === "Backspace") clear();
    else if (key === "Enter" || key === "F2") start(textOf(table, active));
    else if (/^.$/u.test(key)) start(key);
    else return false;
    return true;
  };

  const clear = () => {
    if (isInHeader) tell("A column keeps its name: F2 writes another.");
    else edit(clearedStep(table, block, view.places));
  };

  const start = (text: string) => {
    const hindrance = hindranceOf(table, active, view.places);
    if (hindrance === undefined) setDraft(text);
    else tell(hindrance);
  };

  const selectAll = () => {
    const [first, last] = [view.places[0], view.places.at(-1)];
    if (first === undefined || last === undefined) return;
    select({ anchor: { place: last, column: view.columns - 1 }, active: { place: first, column: 0 } });
  };

  const editor =
    draft === undefined
      ? undefined
      : {
          start: draft,
          take: (text: string, leaving: Leaving) => {
            setDraft(undefined);
            edit(isInHeader ? renamedStep(table, active.column, text) : typedStep(table, active, text));
            if (leaving === "stay") return;
            grid.current?.focus({ preventScroll: true });
            move(LEAVING_KEYS[leaving], false, leaving === "left");
          },
          giveUp: () => {
            setDraft(undefined);
            grid.current?.focus({ preventScroll: true });
          },
        };

  const onMouseDown = (event: MouseEvent) => {
    const cell = cellUnder(event);
    if (cell === undefined || event.button !== 0 || event.target instanceof HTMLTextAreaElement) return;
    isPassing.current = false;
    isPressed.current = true;
    select({ anchor: event.shiftKey ? selection.anchor : cell, active: cell });
  };
  const onFocus = (event: FocusEvent) => {
    const isFromOutside = !event.currentTarget.contains(event.relatedTarget);
    if (isFromOutside && !isPressed.current) isPassing.current = true;
    isPressed.current = false;
  };
  const onMouseMove = (event: MouseEvent) => {
    const cell = event.buttons === 1 && draft === undefined ? cellUnder(event) : undefined;
    if (cell !== undefined && (cell.place !== active.place || cell.column !== active.column))
      select({ ...selection, active: cell });
  };
  const onDoubleClick = (event: MouseEvent) => {
    if (table.isEditable && cellUnder(event) !== undefined && draft === undefined)
      start(textOf(table, active));
  };

  const onCopy = (event: ClipboardEvent) => {
    const [first, last] = block.columns;
    const rows = isInHeader
      ? [[textOf(table, active)]]
      : blockPlaces(block, view.places).map((place) =>
          table.columns.slice(first, last + 1).map((_, at) => table.rows[place]?.[first + at] ?? ""),
        );
    event.clipboardData.setData("text/plain", blockText(rows));
    event.preventDefault();
  };
  const onCut = (event: ClipboardEvent) => {
    onCopy(event);
    if (table.isEditable) clear();
  };
  const onPaste = (event: ClipboardEvent) => {
    if (!table.isEditable) return;
    event.preventDefault();
    const cells = blockCells(event.clipboardData.getData("text/plain"));
    if (isInHeader) {
      start(cells[0]?.[0] ?? "");
      return;
    }
    edit(pastedStep(table, { cells, block, places: view.places }));
    const beyond = (cells[0]?.length ?? 0) - (view.columns - block.columns[0]);
    tell(
      beyond > 0
        ? `The block is ${beyond} columns wider than the table: what stood in them was not pasted.`
        : `${cells.length} × ${cells[0]?.length ?? 0} cells pasted.`,
    );
  };

  return {
    editor,
    handlers: { onKeyDown, onFocus, onMouseDown, onMouseMove, onDoubleClick, onCopy, onCut, onPaste },
  };
}

const textOf = (table: ShownTable, { place, column }: Cell): string =>
  (place === HEADER ? table.columns[column]?.header : table.rows[place]?.[column]) ?? "";

/** Why a cell cannot be written in; undefined where it can. */
function hindranceOf(
  table: ShownTable,
  { place, column }: Cell,
  places: readonly number[],
): string | undefined {
  if (place === HEADER) {
    if (table.columns[column]?.isBeyond === true) return "No column of the file has its name here.";
    return table.headerRows.length === 0 ? "The data package names these columns, not the file." : undefined;
  }
  if (places.length === 0) return "No row is shown here to write in.";
  return table.setAside.has(rowId(table, place))
    ? "This row is set aside: take it back before writing in it."
    : undefined;
}
