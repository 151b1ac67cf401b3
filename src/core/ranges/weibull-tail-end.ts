import { estimatedEnd } from "./estimate-row.ts";
import { type RangeCase, reasonWithoutFinds, wordsOf } from "./range-case.ts";
import { round } from "./uniform-end.ts";
import {
  tailBound,
  tailChance,
  tailPoint,
  tailShape,
  type WithoutTail,
  withoutTail,
} from "./weibull-tail.ts";
import { tailCoverage } from "./weibull-tail-coverage.ts";

/** With fewer finds than this the shape is hardly known. */
const ADVISED_FINDS = 5;

const without: Readonly<Record<WithoutTail, string>> = {
  "too-few": "fewer than three finds: no shape of the tail",
  "tied-top": "no rock that could be searched lies between the two outermost finds: no shape of the tail",
  "tied-below": "all finds but one lie at one level of recovery: no shape of the tail",
};

/** The row of method `weibull-tail`: bound, optimal linear estimate, p at H; its note tells what the bound covers. */
export const weibullTailEnd = estimatedEnd({
  method: "weibull-tail",
  reason: (rangeCase) => {
    const reason = withoutTail(topDown(rangeCase));
    return reasonWithoutFinds(rangeCase) ?? (reason === undefined ? undefined : without[reason]);
  },
  estimate: (rangeCase) => {
    const finds = topDown(rangeCase);
    const bound = tailBound(finds, 1 - rangeCase.confidence);
    return {
      bound,
      point: tailPoint(finds),
      chanceAt: (level) => tailChance(finds, level),
      exponent: finds.length,
      notes: [
        bound === undefined ? `${finds.length} finds give no bound at this level` : undefined,
        `shape ${round(tailShape(finds))}`,
        coverageWords(rangeCase),
        finds.length < ADVISED_FINDS ? `${finds.length} finds: the shape is hardly known` : undefined,
      ],
    };
  },
});

function topDown({ levels }: RangeCase): readonly number[] {
  return levels.toReversed();
}

function coverageWords(rangeCase: RangeCase): string | undefined {
  const { levels, confidence } = rangeCase;
  const covers = tailCoverage(levels.length, confidence);
  if (covers === undefined) return undefined;
  const { upward } = wordsOf(rangeCase);
  return `the bound covers about ${covers.uniform} where finds are uniform, ${covers.thinning} where they thin out ${upward} in a straight line`;
}
