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
  /** Whether keys reach the names of the columns, above the first row. */
  readonly hasHeader?: boolean;
  /** Whether something stands in a cell; absent: every cell counts as filled. */
  readonly isFilled?: (cell: Cell) => boolean;
}

/** The place of the names of the columns. */
export const HEADER = -1;

export const isHeader = ({ active }: Selection): boolean => active.place === HEADER;

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
  const at = isHeader(selection) ? HEADER : Math.max(0, view.places.indexOf(active.place));
  const next = nextCell(move, { index: at, column: active.column }, view);
  const place = next && (next.index === HEADER && view.hasHeader ? HEADER : view.places[next.index]);
  if (next === undefined || place === undefined) return undefined;
  const cell = { place, column: next.column };
  const isStretched = move.isShift && move.key !== "Tab" && place !== HEADER && !isHeader(selection);
  return { anchor: isStretched ? selection.anchor : cell, active: cell };
}

interface ShownCell {
  readonly index: number;
  readonly column: number;
}

function nextCell(move: Move, at: ShownCell, view: View): ShownCell | undefined {
  const { key, isControl, isShift } = move;
  const last = { index: view.places.length - 1, column: view.columns - 1 };
  const isAtTop = at.index <= 0 && view.hasHeader === true && !isShift;
  const row = (index: number) => ({ ...at, index: Math.min(Math.max(0, index), last.index) });
  const column = (column: number) => ({ ...at, column: Math.min(Math.max(0, column), last.column) });
  switch (key) {
    case "ArrowUp":
      if (isAtTop) return { ...at, index: HEADER };
      return isControl ? edgeOfFilled(at, { index: -1, column: 0 }, view) : row(at.index - 1);
    case "ArrowDown":
      return isControl && at.index >= 0 ? edgeOfFilled(at, { index: 1, column: 0 }, view) : row(at.index + 1);
    case "ArrowLeft":
      return isControl ? edgeOfFilled(at, { index: 0, column: -1 }, view) : column(at.column - 1);
    case "ArrowRight":
      return isControl ? edgeOfFilled(at, { index: 0, column: 1 }, view) : column(at.column + 1);
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

/** The last of the filled cells that follow one another, else the next filled one, else the edge of the table. */
function edgeOfFilled(from: ShownCell, by: ShownCell, view: View): ShownCell {
  const { places, columns, isFilled } = view;
  const isInside = ({ index, column }: ShownCell) =>
    column >= 0 && column < columns && (index >= 0 ? index < places.length : index === from.index);
  const step = ({ index, column }: ShownCell) => ({ index: index + by.index, column: column + by.column });
  const holds = ({ index, column }: ShownCell) => {
    const place = index === HEADER ? HEADER : places[index];
    return place !== undefined && (isFilled?.({ place, column }) ?? true);
  };
  let at = from;
  let next = step(at);
  if (isInside(next) && holds(from) && holds(next)) {
    for (; isInside(next) && holds(next); next = step(at)) at = next;
    return at;
  }
  for (; isInside(next); next = step(at)) {
    at = next;
    if (holds(at)) break;
  }
  return at;
}

/** The next cell in reading order; none before the first and behind the last. */
function alongRows({ index, column }: ShownCell, by: number, view: View): ShownCell | undefined {
  const order = index * view.columns + column + by;
  const isHead = index === HEADER;
  if (isHead)
    return column + by >= 0 && column + by < view.columns ? { index, column: column + by } : undefined;
  if (order < 0 || order >= view.places.length * view.columns) return undefined;
  return { index: Math.floor(order / view.columns), column: order % view.columns };
}

/** Rows and columns of a block, first and last, rows counted as they are shown. */
export interface Block {
  readonly rows: readonly [first: number, last: number];
  readonly columns: readonly [first: number, last: number];
}

export function blockOf(selection: Selection, places: readonly number[]): Block {
  const { anchor, active } = selection;
  if (isHeader(selection)) return { rows: [HEADER, HEADER], columns: [active.column, active.column] };
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
