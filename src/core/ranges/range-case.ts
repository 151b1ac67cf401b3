import type { LocalTaxon } from "../study/finds-result.ts";
import { type EndWords, endWords } from "./end-words.ts";
import type { InCoordinate } from "./in-coordinate.ts";
import type { RecoverySource } from "./recovery.ts";
import type { RangeEnd } from "./result.ts";
import type { RockBreak } from "./rock-breaks.ts";
import type { SampledHorizon, SampledRange } from "./sampled-horizons.ts";

/**
 * One end of one taxon's range in one section, with all that it is estimated from. Every estimator looks for an upper
 * end: the case of a base is the range upside down, all heights negated, and its row is turned back afterwards.
 */
export interface RangeCase extends InCoordinate {
  readonly section: string;
  readonly end: "top" | "base";
  readonly taxon: LocalTaxon;
  /** The same range with recovery constant outside rock that could not be searched. */
  readonly constant: InCoordinate;
  readonly weighing: Weighing;
  /** Levels of missing rock, from below upward. */
  readonly breaks: readonly RockBreak[];
  /** The section's ends. */
  readonly bottomM: number;
  readonly topM: number;
  /** Highest level searched for the group, else the section's top. */
  readonly searchedTopM: number;
  /** Found in the highest (lowest) sample searched for its group: that end is cut off by the section. */
  readonly reachesTop: boolean;
  readonly reachesBottom: boolean;
  /** Levels at which the group was looked for, from below upward. */
  readonly searched: readonly SampledHorizon[];
  /** Undefined where no find lies in a sample searched for the group. */
  readonly sampled?: SampledRange;
  readonly horizon?: HorizonAsked;
  readonly confidence: number;
  readonly identification: "strict" | "inclusive";
  /** beta of `two-highest` and `top-k`: near the end the density of finds falls as the distance to it to beta - 1. */
  readonly tail: number;
  /** k of `top-k`. */
  readonly topFinds: number;
}

/** The same range under the recovery that method `recovery` weighs by, and under its square. */
export type Weighing =
  | {
      readonly kind: "known";
      readonly source: RecoverySource;
      readonly weighed: InCoordinate;
      readonly squared: InCoordinate;
    }
  | { readonly kind: "unavailable"; readonly reason: string };

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
export function reasonWithoutBound({ range, end, contradicted }: RangeCase): string | undefined {
  if (contradicted > 0) return `${contradicted} finds lie in rock of recovery 0: no bound`;
  if (range.exponent < 1) return `one find with unknown ${end === "top" ? "base" : "top"}: no bound`;
  if (!(range.last > range.base)) return "the range has no length: no bound";
  return undefined;
}

/** The reason where a method needs every find and the range was published without them. */
export function reasonWithoutFinds(rangeCase: RangeCase): string | undefined {
  return rangeCase.levels.length === 0
    ? "published without its finds, which this method needs"
    : reasonWithoutBound(rangeCase);
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
