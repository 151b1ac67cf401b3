import type { Caution } from "../basis.ts";
import { median } from "../numeric/sums.ts";
import type { Search } from "../study/model.ts";
import type { SetCase } from "./set-case.ts";

/** Samples above the highest last find whose effort is compared with what was spent below it. */
const SAMPLES_ABOVE = 5;
/** Less than this share of the effort below: absence above counts for much less. */
const LESSER_SHARE = 0.5;

/**
 * Where the samples just above the highest last find are much smaller than those below it, taxa can go unseen there
 * although recovery per metre is taken as uniform: the common level is then put too low.
 */
export function effortCautions({ section, set }: SetCase): Caution[] {
  if (set.ranges.length === 0) return [];
  const groups = [...new Set(set.ranges.map((range) => range.group))];
  const highestM = Math.max(...set.ranges.map((range) => range.lastM));
  return groups.flatMap((group) => {
    const searches = section.searches.filter((search) => search.group === group);
    const numbers = lesserEffort(searches, highestM);
    return numbers === undefined
      ? []
      : [
          {
            code: "timing-less-effort-above",
            section: section.name,
            subject: set.set,
            numbers: { group, ...numbers },
          },
        ];
  });
}

function lesserEffort(searches: readonly Search[], highestM: number) {
  const unit = searches.find((search) => search.effortUnit !== undefined)?.effortUnit ?? "";
  const measured = searches
    .flatMap(({ heightM, effort, effortUnit = "" }) =>
      effort === undefined || effortUnit !== unit ? [] : [{ heightM, effort }],
    )
    .toSorted((a, b) => a.heightM - b.heightM);
  const above = measured.filter(({ heightM }) => heightM > highestM).slice(0, SAMPLES_ABOVE);
  const below = measured.filter(({ heightM }) => heightM <= highestM);
  if (above.length < SAMPLES_ABOVE || below.length < SAMPLES_ABOVE) return undefined;
  const [effortAbove, effortBelow] = [above, below].map((side) => median(side.map(({ effort }) => effort)));
  return effortAbove < LESSER_SHARE * effortBelow
    ? { above: effortAbove, below: effortBelow, unit }
    : undefined;
}
