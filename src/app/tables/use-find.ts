import type { RefObject } from "react";
import type { Cell, Selection } from "./selection.ts";
import type { ShownTable } from "./shown-table.ts";

/** Looking for words in a table. */
export interface Finding {
  /** Goes to the field of the words. */
  readonly open: () => void;
  /** Goes to the next cell that holds them, or the one before. */
  readonly next: (isBackward: boolean) => void;
}

interface FindUse {
  readonly field: RefObject<HTMLInputElement | null>;
  readonly table: ShownTable;
  readonly places: readonly number[];
  readonly words: string;
  readonly selection: Selection;
  readonly select: (selection: Selection) => void;
  readonly tell: (words: string) => void;
}

export function useFind({ field, table, places, words, selection, select, tell }: FindUse): Finding {
  const open = () => {
    field.current?.focus();
    field.current?.select();
  };
  const next = (isBackward: boolean) => {
    const sought = field.current?.value ?? words;
    if (sought.trim() === "") {
      open();
      return;
    }
    const found = nextFound(table, { places, words: sought, from: selection.active, isBackward });
    if (found === undefined) tell(`No cell here holds “${sought.trim()}”.`);
    else select({ anchor: found, active: found });
  };
  return { open, next };
}

interface Search {
  readonly places: readonly number[];
  readonly words: string;
  readonly from: Cell;
  readonly isBackward: boolean;
}

/** The next cell in reading order that holds the words, round the end to the beginning. */
export function nextFound(table: ShownTable, { places, words, from, isBackward }: Search): Cell | undefined {
  const sought = words.trim().toLowerCase();
  const width = table.columns.length;
  const size = places.length * width;
  const by = isBackward ? -1 : 1;
  const start = Math.max(0, places.indexOf(from.place)) * width + from.column;
  for (let step = 1; step <= size; step++) {
    const at = (((start + by * step) % size) + size) % size;
    const cell = { place: places[Math.floor(at / width)] ?? 0, column: at % width };
    const text = table.rows[cell.place]?.[cell.column] ?? "";
    if (text.toLowerCase().includes(sought)) return cell;
  }
  return undefined;
}
