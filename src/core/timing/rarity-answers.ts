import type { TaxonRange } from "./range-data.ts";
import { rarityTest } from "./rank-correlation.ts";
import type { TimingAnswer } from "./result.ts";
import { commonFields, type SetCase, simulationOf } from "./set-case.ts";

/** `rarity`: do rarer taxa disappear lower? By numbers of horizons, and by their density, which is not tied to the last find. */
export function rarityAnswers(setCase: SetCase): TimingAnswer[] {
  const { ranges } = setCase.set;
  const dense = ranges.filter((range) => densityOf(range) !== undefined);
  return [
    rarityAnswer(setCase, ranges, { abundance: (range) => range.horizons, words: "number of horizons" }),
    rarityAnswer(setCase, dense, {
      abundance: (range) => densityOf(range) ?? 0,
      words: "horizons per metre between the ends, conditionally unbiased",
    }),
  ];
}

interface Abundance {
  readonly abundance: (range: TaxonRange) => number;
  readonly words: string;
}

function rarityAnswer(
  setCase: SetCase,
  ranges: readonly TaxonRange[],
  { abundance, words }: Abundance,
): TimingAnswer {
  const fields = {
    ...commonFields(setCase, ranges.length),
    question: "rarity",
    method: "rank-correlation",
  } as const;
  const lasts = ranges.map((range) => range.last);
  const test = rarityTest(ranges.map(abundance), lasts, simulationOf(setCase.settings));
  if (test === undefined)
    return { ...fields, outcome: "undefined", note: `${words}: fewer than three taxa, or all alike` };
  const mcError = test.mcError === undefined ? {} : { mcError: test.mcError };
  return { ...fields, testStatistic: test.rho, p: test.p, ...mcError, outcome: "closed", note: words };
}

/**
 * (n - 1) / (M - b) with a known base, (n - 2) / (M - x_1) from the first find: given the end finds, the finds between are
 * Poisson, so that this has no mechanical link with the last find. Undefined where no find lies between.
 */
function densityOf({ exponent, last, base }: TaxonRange): number | undefined {
  return exponent >= 2 && last > base ? (exponent - 1) / (last - base) : undefined;
}
