import type { Axis } from "../model.ts";
import type { ToldBy } from "../recognised.ts";

/** What a person (or a look at the content) says a column of a file is. */
export interface ColumnChoice {
  /** The declared column, or `unused`; absent: as its header says. */
  readonly is?: string;
  readonly by: ToldBy;
  readonly unit?: string;
  readonly axis?: Axis;
}

/** One column of a table, declared once: type, validation, schema, template, help and recognition follow from it. */
export interface ColumnDeclaration {
  readonly type: "text" | "number" | "integer" | "enum" | "boolean";
  readonly required?: boolean;
  /** `section`: in the section's own unit. Anything else is a fixed unit. */
  readonly unit?: string;
  /** A position is measured on the section's axis; a length has no direction. */
  readonly measures?: "position" | "length";
  readonly values?: readonly string[];
  readonly minimum?: number;
  readonly maximum?: number;
  /** One sentence for a person who fills the column in. */
  readonly help: string;
  readonly synonyms?: readonly string[];
  /** The Darwin Core term of the same meaning; accepted as a column name. */
  readonly dwc?: string;
  /** The cell of the worked row; absent: left blank there. */
  readonly example?: string;
}

export interface TableDeclaration {
  readonly name: string;
  readonly title: string;
  readonly help: string;
  readonly columns: Readonly<Record<string, ColumnDeclaration>>;
  /** At least one of these sets of columns must be filled in every row. */
  readonly oneOf?: readonly (readonly string[])[];
  /** Columns that together name a row. */
  readonly key?: readonly string[];
  /** Columns that name a row of another table: own columns, table, its columns. */
  readonly references?: readonly {
    readonly columns: readonly string[];
    readonly table: string;
    readonly to: readonly string[];
  }[];
  /** Cells of a second worked row, over those of the first, for a table that needs two to make sense: the worked rows of all tables are one small, consistent study. */
  readonly secondRow?: Readonly<Record<string, string>>;
  /** True where a further column is a trait instead of unused. */
  readonly furtherColumns?: boolean;
  /** What is chosen for columns of one file, by header. */
  readonly chosen?: ReadonlyMap<string, ColumnChoice>;
}

type ValueOf<C extends ColumnDeclaration> = C["type"] extends "number" | "integer"
  ? number
  : C["type"] extends "boolean"
    ? boolean
    : C extends { readonly values: readonly (infer V)[] }
      ? V
      : string;

/** A validated row of a declared table. */
export type RowOf<T extends TableDeclaration> = {
  readonly [K in keyof T["columns"]]: T["columns"][K] extends { readonly required: true }
    ? ValueOf<T["columns"][K]>
    : ValueOf<T["columns"][K]> | undefined;
};

/** Declares a table; the literal types of its columns are kept. */
export const table = <const T extends TableDeclaration>(declaration: T): T => declaration;

/** The columns shared by every table that places something on a section. */
export const sectionColumn = {
  type: "text",
  required: true,
  help: "The section's name, the same in every table.",
  synonyms: ["locality", "site", "core", "well", "borehole", "hole", "profile"],
  dwc: "parentEventID",
  example: "Orskel Ledge",
} as const satisfies ColumnDeclaration;

export const inSections = [{ columns: ["section"], table: "sections", to: ["section"] }] as const;

export const positionColumn = {
  type: "number",
  unit: "section",
  measures: "position",
  help: "Position on the section's own axis and in its unit; with a leg, that leg's reading.",
  synonyms: [
    "height",
    "depth",
    "level",
    "stratigraphic height",
    "stratigraphic position",
    "stratigraphic level",
    "elevation",
    "verbatimElevation",
    "verbatimDepth",
    "mid depth",
    "mid height",
    "middle",
  ],
  example: "12.4",
} as const satisfies ColumnDeclaration;

export const baseColumn = {
  type: "number",
  unit: "section",
  measures: "position",
  help: "The stratigraphically lower end; in a depth section the larger number.",
  synonyms: [
    "bottom",
    "base height",
    "base depth",
    "height base",
    "depth base",
    "bottom depth",
    "depth bottom",
    "bottom height",
    "maximumDepthInMeters",
  ],
  example: "12.3",
} as const satisfies ColumnDeclaration;

export const topColumn = {
  type: "number",
  unit: "section",
  measures: "position",
  help: "The stratigraphically upper end; in a depth section the smaller number.",
  synonyms: ["top height", "top depth", "height top", "depth top", "minimumDepthInMeters"],
  example: "12.5",
} as const satisfies ColumnDeclaration;

export const legColumn = {
  type: "text",
  help: "The leg (traverse or core run) whose scale the position was read on.",
  synonyms: ["traverse", "run", "log"],
} as const satisfies ColumnDeclaration;

export const positionErrorColumn = {
  type: "number",
  unit: "section",
  measures: "length",
  minimum: 0,
  help: "One standard deviation of the position, in the section's own unit.",
  synonyms: ["position sd", "height error", "depth error"],
} as const satisfies ColumnDeclaration;

export const notesColumn = {
  type: "text",
  help: "Anything worth keeping.",
  synonyms: ["remarks", "comment", "comments", "note"],
} as const satisfies ColumnDeclaration;
