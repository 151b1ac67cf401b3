import { commonFields, levelWords, note, type RangeCase, wordsOf } from "./range-case.ts";
import type { RangeEnd } from "./result.ts";
import type { SampledRange } from "./sampled-horizons.ts";
import { type EndPosterior, endQuantile } from "./sampled-posterior.ts";
import { chancesOf, furthestOf, posteriorsOf } from "./sampled-range.ts";
import type { Survival } from "./survival.ts";
import { cutOffNote } from "./uniform-end.ts";

/**
 * The row of method `sampled`: the bound is a sampled horizon, or open where the end may lie above all of them; the point
 * is the median of the posterior with a prior flat in height up to the section's end.
 */
export function sampledEnd(rangeCase: RangeCase): RangeEnd {
  const { taxon, sampled, range } = rangeCase;
  const common = { ...commonFields(rangeCase), method: "sampled" as const };
  if (sampled === undefined)
    return { ...common, outcome: "undefined", note: "no find in a sample searched for the group" };
  const { count, unsampledFinds } = sampled;
  const counted = {
    ...common,
    horizons: taxon.heightsM.length - unsampledFinds,
    exponent: count.finds,
    lowM: range.lastM,
  };
  const outside = unsampledFinds > 0 && `${unsampledFinds} finds outside searched samples do not count here`;
  if (count.finds === 0)
    return {
      ...counted,
      outcome: "undefined",
      note: note(`one sampled find, ${rangeCase.end === "top" ? "base" : "top"} unknown: no bound`, outside),
    };
  if (rangeCase.reachesTop || count.barrenAbove === 0)
    return { ...counted, outcome: "leaves-section", note: note(cutOffNote(rangeCase), outside) };
  const { words, ...posterior } = posteriorFields(rangeCase, sampled);
  const odds = sampled.effort !== undefined && "odds of a find in proportion to effort";
  const chances = chancesOf(sampled);
  const furthest = furthestOf(sampled, chances, rangeCase.confidence);
  const bound = horizonBound(rangeCase, furthest, sampled.barrenM);
  return {
    ...counted,
    ...atHorizon(rangeCase, sampled.barrenM, chances),
    ...posterior,
    ...bound,
    note: note(bound.note, odds, outside, words),
  };
}

/** The bound of the row alone, without the posterior beside it; undefined where the interval is not closed. */
export function sampledBound({ sampled, reachesTop, confidence, range }: RangeCase): number | undefined {
  if (sampled === undefined || sampled.count.finds === 0 || reachesTop) return undefined;
  const boundM = sampled.barrenM[furthestOf(sampled, chancesOf(sampled), confidence)];
  return boundM !== undefined && boundM >= range.lastM ? boundM : undefined;
}

/** Steps down at each barren horizon; undefined without an informative find. */
export function sampledSurvival({ sampled }: RangeCase): Survival | undefined {
  if (sampled === undefined || sampled.count.finds === 0) return undefined;
  return { kind: "steps", barrenM: sampled.barrenM, chances: chancesOf(sampled) };
}

/**
 * The bound where the first `furthest` barren horizons above the last find may lie inside the range: the next one, below
 * which the end lies then.
 */
export function horizonBound(
  rangeCase: RangeCase,
  furthest: number,
  barrenM: readonly number[],
): Pick<RangeEnd, "highM" | "outcome" | "note"> {
  const { above, highest } = wordsOf(rangeCase);
  const barrenAbove = barrenM.length;
  if (furthest === barrenAbove)
    return { outcome: "open", note: `all ${barrenAbove} barren horizons ${above} may lie inside the range` };
  const highM = barrenM[furthest];
  if (highM < rangeCase.range.lastM)
    return {
      outcome: "empty",
      note: `the ${highest} find, outside searched samples, lies ${above} the bound`,
    };
  return {
    highM,
    outcome: "closed",
    note: `${furthest} of ${barrenAbove} barren horizons ${above} may lie inside the range`,
  };
}

/** Median of the end, and its posterior bound under both priors, which the chance of detection is averaged over. */
function posteriorFields(
  rangeCase: RangeCase,
  sampled: SampledRange,
): Pick<RangeEnd, "pointM"> & { readonly words?: string } {
  const posteriors = posteriorsOf(rangeCase, sampled);
  if (posteriors === undefined) return {};
  const { sectionEnd } = wordsOf(rangeCase);
  const bound = (posterior: EndPosterior) =>
    levelWords(rangeCase, endQuantile(posterior, rangeCase.confidence));
  return {
    pointM: endQuantile(posteriors.height, 0.5),
    words: `posterior bound ${bound(posteriors.height)} with a prior flat in height up to the ${sectionEnd}, ${bound(posteriors.count)} flat in horizons`,
  };
}

/** Chance of so many barren horizons up to H, and the level at which the interval reaches H. */
export function atHorizon(
  { range, horizon }: RangeCase,
  barrenM: readonly number[],
  chances: Float64Array,
): Pick<RangeEnd, "p" | "reachLevel"> {
  if (horizon === undefined || horizon.positionM < range.lastM) return {};
  const p = chances[barrenM.filter((heightM) => heightM <= horizon.positionM).length];
  return { p, reachLevel: 1 - p };
}
