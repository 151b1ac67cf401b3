import { axisWords, headerLanguages } from "./header-languages.ts";
import type { Axis, LengthUnit } from "./model.ts";
import type { ToldBy } from "./recognised.ts";
import type { ColumnChoice, ColumnDeclaration, TableDeclaration } from "./tables/declare.ts";
import { lengthUnit } from "./units.ts";

/** What a header cell was taken to be. */
export interface RecognisedColumn {
  readonly header: string;
  /** The declared column; undefined: kept, not used. */
  readonly column?: string;
  /** How it was told what the column is. */
  readonly by?: ToldBy;
  /** The language of a header in another language. */
  readonly language?: string;
  readonly axis?: Axis;
  readonly unit?: LengthUnit;
  /** Text in brackets that is not a length unit. */
  readonly bracket?: string;
  /** True where the unit is not the header's but chosen. */
  readonly isUnitChosen?: boolean;
}

/** A name without case, accents, spaces, points, hyphens and underscores. */
export const plainName = (name: string): string =>
  name
    .normalize("NFD")
    .replace(/\p{M}+/gu, "")
    .normalize("NFC")
    .toLowerCase()
    .replace(/[\s_.\-:]+/g, "");

interface KnownName {
  readonly column: string;
  readonly by: ToldBy;
  readonly language?: string;
}

type KnownNames = ReadonlyMap<string, KnownName>;

/** Names worked out once for a declaration, which never changes: a header is sought in many rows. */
const workedOut = new WeakMap<TableDeclaration["columns"], KnownNames>();

function knownNames({ columns }: TableDeclaration): KnownNames {
  const names = workedOut.get(columns) ?? namesOf(columns);
  workedOut.set(columns, names);
  return names;
}

/** Every name a column is known by, plain, to what it is; the declared names come before those in other languages. */
function namesOf(declared: TableDeclaration["columns"]): KnownNames {
  const names = new Map<string, KnownName>();
  const add = (written: string, known: KnownName) => {
    const name = plainName(written);
    if (!names.has(name)) names.set(name, known);
  };
  const columns = Object.entries(declared);
  for (const [column] of columns) add(column, { column, by: "name" });
  for (const [column, { dwc, synonyms = [] }] of columns) {
    if (dwc !== undefined) add(dwc, { column, by: "darwin-core" });
    for (const other of synonyms) add(other, { column, by: "synonym" });
  }
  for (const { language, columns: own } of headerLanguages) {
    for (const [column] of columns)
      for (const other of own[column] ?? []) add(other, { column, by: "other-language", language });
  }
  return names;
}

/** Parts a trailing unit from a header: `height (m)`, `depth [ft]`, `position_cm`, `depth, ft`. */
export function partUnit(header: string): {
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

const plainAxisWords = { depth: axisWords.depth.map(plainName), height: axisWords.height.map(plainName) };

/** The axis a header of a position says by itself. */
export function axisOf(header: string): Axis | undefined {
  const name = plainName(header);
  const says = (axis: Axis) => plainAxisWords[axis].some((word) => name.includes(word));
  if (says("depth")) return "depth";
  return says("height") ? "height" : undefined;
}

/** The unit in brackets, alone or beside the axis: `ft`, `depth, ft`, `m height`. */
function unitIn(bracket: string): LengthUnit | undefined {
  const words = bracket
    .split(/[\s,;]+/)
    .filter((word) => word !== "" && word !== "in" && axisOf(word) === undefined);
  return words.length === 1 ? lengthUnit(words[0]) : lengthUnit(bracket);
}

const links = /^(?:of|at|in|der|des|du|de|di|del|della|do|da)$/i;

/** A header without the words that say its axis: `first depth` as `first`, `depth of last occurrence` as `last occurrence`. */
const withoutAxis = (name: string): string => {
  if (axisOf(name) === undefined) return "";
  const words = name.split(/[\s_]+/);
  const own = words.filter((word) => axisOf(word) === undefined);
  return own.length === words.length || own.length === 0
    ? ""
    : own.slice(links.test(own[0]) ? 1 : 0).join(" ");
};

const hints = (header: string, column: ColumnDeclaration, unit: string | undefined) => {
  if (column.unit !== "section") return unit === undefined ? {} : { bracket: unit };
  const axis = column.measures === "position" ? (axisOf(header) ?? axisOf(unit ?? "")) : undefined;
  const meant = /inmet(?:re|er)s$/i.test(header) ? "m" : unit === undefined ? undefined : unitIn(unit);
  return {
    ...(axis === undefined ? {} : { axis }),
    ...(meant === undefined ? {} : { unit: meant }),
    ...(unit === undefined || meant !== undefined ? {} : { bracket: unit }),
  };
};

/**
 * Recognises header cells by what a person chose, by declared name, Darwin Core term, synonym or a usual header in
 * another language, without regard to case, accents, spaces, hyphens and underscores, and by a unit written in them.
 */
export function recogniseColumns(
  headers: readonly string[],
  table: TableDeclaration,
): readonly RecognisedColumn[] {
  return withoutRivals(headers.map(columnReader(table)));
}

/** What each header by itself means in a table, whatever stands beside it. */
export function columnReader(table: TableDeclaration): (header: string) => RecognisedColumn {
  const names = knownNames(table);
  return (header) => recognise(header, names, table);
}

function recognise(header: string, names: KnownNames, table: TableDeclaration): RecognisedColumn {
  const trimmed = header.trim();
  const choice = table.chosen?.get(trimmed);
  if (choice?.is === "unused") return { header, by: "chosen" };
  const whole = choice?.is === undefined ? names.get(plainName(trimmed)) : undefined;
  const { name, unit } = whole === undefined ? partUnit(trimmed) : { name: trimmed };
  const byName = whole ?? (choice?.is === undefined ? nameIn(name, unit, { names, table }) : undefined);
  const known = choice?.is === undefined ? byName : { column: choice.is, by: choice.by };
  const column = known && table.columns[known.column];
  if (known === undefined || column === undefined) return { header };
  return { header, ...known, ...hints(name, column, unit), ...chosenHints(column, choice) };
}

interface Names {
  readonly names: ReadonlyMap<string, KnownName>;
  readonly table: TableDeclaration;
}

/** What a name beside its unit means; that of a position may say its axis too. */
function nameIn(name: string, unit: string | undefined, { names, table }: Names): KnownName | undefined {
  const known = unit === undefined ? undefined : names.get(plainName(name));
  if (known !== undefined) return known;
  const rest = withoutAxis(name);
  const position = rest === "" ? undefined : names.get(plainName(rest));
  return position && table.columns[position.column].measures === "position" ? position : undefined;
}

/** The unit and axis that a person chose stand over those of the header. */
function chosenHints(column: ColumnDeclaration, choice: ColumnChoice | undefined) {
  const { unit, axis } = choice ?? {};
  const meant = unit === undefined || column.unit !== "section" ? undefined : lengthUnit(unit);
  return {
    ...(axis === undefined || column.measures !== "position" ? {} : { axis }),
    ...(meant === undefined ? {} : { unit: meant, bracket: undefined }),
    ...(unit === undefined || meant !== undefined ? {} : { bracket: unit }),
    ...(unit === undefined ? {} : { isUnitChosen: true }),
  };
}

/**
 * Of columns read as the same, one that was chosen stands before one named as declared, that before one known by
 * another name, and that before one in another language; those that stand back are kept and not used.
 */
function withoutRivals(recognised: readonly RecognisedColumn[]): readonly RecognisedColumn[] {
  const best = new Map<string, number>();
  for (const one of recognised) {
    if (one.column !== undefined)
      best.set(one.column, Math.min(best.get(one.column) ?? Infinity, rankOf(one)));
  }
  return recognised.map((one) =>
    one.column === undefined || rankOf(one) === best.get(one.column) ? one : { header: one.header },
  );
}

function rankOf({ header, column = "", by }: RecognisedColumn): number {
  if (by === "chosen") return 0;
  const names = [header.trim(), partUnit(header.trim()).name].map(plainName);
  if (names.includes(plainName(column))) return 1;
  return by === "other-language" ? 3 : by === "content" ? 4 : 2;
}
