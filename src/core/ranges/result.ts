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

/** The taper: chance (1 - confidence of the leading method) that the taxon was still there at each height. */
export interface Taper {
  readonly section: string;
  readonly taxon: string;
  readonly method: RangeMethod;
  readonly heightsM: readonly number[];
  readonly chances: readonly number[];
  /** End of the interval at the study's confidence; absent where it leaves the section. */
  readonly endM?: number;
}

export interface Ranges {
  readonly ends: readonly RangeEnd[];
  readonly tapers: readonly Taper[];
  readonly cautions: readonly Caution[];
  readonly basis: readonly Basis[];
}
