import type { Axis, LengthUnit } from "./model.ts";
import type { ColumnDeclaration, TableDeclaration } from "./tables/declare.ts";
import { lengthUnit } from "./units.ts";

/** What a header cell was taken to be. */
export interface RecognisedColumn {
  readonly header: string;
  /** The declared column; undefined: kept, not used. */
  readonly column?: string;
  readonly axis?: Axis;
  readonly unit?: LengthUnit;
  /** Text in brackets that is not a length unit. */
  readonly bracket?: string;
}

/** A name without case, spaces, points, hyphens and underscores. */
const plainName = (name: string): string =>
  name
    .normalize("NFC")
    .toLowerCase()
    .replace(/[\s_.\-:]+/g, "");

/** Every name a column is known by, plain, to the declared name. */
function knownNames(table: TableDeclaration): ReadonlyMap<string, string> {
  const names = new Map<string, string>();
  for (const name of Object.keys(table.columns)) names.set(plainName(name), name);
  for (const [name, column] of Object.entries(table.columns)) {
    for (const other of [column.dwc, ...(column.synonyms ?? [])]) {
      if (other !== undefined && !names.has(plainName(other))) names.set(plainName(other), name);
    }
  }
  return names;
}

/** Parts a trailing unit from a header: `height (m)`, `depth [ft]`, `position_cm`, `depth, ft`. */
function partUnit(header: string): {
  readonly name: string;
  readonly unit?: string;
  readonly isBracketed: boolean;
} {
  const bracketed = /^(.*?)[\s_]*[([]([^)\]]*)[)\]]$/s.exec(header);
  if (bracketed) return { name: bracketed[1], unit: bracketed[2].trim(), isBracketed: true };
  const trailing = /^(.*?)[\s_,]+([^\s_,]+)$/s.exec(header);
  if (trailing && lengthUnit(trailing[2]) !== undefined)
    return { name: trailing[1], unit: trailing[2], isBracketed: false };
  return { name: header, isBracketed: false };
}

/** The axis a header of a position says by itself. */
function axisOf(header: string): Axis | undefined {
  const name = header.toLowerCase();
  if (name.includes("depth")) return "depth";
  return name.includes("height") || name.includes("elevation") ? "height" : undefined;
}

const hints = (header: string, column: ColumnDeclaration, unit: string | undefined) => {
  if (column.unit !== "section") return unit === undefined ? {} : { bracket: unit };
  const axis = column.measures === "position" ? axisOf(header) : undefined;
  const meant = /inmet(?:re|er)s$/i.test(header) ? "m" : unit === undefined ? undefined : lengthUnit(unit);
  return {
    ...(axis === undefined ? {} : { axis }),
    ...(meant === undefined ? {} : { unit: meant }),
    ...(unit === undefined || meant !== undefined ? {} : { bracket: unit }),
  };
};

/**
 * Recognises header cells by declared name, synonym or Darwin Core term, without regard to case, spaces, hyphens and
 * underscores, and by a unit written in them.
 */
export function recogniseColumns(
  headers: readonly string[],
  table: TableDeclaration,
): readonly RecognisedColumn[] {
  const names = knownNames(table);
  const recognised = headers.map((header) => {
    const trimmed = header.trim();
    const whole = names.get(plainName(trimmed));
    if (whole !== undefined)
      return { header, column: whole, ...hints(trimmed, table.columns[whole], undefined) };
    const { name, unit } = partUnit(trimmed);
    const part = unit === undefined ? undefined : names.get(plainName(name));
    if (part === undefined) return { header };
    return { header, column: part, ...hints(name, table.columns[part], unit) };
  });
  return withoutRivals(recognised);
}

/** A column named as declared stands before those known by another name; they are kept and not used. */
function withoutRivals(recognised: readonly RecognisedColumn[]): readonly RecognisedColumn[] {
  const isDeclared = ({ header, column }: RecognisedColumn) =>
    column !== undefined &&
    [header.trim(), partUnit(header.trim()).name].some((name) => plainName(name) === plainName(column));
  const declared = new Set(recognised.filter(isDeclared).map(({ column }) => column));
  return recognised.map((one) =>
    declared.has(one.column) && !isDeclared(one) ? { header: one.header } : one,
  );
}
