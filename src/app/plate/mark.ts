import type { Analysis } from "../../core/analysis-result.ts";
import type { TableName } from "../../core/study/tables/index.ts";
import type { Place } from "../state/place.ts";

/** Something drawn on a plate that stands for rows of a table. */
export interface Mark {
  readonly kind: "row" | "sample" | "taxon" | "horizon";
  readonly name: string;
}

export const MARK_SELECTOR = "[data-row], [data-sample], [data-taxon], [data-horizon]";

/** The most particular thing an element of a plate says it is. */
export function markOf(element: Element | null): Mark | undefined {
  if (element === null) return undefined;
  for (const kind of ["row", "sample", "taxon", "horizon"] as const) {
    const name = element.getAttribute(`data-${kind}`);
    if (name !== null && name !== "") return { kind, name };
  }
  return undefined;
}

/** The rows of a mark: its table, and the row itself or its name as the words looked for. */
export function placeOfMark({ kind, name }: Mark, { study }: Analysis): Partial<Place> {
  const fileOf = (table: TableName) => study.sheets.find((sheet) => sheet.table === table)?.file;
  const at = { station: "tables", row: undefined, find: undefined } as const;
  switch (kind) {
    case "row": {
      const [, file, row] = /^(.*):(\d+)$/.exec(name) ?? [];
      return { ...at, table: file, row: row === undefined ? undefined : Number(row) };
    }
    case "sample":
      return { ...at, table: fileOf("samples") ?? fileOf("occurrences"), find: name };
    case "taxon":
      return { ...at, table: fileOf("occurrences") ?? fileOf("published-ranges"), find: name };
    case "horizon":
      return study.sections.some(({ horizons }) => horizons.some((horizon) => horizon.name === name))
        ? { ...at, table: fileOf("horizons"), find: name }
        : { ...at, table: "markers", find: name };
    default:
      return kind satisfies never;
  }
}

export const isSameMark = (one: Mark, other: Mark | undefined): boolean =>
  one.kind === other?.kind && one.name === other.name;

/** The part of the sheet that all elements of a mark take up, in pixels from its upper left corner. */
export interface MarkBox {
  readonly left: number;
  readonly top: number;
  readonly width: number;
  readonly height: number;
  /** Whether it lies in the right half, so that its name stands on its left. */
  readonly isRight: boolean;
}

const ROOM = 2;
/** The letters of a name lean far away from its range: what is framed is what is drawn. */
const SHAPES = "path, rect, line, circle, polygon";

export function markBox({ kind, name }: Mark, sheet: HTMLElement): MarkBox | undefined {
  const origin = sheet.getBoundingClientRect();
  const drawn = [...sheet.querySelectorAll(`[data-${kind}="${CSS.escape(name)}"]`)];
  const shapes = drawn
    .flatMap((part) => [part, ...part.querySelectorAll("*")])
    .filter((part) => part.matches(SHAPES));
  const parts = (shapes.length > 0 ? shapes : drawn)
    .map((part) => part.getBoundingClientRect())
    .filter(({ width, height }) => width > 0 || height > 0);
  if (parts.length === 0) return undefined;
  const left = Math.min(...parts.map((part) => part.left)) - origin.left;
  const top = Math.min(...parts.map((part) => part.top)) - origin.top;
  return {
    left: left - ROOM,
    top: top - ROOM,
    width: Math.max(...parts.map((part) => part.right)) - origin.left - left + 2 * ROOM,
    height: Math.max(...parts.map((part) => part.bottom)) - origin.top - top + 2 * ROOM,
    isRight: left > origin.width / 2,
  };
}
