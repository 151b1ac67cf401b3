import type { LocalTaxon } from "../study/finds-result.ts";
import type { WorkingRange } from "./base.ts";
import type { Coordinate } from "./coordinate.ts";
import { type EndWords, endWords } from "./end-words.ts";
import type { RangeEnd } from "./result.ts";
import type { SampledRange } from "./sampled-horizons.ts";

/**
 * One end of one taxon's range in one section, with all that it is estimated from. Every estimator looks for an upper
 * end: the case of a base is the range upside down, all heights negated, and its row is turned back afterwards.
 */
export interface RangeCase {
  readonly section: string;
  readonly end: "top" | "base";
  readonly coordinate: Coordinate;
  readonly taxon: LocalTaxon;
  /** Finds in effective metres, from below upward; empty where a range was published without its finds. */
  readonly levels: readonly number[];
  readonly range: WorkingRange;
  /** The section's ends. */
  readonly bottomM: number;
  readonly topM: number;
  /** Highest level searched for the group, else the section's top. */
  readonly searchedTopM: number;
  /** Found in the highest (lowest) sample searched for its group: that end is cut off by the section. */
  readonly reachesTop: boolean;
  readonly reachesBottom: boolean;
  /** Undefined where no find lies in a sample searched for the group. */
  readonly sampled?: SampledRange;
  readonly horizon?: HorizonAsked;
  readonly confidence: number;
  readonly identification: "strict" | "inclusive";
}

/** The main horizon where the end can be compared with it: for a base only where it lies below the first find. */
export interface HorizonAsked {
  readonly horizon: string;
  readonly positionM: number;
}

/** What every row of a case shares, whatever the method. */
export function commonFields(rangeCase: RangeCase) {
  const { section, end, taxon, range, horizon, confidence, identification } = rangeCase;
  return {
    section,
    taxon: taxon.taxon,
    group: taxon.group,
    identification,
    end,
    horizons: range.horizons,
    exponent: range.exponent,
    firstM: taxon.heightsM[0],
    lastM: range.lastM,
    level: confidence,
    ...(horizon === undefined ? {} : { horizon: horizon.horizon }),
  } as const satisfies Partial<RangeEnd>;
}

/** Where the range gives no bound, the reason; undefined where it does. */
export function reasonWithoutBound({ range, end }: RangeCase): string | undefined {
  if (range.exponent < 1) return `one find with unknown ${end === "top" ? "base" : "top"}: no bound`;
  if (!(range.last > range.base)) return "the range has no length: no bound";
  return undefined;
}

/** Joins the parts of a note that are there. */
export function note(...parts: readonly (string | undefined | false)[]): string {
  return parts.filter((part) => part !== undefined && part !== false && part !== "").join("; ");
}

/** A length to the millimetre, for notes. A level of a case goes through `levelWords`. */
export function metres(valueM: number): string {
  return `${Math.round(valueM * 1000) / 1000} m`;
}

/** A level of a case as the section's own height, for notes. */
export function levelWords({ end }: RangeCase, heightM: number): string {
  return metres(end === "base" ? -heightM : heightM);
}

/** Words of notes that depend on which end is asked about: highest or lowest, above or below. */
export function wordsOf({ end }: RangeCase): EndWords {
  return endWords[end];
}
