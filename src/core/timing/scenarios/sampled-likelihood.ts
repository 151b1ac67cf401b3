import { log } from "../../numeric/elementary.ts";
import type { SampledRange } from "../../ranges/sampled-horizons.ts";
import { chancesOf } from "../../ranges/sampled-range.ts";
import type { EndLikelihood } from "./end-likelihood.ts";

/**
 * What the horizons searched for a taxon say about its end: L(tau) = p(j), the chance of the j barren horizons between
 * its last find and tau, given the detection
 * that their efforts tell; a step at every barren horizon, so that an integral over heights is a
 * sum over horizons weighted by the thickness to the next. 1 with no informative find.
 */
export function sampledLikelihood(
  { taxon, lastM }: { readonly taxon: string; readonly lastM: number },
  sampled: SampledRange,
): EndLikelihood {
  const { count, barrenM } = sampled;
  const above = barrenM.filter((heightM) => heightM > lastM);
  const skipped = barrenM.length - above.length;
  const chances = chancesOf(sampled);
  const chanceAt = (j: number) => (count.finds < 1 ? 1 : chances[j + skipped]);
  const stepsBelow = (heightM: number) => {
    let [low, high] = [0, above.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (above[middle] <= heightM) low = middle + 1;
      else high = middle;
    }
    return low;
  };
  return {
    taxon,
    lastM,
    fromM: lastM,
    kinksM: [lastM, ...above],
    log: (heightM) => (heightM < lastM ? Number.NEGATIVE_INFINITY : log(chanceAt(stepsBelow(heightM)))),
    area: (lowM, highM) => {
      let sum = 0;
      let fromM = Math.max(lowM, lastM);
      for (let j = stepsBelow(fromM); fromM < highM; j++) {
        const toM = Math.min(highM, above[j] ?? highM);
        sum += (toM - fromM) * chanceAt(j);
        fromM = toM;
      }
      return sum;
    },
  };
}
