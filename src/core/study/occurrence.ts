import type { Coded } from "./coded.ts";
import type { List } from "./list.ts";
import type { Origin, Stand } from "./origin.ts";

export type Qualifier =
  | "cf."
  | "aff."
  | "?"
  | "? genus"
  | "ex gr."
  | "sp."
  | "spp."
  | "indet."
  | "sp. nov."
  | "s.l."
  | "s.s.";

export interface Occurrence {
  /** The name as written. */
  readonly verbatim: string;
  /** The clean name without qualifier; the taxon this find belongs to before synonymy. */
  readonly taxon: string;
  readonly qualifier?: Qualifier;
  /** Absent where the find was given by position alone. */
  readonly sample?: string;
  readonly heightM: number;
  readonly positionErrorM?: number;
  readonly leg?: string;
  readonly count?: number;
  readonly abundance?: string;
  readonly reworked: "no" | "suspected" | "yes";
  readonly doubtful: boolean;
  readonly origin: Origin;
}

/** Finds column by column; what a find lacks is undefined there. All stand in one file, or each as `stands` says. */
export interface OccurrenceColumns {
  readonly file: string;
  readonly rows: Int32Array;
  readonly stands?: Coded<Stand>;
  readonly verbatim: Coded<string>;
  readonly taxon: Coded<string>;
  readonly qualifier: Coded<Qualifier | undefined>;
  readonly sample: Coded<string | undefined>;
  readonly heightM: Coded<number>;
  readonly positionErrorM: Coded<number | undefined>;
  readonly leg: Coded<string | undefined>;
  readonly count: Coded<number | undefined>;
  readonly abundance: Coded<string | undefined>;
  readonly reworked: Coded<Occurrence["reworked"]>;
  readonly doubtful: Coded<boolean>;
}

/** The finds of a section: an array, or finds that are put together from columns when they are asked for. */
export interface Occurrences extends List<Occurrence> {
  readonly columns?: OccurrenceColumns;
}
