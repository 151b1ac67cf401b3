import type { Basis } from "../basis.ts";
import { countsBasis, recoveryBasis, sampledBasis, uniformBasis, windowBasis } from "./basis.ts";
import { countsEnd, countsSurvival } from "./counts-end.ts";
import { decliningEnd } from "./declining-end.ts";
import { gapQuantileEnd } from "./gap-quantile-end.ts";
import { gapRankEnd } from "./gap-rank-end.ts";
import type { RangeCase } from "./range-case.ts";
import { recoveryEnd, recoverySurvival } from "./recovery-end.ts";
import type { RangeEnd, RangeMethod } from "./result.ts";
import { sampledEnd, sampledSurvival } from "./sampled-end.ts";
import { sightingRateEnd } from "./sighting-rate-end.ts";
import {
  decliningBasis,
  gapQuantileBasis,
  gapRankBasis,
  sightingRateBasis,
  topKBasis,
  twoHighestBasis,
  uniformBayesBasis,
  weibullTailBasis,
  windowTrendBasis,
} from "./single-taxon-basis.ts";
import { pivotSurvival, type Survival } from "./survival.ts";
import { topKEnd } from "./top-k-end.ts";
import { twoHighestEnd } from "./two-highest-end.ts";
import { uniformBayesBoth, uniformBayesEnd } from "./uniform-bayes-end.ts";
import { uniformBoth } from "./uniform-both.ts";
import { uniformEnd } from "./uniform-end.ts";
import { weibullTailEnd } from "./weibull-tail-end.ts";
import { windowEnd } from "./window-end.ts";
import { windowTrendEnd } from "./window-trend-end.ts";

/** One estimator of a true end: its row for a case, and what it rests on. It always looks upward. */
export interface RangeEstimator {
  readonly end: (rangeCase: RangeCase) => RangeEnd;
  /** What its taper is drawn from; undefined where it says nothing about the case. */
  readonly survival: (rangeCase: RangeCase) => Survival | undefined;
  /** One interval that holds base and top together; from the case of the top. */
  readonly both?: (rangeCase: RangeCase) => RangeEnd;
  readonly basis: Basis;
}

/** Every method that `ranges.methods` may name. */
export const rangeMethods: Readonly<Record<RangeMethod, RangeEstimator>> = {
  uniform: {
    end: uniformEnd,
    survival: (c) => pivotSurvival(c, c.constant),
    both: uniformBoth,
    basis: uniformBasis,
  },
  recovery: { end: recoveryEnd, survival: recoverySurvival, basis: recoveryBasis },
  counts: { end: countsEnd, survival: countsSurvival, basis: countsBasis },
  window: { end: windowEnd, survival: (c) => pivotSurvival(c, c), basis: windowBasis },
  sampled: { end: sampledEnd, survival: sampledSurvival, basis: sampledBasis },
  "uniform-bayes": {
    end: uniformBayesEnd,
    survival: uniformBayesEnd.survival,
    both: uniformBayesBoth,
    basis: uniformBayesBasis,
  },
  "window-trend": { end: windowTrendEnd, survival: windowTrendEnd.survival, basis: windowTrendBasis },
  "gap-rank": { end: gapRankEnd, survival: gapRankEnd.survival, basis: gapRankBasis },
  "gap-quantile": { end: gapQuantileEnd, survival: gapQuantileEnd.survival, basis: gapQuantileBasis },
  "weibull-tail": { end: weibullTailEnd, survival: weibullTailEnd.survival, basis: weibullTailBasis },
  declining: { end: decliningEnd, survival: decliningEnd.survival, basis: decliningBasis },
  "sighting-rate": { end: sightingRateEnd, survival: sightingRateEnd.survival, basis: sightingRateBasis },
  "two-highest": { end: twoHighestEnd, survival: twoHighestEnd.survival, basis: twoHighestBasis },
  "top-k": { end: topKEnd, survival: topKEnd.survival, basis: topKBasis },
};
