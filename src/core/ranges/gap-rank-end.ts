import { estimatedEnd } from "./estimate-row.ts";
import { gapChance, gapRank, gapsNeeded, sortedGaps } from "./gap-rank.ts";
import { type RangeCase, reasonWithoutFinds } from "./range-case.ts";

/** The gaps between finds, in effective metres; with a known base the one above it too. */
export function gapsOf({ levels, range }: RangeCase): number[] {
  return sortedGaps(levels, range.mode === "base" ? range.base : undefined);
}

/** The row of method `gap-rank`: `level` is what the bound covers, j / (N + 1), at or above the level asked for. */
export const gapRankEnd = estimatedEnd({
  method: "gap-rank",
  reason: reasonWithoutFinds,
  estimate: (rangeCase) => {
    const { range, confidence } = rangeCase;
    const gaps = gapsOf(rangeCase);
    const ranked = gapRank(gaps.length, confidence);
    const chanceAt = (level: number) => gapChance(gaps, level - range.last);
    if (ranked === undefined)
      return {
        bound: undefined,
        chanceAt,
        exponent: gaps.length,
        notes: [`${gaps.length} gaps, and level ${confidence} takes ${gapsNeeded(confidence)}: no bound`],
      };
    return {
      bound: range.last + gaps[ranked.rank - 1],
      chanceAt,
      exponent: gaps.length,
      level: ranked.level,
      notes: [`gap ${ranked.rank} of ${gaps.length} by size, for level ${confidence}`],
    };
  },
});
