import { type Coded, valueAt } from "../coded.ts";
import type { Axis, Counting, Leg, LengthUnit, Origin, Section, Sheet } from "../model.ts";
import type { Stand } from "../origin.ts";
import type { ProblemList } from "../problem-list.ts";
import type { Settings } from "../settings.ts";
import type { RowOf, TableDeclaration } from "../tables/declare.ts";
import type { TableName } from "../tables/index.ts";

/** What the headers of a sheet say about a column of positions or lengths. */
export interface HeaderHint {
  readonly header: string;
  readonly axis?: Axis;
  readonly unit?: LengthUnit;
  readonly bracket?: string;
}

/** What a wide sheet says of who looked for what: a row a sample, a mark a taxon. */
export interface Looked {
  readonly file: string;
  /** The taxa by the order of their marks, as written. */
  readonly taxa: readonly string[];
  readonly rows: readonly {
    readonly section: string;
    readonly sample: string;
    readonly row: number;
    readonly effort?: number;
    /** Found or looked for in vain, blank, or said not to be looked for. */
    readonly marks: readonly ("searched" | "blank" | "not-searched")[];
  }[];
  readonly counting: Counting;
  readonly effortUnit?: string;
  /** What a blank says where all cells of a group are blank in a sample; told and asked where nobody has said. */
  readonly blank: "not-found" | "not-searched";
  readonly isBlankChosen: boolean;
}

/** A usable table: its cells and what its headers say. */
export interface ReadSheet {
  readonly sheet: Sheet;
  readonly hints: ReadonlyMap<string, HeaderHint>;
  /** The sheet as it stands in its file, where `sheet` was made from it. */
  readonly shown?: Sheet;
  /** Further sheets that were joined with it. */
  readonly alsoShown?: readonly Sheet[];
  readonly looked?: readonly Looked[];
  /** Where each row stands, of rows that a wide sheet or several were made into. */
  readonly stands?: Coded<Stand>;
  /** What the headers say where sheets are joined, by section. */
  readonly hintsBySection?: ReadonlyMap<string, readonly HeaderHint[]>;
}

/** What the headers of a sheet say about the positions of a section. */
export const hintsIn = ({ hints, hintsBySection }: ReadSheet, section: string): readonly HeaderHint[] =>
  hintsBySection === undefined ? [...hints.values()] : (hintsBySection.get(section) ?? []);

/** Where a row of a sheet stands. */
export const originOf = ({ sheet, stands }: ReadSheet, index: number): Origin => ({
  file: stands === undefined ? sheet.file : valueAt(stands, index).file,
  row: sheet.rowNumbers[index],
});

/** A validated row and where it stands. */
export interface Row<T extends TableDeclaration> {
  readonly cells: RowOf<T>;
  readonly origin: Origin;
}

/** What converts a section's own positions to heights. */
export interface SectionFrame {
  readonly name: string;
  readonly axis: Axis;
  readonly unit: LengthUnit;
  readonly legs: ReadonlyMap<string, Leg>;
  /** Legs of legs.csv that an error keeps from use. */
  readonly legsLeftOut?: ReadonlySet<string>;
  /** One number for levels within 1e-9 m. */
  readonly level: (heightM: number) => number;
  readonly declared: Pick<Section, "title" | "datum" | "source" | "densityGCm3" | "origin"> & {
    readonly bottomM?: number;
    readonly topM?: number;
  };
}

/** Everything that turning rows into the study needs; `problems` gathers what is wrong on the way. */
export interface Assembly {
  readonly settings: Settings;
  readonly problems: ProblemList;
  readonly sheets: ReadonlyMap<TableName, ReadSheet>;
}

/** Values gathered by section name. */
export type BySection<T> = ReadonlyMap<string, readonly T[]>;

/** Adds to the list of a key. */
export function gather<K, T>(lists: Map<K, T[]>, key: K, value: T): void {
  const list = lists.get(key);
  if (list) list.push(value);
  else lists.set(key, [value]);
}

/** Leaves out properties that are undefined, so that absent stays absent. */
export function present<T extends object>(record: T): { [K in keyof T]?: Exclude<T[K], undefined> };
export function present(record: object): object {
  return Object.fromEntries(Object.entries(record).filter(([, value]) => value !== undefined));
}
