import { estimatedEnd } from "./estimate-row.ts";
import { type RangeCase, wordsOf } from "./range-case.ts";
import { topKChance } from "./top-k.ts";
import { twoHighestFactor } from "./two-highest.ts";

/** The row of method `two-highest`: the bound, its median as point, and p at H; `ranges.tail` is beta. */
export const twoHighestEnd = estimatedEnd({
  method: "two-highest",
  reason: (rangeCase) => reasonWithoutTop(rangeCase, 2),
  estimate: ({ levels, tail, confidence }) => {
    const last = levels[levels.length - 1];
    const spacing = last - levels[levels.length - 2];
    return {
      bound: last + spacing * twoHighestFactor(confidence, tail),
      point: last + spacing * twoHighestFactor(0.5, tail),
      chanceAt: (level) => topKChance(levels, { finds: 2, tail }, level),
      exponent: 1,
      notes: [`tail ${tail}`],
    };
  },
});

/** Why the `finds` highest finds give no bound; undefined where they do. No base is needed. */
export function reasonWithoutTop(rangeCase: RangeCase, finds: number): string | undefined {
  const { levels, contradicted } = rangeCase;
  if (contradicted > 0) return `${contradicted} finds lie in rock of recovery 0: no bound`;
  if (levels.length === 0) return "published without its finds, which this method needs";
  if (levels.length < finds)
    return `${levels.length === 1 ? "one find" : `${levels.length} finds`}: no bound`;
  const isTied = !(levels[levels.length - 1] > levels[levels.length - finds]);
  const { highest } = wordsOf(rangeCase);
  return isTied
    ? `no rock that could be searched lies between the ${finds} ${highest} finds: no bound`
    : undefined;
}
