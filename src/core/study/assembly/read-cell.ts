import { type ParsedCell, parseCell, withDecimalPoint } from "../cells.ts";
import { suggestName } from "../nearest.ts";
import { columnOfFind } from "../occurrence-list.ts";
import type { Stand } from "../origin.ts";
import type { ProblemCode } from "../problem-wordings.ts";
import type { ColumnDeclaration } from "../tables/declare.ts";
import { isFixedUnit, lengthUnit } from "../units.ts";
import type { Assembly, ReadSheet } from "./context.ts";
import { onlyNumber, onlyWord } from "./one-mend.ts";
import { sectionUnit } from "./section-unit.ts";

export interface CellPlace {
  readonly name: string;
  readonly file: string;
  readonly row: number;
  readonly stand: Stand | undefined;
  readonly assembly: Assembly;
  readonly read: ReadSheet;
  /** The whole row. */
  readonly cells: readonly string[];
}

/** A blank that another rule speaks of: a missing value is told by the reading, a unit can stand in the header. */
const isToldElsewhere = ({ name, read }: Pick<CellPlace, "name" | "read">): boolean =>
  name === "value" ||
  (name === "unit" && (read.hints.get("value")?.bracket !== undefined || !read.hints.has("unit")));

export interface CellFault {
  readonly code: ProblemCode;
  readonly detail?: string;
}

/** What a cell says, or what is wrong with it. */
export function readCell(
  text: string,
  column: ColumnDeclaration,
  place: Pick<CellPlace, "name" | "read">,
): { readonly value?: unknown; readonly fault?: CellFault } {
  const parsed = parseWritten(text, column, place);
  if ("code" in parsed) return { fault: parsed };
  if (parsed.value !== undefined) return parsed;
  if (!column.required) return {};
  return isToldElsewhere(place) ? { value: "" } : { fault: { code: "blank-cell" } };
}

export function tellCell(
  text: string,
  column: ColumnDeclaration,
  { fault, ...place }: CellPlace & { readonly fault: CellFault },
): void {
  const { code, detail } = fault;
  const { name, file, row, stand, assembly } = place;
  const at = { file, row, column: columnOfFind(stand, name), found: text };
  if (code === "blank-cell" || assembly.problems.isFull(code, at.file))
    return assembly.problems.add(code, at);
  const nearest = code === "not-in-list" ? suggestName(text.trim(), column.values ?? []) : undefined;
  assembly.problems.add(code, { ...at, detail, nearest, now: onlyMend(text, column, place) });
}

/** The one content that a cell must have been meant to hold, if it is one alone and good. */
function onlyMend(text: string, column: ColumnDeclaration, place: CellPlace): string | undefined {
  const { unit, type } = column;
  const isOwnUnit = (written: string) =>
    unit === "section"
      ? lengthUnit(written) !== undefined && lengthUnit(written) === sectionUnit(place)
      : unit !== undefined && isFixedUnit(written, unit);
  const { decimal } = place.read.sheet.dialect;
  const now =
    type === "enum" ? onlyWord(text, column.values ?? []) : onlyNumber(text, { decimal, isOwnUnit });
  return now === undefined || "code" in parseWritten(now, column, place) ? undefined : now;
}

/** The cell as its column and the file's dialect say. */
function parseWritten(
  text: string,
  column: ColumnDeclaration,
  { name, read }: Pick<CellPlace, "name" | "read">,
): ParsedCell {
  const { decimal, missing } = read.sheet.dialect;
  if (missing.includes(text)) return { value: undefined };
  const isNumber = column.type === "number" || column.type === "integer" || name === "value";
  if (decimal === "point" || !isNumber) return parseCell(text, column);
  const pointed = withDecimalPoint(text);
  return pointed === undefined ? { code: "not-a-number", detail: "comma" } : parseCell(pointed, column);
}
