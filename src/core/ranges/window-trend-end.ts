import { estimatedEnd } from "./estimate-row.ts";
import { type RangeCase, reasonWithoutFinds } from "./range-case.ts";
import { round } from "./uniform-end.ts";
import { levelAsked } from "./window-end.ts";
import { leastTrendChance, trendBound, trendChance } from "./window-trend.ts";

/** Distances from the working base of the finds that count: without the first find where it is the base. */
function timesOf({ levels, range }: RangeCase): number[] {
  return (range.mode === "first" ? levels.slice(1) : levels).map((level) => level - range.base);
}

/** The row of method `window-trend`: p where the rate of finds may change exponentially, beside that of `window`. */
export const windowTrendEnd = estimatedEnd({
  method: "window-trend",
  reason: (rangeCase) =>
    reasonWithoutFinds(rangeCase) ??
    (timesOf(rangeCase).length < 2 ? "fewer than two finds beside the base: no trend" : undefined),
  estimate: (rangeCase) => {
    const { range, confidence } = rangeCase;
    const times = timesOf(rangeCase);
    const bound = trendBound(times, confidence);
    const least = round(leastTrendChance(times));
    return {
      bound: bound === undefined ? undefined : range.base + bound,
      chanceAt: (level) => trendChance(times, Math.max(level - range.base, times[times.length - 1])),
      asked: levelAsked(rangeCase),
      notes: [
        bound === undefined
          ? `no level is excluded: p falls to ${least} at most, the finds may just be thinning out`
          : undefined,
      ],
    };
  },
});
