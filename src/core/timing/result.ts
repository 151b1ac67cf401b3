import type { Basis, Caution, Outcome } from "../basis.ts";

export type TimingQuestion = "one-level" | "where" | "at-horizon" | "how-gradual" | "recovery";
export type TimingMethod =
  | "common-end"
  | "common-end-given"
  | "common-end-joint"
  | "confidence-levels"
  | "duration-lower"
  | "duration-box"
  | "centroid";

/** One answer about an assemblage: a row of timing.csv. `section` may be "joint". Levels are metres of height. */
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
  readonly unit?: "m";
  readonly mcError?: number;
  readonly outcome: Outcome;
  readonly note: string;
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
  /** Sets whose own pooled centroid pre-check says that recovery declines upward (p < 0.1). */
  readonly distrusted: readonly { readonly section: string; readonly set: string }[];
  readonly cautions: readonly Caution[];
  readonly basis: readonly Basis[];
}
