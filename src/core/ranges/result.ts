import type { Basis, Caution, Outcome } from "../basis.ts";
import type { Settings } from "../study/settings.ts";

/** The methods that `ranges.methods` may name. */
export type RangeMethod = Settings["ranges"]["methods"][number];

/** One true end of one taxon's range by one method: a row of range-ends.csv. */
export interface RangeEnd {
  readonly section: string;
  readonly taxon: string;
  readonly group: string;
  readonly identification: "strict" | "inclusive";
  /** `both`: one interval that holds base and top together at its level. */
  readonly end: "top" | "base" | "both";
  readonly method: RangeMethod;
  readonly horizons: number;
  readonly exponent: number;
  readonly firstM: number;
  readonly lastM: number;
  readonly pointM?: number;
  readonly level: number;
  readonly lowM?: number;
  readonly highM?: number;
  readonly outcome: Outcome;
  readonly horizon?: string;
  /** Confidence at which the one-sided interval just reaches `horizon`. */
  readonly reachLevel?: number;
  readonly p?: number;
  readonly evidenceRatio?: number;
  readonly note: string;
}

/**
 * The taper beyond one end of a range: chance (1 - confidence of a method) that the taxon was still (already) there at each
 * height, outward from the outermost find.
 */
export interface Taper {
  readonly section: string;
  readonly taxon: string;
  readonly method: RangeMethod;
  readonly heightsM: readonly number[];
  readonly chances: readonly number[];
  /** End of the interval at the study's confidence; absent where it leaves the section. */
  readonly endM?: number;
}

/** The bound of one end under one shape of recovery. */
export interface LeaningBound {
  readonly method: RangeMethod;
  /** beta and k of `top-k`: how finds thin out towards the end, and how many of the outermost ones are used. */
  readonly tail?: number;
  readonly finds?: number;
  /** A height: the upper end of the interval at a top, the lower one at a base. Absent where nothing bounds the end. */
  readonly boundM?: number;
  /** What the bound covers by its own assumption. */
  readonly level: number;
  readonly outcome: Outcome;
}

/** How much the bound of one taxon's end leans on what is assumed of recovery: the same end under each shape. */
export interface Leaning {
  readonly section: string;
  readonly taxon: string;
  readonly end: "top" | "base";
  /** The outermost find. */
  readonly lastM: number;
  /** The leading method first, then `uniform`, `declining`, and `top-k` from few finds to all. */
  readonly bounds: readonly LeaningBound[];
  /** The bounds nearest to the outermost find and furthest from it; absent where no method gives one. */
  readonly nearestM?: number;
  readonly furthestM?: number;
}

export interface Ranges {
  readonly ends: readonly RangeEnd[];
  /** Beyond the last finds, by the leading method. */
  readonly tapers: readonly Taper[];
  /** Beneath the first finds, by the method that leads there. */
  readonly baseTapers: readonly Taper[];
  /** How much each end leans on the shape of recovery, by taxon: top, then base. */
  readonly leanings: readonly Leaning[];
  readonly cautions: readonly Caution[];
  readonly basis: readonly Basis[];
}
