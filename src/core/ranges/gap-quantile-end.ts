import { estimatedEnd } from "./estimate-row.ts";
import { gapBracket, gapsNeededForQuantile } from "./gap-quantile.ts";
import { gapsOf } from "./gap-rank-end.ts";
import { levelWords, type RangeCase, reasonWithoutFinds, wordsOf } from "./range-case.ts";

/** Chance with which each limit of the bracket holds. */
const ASSURANCE = 0.95;

/** The row of method `gap-quantile`: the upper limit of the C-quantile of the gaps above the last find. */
export const gapQuantileEnd = estimatedEnd({
  method: "gap-quantile",
  reason: reasonWithoutFinds,
  estimate: (rangeCase) => {
    const { range, confidence } = rangeCase;
    const gaps = gapsOf(rangeCase);
    const quantile = { confidence, assurance: ASSURANCE };
    const { low, high } = gapBracket(gaps.length, quantile);
    const needed = gapsNeededForQuantile(quantile);
    return {
      bound: high === undefined ? undefined : range.last + gaps[high - 1],
      chanceAt: () => undefined,
      exponent: gaps.length,
      notes: [
        high === undefined
          ? `${gaps.length} gaps, and level ${confidence} takes ${needed}: no bound`
          : `gap ${high} of ${gaps.length} by size, above the ${confidence} quantile of gaps with chance ${ASSURANCE}`,
        low === undefined ? undefined : lowWords(rangeCase, range.last + gaps[low - 1]),
      ],
    };
  },
});

/** The level that the bound at this confidence would not fall short of. */
function lowWords(rangeCase: RangeCase, level: number): string | undefined {
  const heightM = rangeCase.coordinate.toHeight(level, "lower");
  if (heightM === undefined) return undefined;
  const { above } = wordsOf(rangeCase);
  return `the quantile lies ${above} ${levelWords(rangeCase, heightM)} with chance ${ASSURANCE}`;
}
