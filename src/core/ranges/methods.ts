import type { Basis } from "../basis.ts";
import { countsBasis, recoveryBasis, sampledBasis, uniformBasis, windowBasis } from "./basis.ts";
import { countsEnd } from "./counts-end.ts";
import { decliningEnd } from "./declining-end.ts";
import { gapQuantileEnd } from "./gap-quantile-end.ts";
import { gapRankEnd } from "./gap-rank-end.ts";
import type { RangeCase } from "./range-case.ts";
import { recoveryEnd } from "./recovery-end.ts";
import type { RangeEnd, RangeMethod } from "./result.ts";
import { sampledEnd } from "./sampled-end.ts";
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
  /** One interval that holds base and top together; from the case of the top. */
  readonly both?: (rangeCase: RangeCase) => RangeEnd;
  readonly basis: Basis;
}

/** Every method that `ranges.methods` may name. */
export const rangeMethods: Readonly<Record<RangeMethod, RangeEstimator>> = {
  uniform: { end: uniformEnd, both: uniformBoth, basis: uniformBasis },
  recovery: { end: recoveryEnd, basis: recoveryBasis },
  counts: { end: countsEnd, basis: countsBasis },
  window: { end: windowEnd, basis: windowBasis },
  sampled: { end: sampledEnd, basis: sampledBasis },
  "uniform-bayes": { end: uniformBayesEnd, both: uniformBayesBoth, basis: uniformBayesBasis },
  "window-trend": { end: windowTrendEnd, basis: windowTrendBasis },
  "gap-rank": { end: gapRankEnd, basis: gapRankBasis },
  "gap-quantile": { end: gapQuantileEnd, basis: gapQuantileBasis },
  "weibull-tail": { end: weibullTailEnd, basis: weibullTailBasis },
  declining: { end: decliningEnd, basis: decliningBasis },
  "sighting-rate": { end: sightingRateEnd, basis: sightingRateBasis },
  "two-highest": { end: twoHighestEnd, basis: twoHighestBasis },
  "top-k": { end: topKEnd, basis: topKBasis },
};
