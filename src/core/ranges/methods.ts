import type { Basis } from "../basis.ts";
import { recoveryBasis, sampledBasis, uniformBasis, windowBasis } from "./basis.ts";
import type { RangeCase } from "./range-case.ts";
import { recoveryEnd } from "./recovery-end.ts";
import type { RangeEnd, RangeMethod } from "./result.ts";
import { sampledEnd } from "./sampled-end.ts";
import { uniformBoth } from "./uniform-both.ts";
import { uniformEnd } from "./uniform-end.ts";
import { windowEnd } from "./window-end.ts";

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
  window: { end: windowEnd, basis: windowBasis },
  sampled: { end: sampledEnd, basis: sampledBasis },
};
