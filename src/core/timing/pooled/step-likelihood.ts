import { exp, log, log1p } from "../../numeric/elementary.ts";
import { logNormalCdf, normalCdf } from "../../numeric/normal.ts";
import { logSumExp } from "../../numeric/sums.ts";
import { floorOf } from "../scenarios/end-grid.ts";
import type { EndLikelihood } from "../scenarios/end-likelihood.ts";
import type { HorizonLaw } from "../scenarios/horizon-law.ts";

/** Standard deviations beyond which a step weighs nothing beside nearer ones. */
const REACH = 9;

/**
 * ln of the mean over a law of prod_i L_i, where every L_i is constant between its kinks, as those of sampled horizons are:
 * the sum over steps of their value times what the law has there.
 */
export function stepMean(taxa: readonly EndLikelihood[]): (law: HorizonLaw) => number {
  const floorM = floorOf(taxa);
  const kinks = taxa.flatMap((taxon) => taxon.kinksM).filter((heightM) => heightM > floorM);
  const startsM = [...new Set([floorM, ...kinks])].toSorted((a, b) => a - b);
  const values = startsM.map((startM, j) => {
    const middleM = j + 1 < startsM.length ? 0.5 * (startM + startsM[j + 1]) : startM + 1;
    return taxa.reduce((sum, taxon) => sum + taxon.log(middleM), 0);
  });
  const stepAt = (heightM: number) => {
    let [low, high] = [0, startsM.length];
    while (low < high) {
      const middle = (low + high) >> 1;
      if (startsM[middle] <= heightM) low = middle + 1;
      else high = middle;
    }
    return low - 1;
  };
  return (law) => {
    if (law.kind === "point") return law.atM < floorM ? Number.NEGATIVE_INFINITY : values[stepAt(law.atM)];
    const [lowM, highM] =
      law.kind === "uniform"
        ? [law.lowM, law.highM]
        : [law.meanM - REACH * law.sdM, Math.max(floorM, law.meanM) + REACH * law.sdM];
    const last = stepAt(highM);
    const terms: number[] = [];
    for (let j = Math.max(0, stepAt(lowM)); j <= last; j++) {
      const topM = startsM[j + 1] ?? Number.POSITIVE_INFINITY;
      terms.push(values[j] + logShare(law, startsM[j], topM));
    }
    return logSumExp(terms);
  };
}

/** ln of what a law has between two heights. */
function logShare(law: Exclude<HorizonLaw, { kind: "point" }>, baseM: number, topM: number): number {
  if (law.kind === "uniform") {
    const share = Math.min(topM, law.highM) - Math.max(baseM, law.lowM);
    return share > 0 ? log(share / (law.highM - law.lowM)) : Number.NEGATIVE_INFINITY;
  }
  const [a, b] = [(baseM - law.meanM) / law.sdM, (topM - law.meanM) / law.sdM];
  if (a < 0 && b > 0) return log1p(-normalCdf(a) - normalCdf(-b));
  const [far, near] = a >= 0 ? [-b, -a] : [a, b];
  const larger = logNormalCdf(near);
  return larger + log1p(-exp(logNormalCdf(far) - larger));
}
