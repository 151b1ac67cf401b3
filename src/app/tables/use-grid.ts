import {
  type ClipboardEvent,
  type FocusEvent,
  type KeyboardEvent,
  type MouseEvent,
  type RefObject,
  useRef,
  useState,
} from "react";
import type { Leaving } from "./cell-editor.tsx";
import { blockCells, blockText } from "./clipboard.ts";
import { cellUnder } from "./grid-row.tsx";
import { clearedStep, pastedStep, typedStep } from "./grid-steps.ts";
import type { EditStep } from "./history.ts";
import { blockOf, blockPlaces, movedBy, type Selection, type View } from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";

interface GridUse {
  readonly table: ShownTable;
  readonly view: Omit<View, "pageRows">;
  /** How many rows fit in the frame. */
  readonly pageRows: () => number;
  readonly selection: Selection;
  readonly select: (selection: Selection) => void;
  readonly edit: (step: EditStep) => void;
  readonly tell: (words: string) => void;
}

/** The text with which the active cell is being written in; undefined while none is. */
type Draft = string | undefined;

const LEAVING_KEYS: Readonly<Record<Exclude<Leaving, "stay">, string>> = {
  down: "ArrowDown",
  up: "ArrowUp",
  right: "Tab",
  left: "Tab",
};

/** Keys, pointer and clipboard of a grid, as spreadsheets have them. */
export function useGrid(grid: RefObject<HTMLTableElement | null>, use: GridUse) {
  const { table, view, pageRows, selection, select, edit, tell } = use;
  const [draft, setDraft] = useState<Draft>();
  // A person who came by Tab leaves by Tab, until another key says that they work here.
  const isPassing = useRef(true);
  const isPressed = useRef(false);
  const { active } = selection;
  const block = blockOf(selection, view.places);
  const canWrite =
    table.isEditable && view.places.length > 0 && !table.setAside.has(table.rowNumbers[active.place] ?? 0);

  const move = (key: string, isControl = false, isShift = false) => {
    const next = movedBy({ key, isControl, isShift }, selection, { ...view, pageRows: pageRows() });
    if (next !== undefined) select(next);
    return next !== undefined;
  };

  const onKeyDown = (event: KeyboardEvent) => {
    const { key, shiftKey, altKey } = event;
    const isControl = event.ctrlKey || event.metaKey;
    if (altKey) return;
    if (key === "Escape") isPassing.current = true;
    else if (key === "Tab" && isPassing.current) return;
    else if (key !== "Tab" && key !== "Shift") isPassing.current = false;
    if (!(move(key, isControl, shiftKey) || act(key, isControl))) return;
    event.preventDefault();
  };

  const act = (key: string, isControl: boolean): boolean => {
    if (isControl && key.toLowerCase() === "a") {
      selectAll();
      return true;
    }
    if (!table.isEditable || isControl) return false;
    if (key === "Delete" || key === "Backspace") edit(clearedStep(table, block, view.places));
    else if (key === "Enter" || key === "F2") write(table.rows[active.place]?.[active.column] ?? "");
    else if (/^.$/u.test(key)) write(key);
    else return false;
    return true;
  };

  const write = (start: string) => {
    if (canWrite) setDraft(start);
    else tell("This row is set aside: take it back before writing in it.");
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
            edit(typedStep(table, active, text));
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
      write(table.rows[active.place]?.[active.column] ?? "");
  };

  const onCopy = (event: ClipboardEvent) => {
    const [first, last] = block.columns;
    const rows = blockPlaces(block, view.places).map((place) =>
      table.columns.slice(first, last + 1).map((_, at) => table.rows[place]?.[first + at] ?? ""),
    );
    event.clipboardData.setData("text/plain", blockText(rows));
    event.preventDefault();
  };
  const onCut = (event: ClipboardEvent) => {
    onCopy(event);
    if (table.isEditable) edit(clearedStep(table, block, view.places));
  };
  const onPaste = (event: ClipboardEvent) => {
    if (!table.isEditable) return;
    event.preventDefault();
    const cells = blockCells(event.clipboardData.getData("text/plain"));
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
