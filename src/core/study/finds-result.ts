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
  | "fault-repeat-mapped"
  | "no-recovery"
  | "below-reworking-ceiling";

export interface Find {
  readonly origin: Origin;
  readonly section: string;
  readonly verbatim: string;
  readonly accepted: string;
  /** Where it counts: for one mapped out of a repeated passage, the height of its rock in the first. */
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
  /** Specimens at each level, all finds that count there added; undefined where one came without a count. Absent without any. */
  readonly counts?: readonly (number | undefined)[];
  /** Highest in-place level under the strict reading of names (reworked finds never count), whatever the settings. */
  readonly lastStrictM?: number;
  /** Highest level under the inclusive reading. */
  readonly lastInclusiveM: number;
  /** Distinct levels under the inclusive reading; absent where it adds none. */
  readonly inclusiveHeightsM?: readonly number[];
  /** Number of horizons stated by a published range without its finds. */
  readonly publishedHorizons?: number;
}

export type Role = "aftermath" | "survivor" | "late-start" | "too-few" | "candidate";

/** The rule behind a role: which level was compared with which limit, in metres of height (or horizons). */
export interface RoleReason {
  readonly rule:
    | "first-above-horizon"
    | "first-above-base-of-smear"
    | "last-above-interval"
    | "last-above-ceiling"
    | "first-above-start"
    | "horizons-under-minimum"
    | "ends-in-question"
    | "no-horizon-here";
  readonly value: number;
  readonly limit: number;
}

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
  /** Finds above H but not above the ceiling: set aside, neither survival nor end. */
  readonly findsBelowCeiling: number;
  /** The rule that gave the role, with its numbers. */
  readonly reason: RoleReason;
}
