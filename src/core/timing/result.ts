import type { Basis, Caution, Outcome } from "../basis.ts";

export type TimingQuestion =
  | "one-level"
  | "where"
  | "at-horizon"
  | "how-gradual"
  | "two-steps"
  | "how-many"
  | "rarity"
  | "recovery"
  | "surfaces"
  | "isolated";
export type TimingMethod =
  | "common-end"
  | "common-end-given"
  | "common-end-joint"
  | "half-intervals"
  | "two-highest"
  | "pooled-offset"
  | "pooled-offset-densest"
  | "pooled-offset-sampled"
  | "pooled-offset-without"
  | "confidence-levels"
  | "combined"
  | "duration-lower"
  | "duration-box"
  | "duration-posterior"
  | "separation"
  | "pulses-bootstrap"
  | "pulses-posterior"
  | "rank-correlation"
  | "centroid"
  | "gap-trend"
  | "runs"
  | "largest-gap"
  | "distance"
  | "binomial"
  | "shift"
  | "highest-find";

/**
 * One answer about an assemblage: a row of timing.csv. Levels are metres of height; where `section` is "joint", levels of
 * the common scale from `horizon`.
 */
export interface TimingAnswer {
  readonly section: string;
  readonly set: string;
  readonly group?: string;
  readonly taxon?: string;
  readonly question: TimingQuestion;
  readonly method: TimingMethod;
  readonly horizon?: string;
  readonly part?: number;
  readonly taxa: number;
  /** Taxa of the set before this method dropped any. */
  readonly taxaOfSet: number;
  readonly testStatistic?: number;
  readonly df?: number;
  readonly p?: number;
  readonly estimate?: number;
  readonly level?: number;
  readonly low?: number;
  readonly high?: number;
  readonly unit?: "m" | "ka";
  readonly mcError?: number;
  readonly outcome: Outcome;
  readonly note: string;
}

export type Scenario =
  | "single"
  | "pulses-2"
  | "pulses-3"
  | "pulses-4"
  | "gradual"
  | "at-horizon"
  | "among-horizons"
  | "independent";

/** How well one scenario explains the last finds of a set: a row of scenarios.csv. */
export interface ScenarioWeight {
  readonly section: string;
  readonly set: string;
  readonly scenario: Scenario;
  readonly horizon?: string;
  /** Blank: the default form with declared priors; else which prior or form was changed. */
  readonly variant?: string;
  readonly prior?: number;
  readonly logEvidence?: number;
  /** Numerical error of `logEvidence`. */
  readonly error?: number;
  /** Posterior probability among the scenarios of the same variant that have a prior. */
  readonly probability?: number;
  readonly note: string;
}

/** Disappearance minus horizon, positive when younger than it: a row of offsets.csv. */
export interface Offset {
  readonly section: string;
  readonly set: string;
  readonly scenario: Scenario;
  /** Rank of the pulse from below; absent where the scenario has one level. */
  readonly pulse?: number;
  readonly horizon: string;
  readonly median: number;
  readonly low: number;
  readonly high: number;
  readonly level: number;
  readonly unit: "m" | "ka" | "Ma";
  readonly probabilityAfter: number;
}

/** Chance that a taxon ended in a pulse: a row of membership.csv. */
export interface Membership {
  readonly section: string;
  readonly set: string;
  readonly scenario: Scenario;
  readonly taxon: string;
  readonly pulse: number;
  readonly probability: number;
}

/** How far the answer about a set moves without one taxon, or without its highest find. Changes are after minus before. */
export interface Influence {
  readonly section: string;
  readonly set: string;
  readonly taxon: string;
  readonly removed: "taxon" | "highest-find";
  /** Of the posterior median of one common level, m. */
  readonly levelM?: number;
  /** The best scenario of the whole set, and the change of its probability. */
  readonly scenario?: Scenario;
  readonly probability?: number;
  /** Of the p of one common end. */
  readonly p?: number;
}

/** The level common to all sections when one of them is left out, from one horizon. */
export interface LeftOut {
  readonly set: string;
  readonly without: string;
  readonly horizon: string;
  readonly median: number;
  readonly low: number;
  readonly high: number;
  readonly level: number;
  readonly unit: "m" | "ka";
  readonly probabilityAfter: number;
}

/**
 * Posterior density of a level of one scenario along the height of a section, per metre; where `section` is "joint",
 * along the common scale, from the main horizon.
 */
export interface ScenarioDensity {
  readonly section: string;
  readonly set: string;
  readonly scenario: Scenario;
  readonly pulse?: number;
  readonly heightsM: readonly number[];
  readonly density: readonly number[];
}

/** Number of last finds above a level, against what one common end would give: a row of last-finds.csv. */
export interface LastFindsPoint {
  readonly section: string;
  readonly set: string;
  readonly positionM: number;
  readonly observed: number;
  readonly expected: number;
  readonly low: number;
  readonly high: number;
  readonly lowAll: number;
  readonly highAll: number;
  readonly level: number;
}

/** p of confidence-levels along the height of a section: the curve of the timing plate. */
export interface LevelCurve {
  readonly section: string;
  readonly set: string;
  readonly heightsM: readonly number[];
  readonly p: readonly number[];
}

export interface TaxonSet {
  readonly section: string;
  readonly set: string;
  readonly group?: string;
  readonly taxa: readonly string[];
}

export interface Timing {
  readonly sets: readonly TaxonSet[];
  readonly answers: readonly TimingAnswer[];
  readonly curves: readonly LevelCurve[];
  readonly scenarios: readonly ScenarioWeight[];
  readonly offsets: readonly Offset[];
  readonly membership: readonly Membership[];
  readonly densities: readonly ScenarioDensity[];
  /** Of the sections answered together, by section left out. */
  readonly leftOut: readonly LeftOut[];
  readonly lastFinds: readonly LastFindsPoint[];
  /** How far the answer moves without each taxon and without its highest find. */
  readonly influence: readonly Influence[];
  /** Sets whose own pooled centroid pre-check says that recovery declines upward (p < 0.1). */
  readonly distrusted: readonly { readonly section: string; readonly set: string }[];
  readonly cautions: readonly Caution[];
  readonly basis: readonly Basis[];
}
