import type { Axis } from "./model.ts";

/** How it was told what a column is. */
export type ToldBy = "name" | "synonym" | "darwin-core" | "other-language" | "content" | "chosen";

/** Where the unit of a column was told. */
export type UnitToldBy = "header" | "chosen" | "section";

/** What one column of a file was taken to be, with some of its values to look at. */
export interface Recognition {
  readonly header: string;
  /** The declared column; `taxon` for a column of a wide sheet that is one taxon. */
  readonly is: string;
  /** Absent where it is not used or further columns are traits. */
  readonly by?: ToldBy;
  readonly language?: string;
  /** The unit of its numbers, as far as it was told. */
  readonly unit?: string;
  readonly axis?: Axis;
  readonly unitBy?: UnitToldBy;
  /** What has to be answered before its numbers can be used. */
  readonly asks?: "axis" | "unit" | "axis-and-unit";
  /** Up to five values that differ. */
  readonly values: readonly string[];
}

/** How a sheet with a row or column for each taxon was read. */
export interface WideReading {
  readonly shape: "samples-down" | "taxa-down";
  readonly samples: number;
  readonly taxa: number;
  /** What it says of a group that all its cells in a sample are blank. */
  readonly blank: { readonly means: "not-found" | "not-searched"; readonly by: "default" | "chosen" };
  /** Cells that are neither numbers nor the usual signs. */
  readonly codes: readonly {
    readonly code: string;
    readonly cells: number;
    /** Absent: it has to be asked. */
    readonly means?: CodeMeaning;
    readonly by?: "notes" | "scale" | "chosen";
  }[];
}

export type CodeMeaning = "found" | "not-found" | "not-searched" | "doubtful" | "reworked";
