import type { RangeCase } from "./range-case.ts";
import { barrenChances, furthestBarren } from "./sampled.ts";
import type { SampledEffort, SampledRange } from "./sampled-horizons.ts";
import { furthestOfChances, oddsChances } from "./sampled-odds.ts";
import {
  barrenLikelihood,
  type EndPosterior,
  type EndPrior,
  effortLikelihood,
  endPosterior,
} from "./sampled-posterior.ts";

/** p(j) of a taxon's sampled horizons: odds of a find in proportion to effort where efforts differ, else all alike. */
export function chancesOf({ count, effort }: SampledRange): Float64Array {
  if (effort === undefined) return barrenChances(count);
  return oddsChances({
    inRange: effort.inRange.map((horizon) => horizon.effort),
    finds: count.finds,
    above: effort.above,
  });
}

/** J_C of a taxon's sampled horizons, given their `chancesOf`. */
export function furthestOf(sampled: SampledRange, chances: Float64Array, confidence: number): number {
  return sampled.effort === undefined
    ? furthestBarren(sampled.count, confidence)
    : furthestOfChances(chances, confidence);
}

/** Posterior of the end under each prior, up to the section's end; undefined where no rock lies above the last find. */
export function posteriorsOf(
  { range, topM }: RangeCase,
  { count, effort, barrenM }: SampledRange,
): Readonly<Record<EndPrior, EndPosterior>> | undefined {
  const edgesM = [range.lastM, ...barrenM, topM].map((heightM) => Math.max(heightM, range.lastM));
  const likelihood =
    effort === undefined
      ? barrenLikelihood(count.inRange, count.finds, count.barrenAbove)
      : effortLikelihood(effortsOf(effort));
  const height = endPosterior(likelihood, edgesM, "height");
  const byCount = endPosterior(likelihood, edgesM, "count");
  return height === undefined || byCount === undefined ? undefined : { height, count: byCount };
}

function effortsOf({ inRange, above }: SampledEffort) {
  return {
    withTaxon: inRange.filter(({ isFound }) => isFound).map(({ effort }) => effort),
    barrenInRange: inRange.reduce((sum, { effort, isFound }) => sum + (isFound ? 0 : effort), 0),
    inRange: inRange.length,
    above,
  };
}
