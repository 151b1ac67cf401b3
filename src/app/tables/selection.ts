/** A cell of a table: the place of its row among all rows, whatever is shown in which order, and its column. */
export interface Cell {
  readonly place: number;
  readonly column: number;
}

/** A block of cells from one corner to the other; the active one is where keys act. */
export interface Selection {
  readonly anchor: Cell;
  readonly active: Cell;
}

/** What is shown: places of rows in the order of the page, and how many columns there are. */
export interface View {
  readonly places: readonly number[];
  readonly columns: number;
  /** Rows that fit in the frame. */
  readonly pageRows: number;
}

export interface Move {
  readonly key: string;
  readonly isControl: boolean;
  readonly isShift: boolean;
}

export const FIRST_CELL: Selection = {
  anchor: { place: 0, column: 0 },
  active: { place: 0, column: 0 },
};

/** The selection after a key as spreadsheets know it; undefined where the key moves nothing. */
export function movedBy(move: Move, selection: Selection, view: View): Selection | undefined {
  const { active } = selection;
  const at = Math.max(0, view.places.indexOf(active.place));
  const next = nextCell(move, { index: at, column: active.column }, view);
  const place = next && view.places[next.index];
  if (next === undefined || place === undefined) return undefined;
  const cell = { place, column: next.column };
  return { anchor: move.isShift && move.key !== "Tab" ? selection.anchor : cell, active: cell };
}

interface ShownCell {
  readonly index: number;
  readonly column: number;
}

function nextCell(move: Move, at: ShownCell, view: View): ShownCell | undefined {
  const { key, isControl, isShift } = move;
  const last = { index: view.places.length - 1, column: view.columns - 1 };
  const row = (index: number) => ({ ...at, index: Math.min(Math.max(0, index), last.index) });
  const column = (column: number) => ({ ...at, column: Math.min(Math.max(0, column), last.column) });
  switch (key) {
    case "ArrowUp":
      return row(isControl ? 0 : at.index - 1);
    case "ArrowDown":
      return row(isControl ? last.index : at.index + 1);
    case "ArrowLeft":
      return column(isControl ? 0 : at.column - 1);
    case "ArrowRight":
      return column(isControl ? last.column : at.column + 1);
    case "PageUp":
      return row(at.index - view.pageRows);
    case "PageDown":
      return row(at.index + view.pageRows);
    case "Home":
      return isControl ? { index: 0, column: 0 } : column(0);
    case "End":
      return isControl ? last : column(last.column);
    case "Tab":
      return alongRows(at, isShift ? -1 : 1, view);
    default:
      return undefined;
  }
}

/** The next cell in reading order; none before the first and behind the last. */
function alongRows({ index, column }: ShownCell, by: number, view: View): ShownCell | undefined {
  const order = index * view.columns + column + by;
  if (order < 0 || order >= view.places.length * view.columns) return undefined;
  return { index: Math.floor(order / view.columns), column: order % view.columns };
}

/** Rows and columns of a block, first and last, rows counted as they are shown. */
export interface Block {
  readonly rows: readonly [first: number, last: number];
  readonly columns: readonly [first: number, last: number];
}

export function blockOf({ anchor, active }: Selection, places: readonly number[]): Block {
  const to = Math.max(0, places.indexOf(active.place));
  const found = anchor.place === active.place ? to : places.indexOf(anchor.place);
  const from = found < 0 ? to : found;
  return {
    rows: [Math.min(from, to), Math.max(from, to)],
    columns: [Math.min(anchor.column, active.column), Math.max(anchor.column, active.column)],
  };
}

export const blockPlaces = ({ rows: [first, last] }: Block, places: readonly number[]): readonly number[] =>
  places.slice(first, last + 1);
