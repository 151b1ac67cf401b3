import { estimatedEnd } from "./estimate-row.ts";
import { note, type RangeCase, reasonWithoutBound, wordsOf } from "./range-case.ts";
import { twoEndedFactor } from "./uniform.ts";
import { bayesExtension, posteriorPower, shareBeyond } from "./uniform-bayes.ts";
import { bothEnds } from "./uniform-both.ts";
import { fewNote, heightWords, round } from "./uniform-end.ts";

/** Where more of the posterior than this lies beyond the section, a bound inside it says what was assumed. */
const PRIOR_DRIVEN_SHARE = 0.05;

/**
 * The row of method `uniform-bayes`, with the scale prior: bound, median and chance above H. Its note tells the bound
 * with flat priors, and the one if the end is known to lie inside the section.
 */
export const uniformBayesEnd = estimatedEnd({
  method: "uniform-bayes",
  reason: reasonWithoutBound,
  estimate: (rangeCase) => {
    const { range, confidence } = rangeCase;
    const length = range.last - range.base;
    const power = posteriorPower(range.exponent, "scale");
    const at = (extension: number | undefined) =>
      extension === undefined ? undefined : range.last + extension * length;
    const point = at(bayesExtension({ power }, 0.5));
    return {
      bound: at(bayesExtension({ power }, confidence)),
      ...(point === undefined ? {} : { point }),
      chanceAt: (level) => shareBeyond(power, Math.max(0, level - range.last) / length),
      notes: [flatWords(rangeCase), insideWords(rangeCase), fewNote(range.horizons)],
    };
  },
});

/** The row `both`: with the scale prior the joint interval has the level of the one of `uniform`. */
export function uniformBayesBoth(rangeCase: RangeCase) {
  const { horizons } = rangeCase.range;
  return bothEnds(rangeCase, "uniform-bayes", {
    factor: horizons < 2 ? undefined : twoEndedFactor(rangeCase.confidence, horizons),
    exponent: horizons - 1,
  });
}

function flatWords(rangeCase: RangeCase): string {
  const { range, confidence } = rangeCase;
  const extension = bayesExtension({ power: posteriorPower(range.exponent, "flat") }, confidence);
  return extension === undefined
    ? "no bound with flat priors"
    : `with flat priors ${heightWords(rangeCase, range.last + extension * (range.last - range.base))}`;
}

/** The bound if the end lies no higher than the section, and how much of the posterior that takes away. */
function insideWords(rangeCase: RangeCase): string | undefined {
  const { range, coordinate, confidence, topM } = rangeCase;
  const length = range.last - range.base;
  const limit = (coordinate.toEffective(topM) - range.last) / length;
  if (!(limit > 0)) return undefined;
  const power = posteriorPower(range.exponent, "scale");
  const share = shareBeyond(power, limit);
  const extension = bayesExtension({ power, limit }, confidence);
  if (extension === undefined) return undefined;
  const { sectionEnd, above } = wordsOf(rangeCase);
  return note(
    `if it ended short of the ${sectionEnd} ${heightWords(rangeCase, range.last + extension * length)}`,
    share > PRIOR_DRIVEN_SHARE &&
      `${round(share)} of the posterior lies ${above} the ${sectionEnd}: that bound is driven by the prior`,
  );
}
