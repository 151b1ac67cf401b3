import { estimatedEnd } from "./estimate-row.ts";
import { type RangeCase, wordsOf } from "./range-case.ts";
import { type TopFinds, topKBound, topKChance } from "./top-k.ts";
import { reasonWithoutTop } from "./two-highest-end.ts";

/** The k highest finds that a case has, `ranges.topFinds` at most. */
export function topFindsOf({ levels, topFinds, tail }: RangeCase): TopFinds {
  return { finds: Math.max(2, Math.min(topFinds, levels.length)), tail };
}

/** The row of method `top-k`: the bound, its median as point, and p at H; `ranges.tail` is beta, `ranges.topFinds` k. */
export const topKEnd = estimatedEnd({
  method: "top-k",
  reason: (rangeCase) => reasonWithoutTop(rangeCase, topFindsOf(rangeCase).finds),
  estimate: (rangeCase) => {
    const { levels, confidence } = rangeCase;
    const shape = topFindsOf(rangeCase);
    const point = topKBound(levels, shape, 0.5);
    return {
      bound: topKBound(levels, shape, confidence),
      ...(point === undefined ? {} : { point }),
      chanceAt: (level) => topKChance(levels, shape, level),
      exponent: shape.finds - 1,
      notes: [`${shape.finds} ${wordsOf(rangeCase).highest} finds, tail ${shape.tail}`],
    };
  },
});
