import type { MarkerHorizon } from "../markers/result.ts";
import type { LocalTaxon } from "../study/finds-result.ts";
import type { Section } from "../study/model.ts";
import type { WorkingRange } from "./base.ts";
import type { Coordinate } from "./coordinate.ts";
import type { RangeEnd } from "./result.ts";
import type { SampledRange } from "./sampled-horizons.ts";

/** One taxon in one section, with all that its range ends are estimated from. */
export interface RangeCase {
  readonly section: Section;
  readonly coordinate: Coordinate;
  readonly taxon: LocalTaxon;
  readonly reachesTop: boolean;
  readonly range: WorkingRange;
  /** Undefined where no find lies in a sample searched for the group. */
  readonly sampled?: SampledRange;
  /** Highest level searched for the group, else the section's top. */
  readonly searchedTopM: number;
  readonly horizon?: MarkerHorizon;
  readonly confidence: number;
  readonly identification: "strict" | "inclusive";
}

/** What every row of a case shares, whatever the method. */
export function commonFields(rangeCase: RangeCase) {
  const { section, taxon, range, horizon, confidence, identification } = rangeCase;
  return {
    section: section.name,
    taxon: taxon.taxon,
    group: taxon.group,
    identification,
    end: "top",
    horizons: range.horizons,
    exponent: range.exponent,
    firstM: taxon.heightsM[0],
    lastM: range.lastM,
    level: confidence,
    ...(horizon === undefined ? {} : { horizon: horizon.horizon }),
  } as const satisfies Partial<RangeEnd>;
}

/** Where the range gives no bound, the reason; undefined where it does. */
export function reasonWithoutBound({ range }: RangeCase): string | undefined {
  if (range.exponent < 1) return "one find with unknown base: no bound";
  if (!(range.last > range.base)) return "the range has no length: no bound";
  return undefined;
}

/** Joins the parts of a note that are there. */
export function note(...parts: readonly (string | undefined | false)[]): string {
  return parts.filter((part) => part !== undefined && part !== false && part !== "").join("; ");
}

/** A length or level to the millimetre, for notes. */
export function metres(valueM: number): string {
  return `${Math.round(valueM * 1000) / 1000} m`;
}
