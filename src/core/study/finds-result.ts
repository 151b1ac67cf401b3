import type { Origin } from "./model.ts";

/** Why a find is used or not. */
export type FindReason =
  | "used"
  | "same-horizon"
  | "zero-count"
  | "qualifier"
  | "genus-doubtful"
  | "affinity"
  | "not-to-species"
  | "reworked"
  | "reworking-suspected"
  | "doubtful"
  | "fault-repeat"
  | "no-recovery";

export interface Find {
  readonly origin: Origin;
  readonly section: string;
  readonly verbatim: string;
  readonly accepted: string;
  readonly heightM: number;
  readonly sample?: string;
  readonly used: "yes" | "no" | "merged";
  readonly reason: FindReason;
}

/** A taxon in one section: its distinct horizons after synonymy, qualifiers, reworked and doubtful finds were settled. */
export interface LocalTaxon {
  readonly section: string;
  readonly taxon: string;
  readonly group: string;
  /** Distinct levels from below upward, strict or inclusive as the settings say. */
  readonly heightsM: readonly number[];
  /** The samples behind them; undefined where a find was given by position alone or its sample was not searched. */
  readonly samples: readonly (string | undefined)[];
  /** Highest level under the inclusive reading of names, where it is higher. */
  readonly lastInclusiveM: number;
  /** Number of horizons stated by a published range without its finds. */
  readonly publishedHorizons?: number;
}

export type Role = "aftermath" | "survivor" | "late-start" | "too-few" | "candidate";

export interface Candidate {
  readonly section: string;
  readonly taxon: string;
  readonly group: string;
  readonly role: Role;
  readonly reachesTop: boolean;
  readonly horizons: number;
  readonly firstM: number;
  readonly lastM: number;
  readonly lastInclusiveM: number;
  readonly reworkingCeilingM?: number;
  /** Machine-readable reason code with the numbers behind it, e.g. "first find 0.12 m above the main horizon". */
  readonly reason: string;
}
