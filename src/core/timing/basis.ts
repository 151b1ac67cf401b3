import type { Basis, Source } from "../basis.ts";
import { assemblageBasis } from "./basis-assemblage.ts";
import { checkBasis } from "./basis-checks.ts";
import { pooledBasis } from "./pooled/basis.ts";
import { scenarioBasis } from "./scenarios/basis.ts";

const solow1996: Source = {
  authors: "Solow, A. R.",
  year: 1996,
  title: "Tests and confidence intervals for a common upper endpoint in fossil taxa",
  place: "Paleobiology 22:406-410",
};
const wang2009: Source = {
  authors: "Wang, S. C., Chudzicki, D. J. & Everson, P. J.",
  year: 2009,
  title: "Optimal estimators of the position of a mass extinction when recovery potential is uniform",
  place: "Paleobiology 35:447-459",
};
const springer1990: Source = {
  authors: "Springer, M. S.",
  year: 1990,
  title: "The effect of random range truncations on patterns of evolution in the fossil record",
  place: "Paleobiology 16:512-520",
};
const wang2012: Source = {
  authors: "Wang, S. C., Zimmerman, A. E., McVeigh, B. S., Everson, P. J. & Wong, H.",
  year: 2012,
  title: "Confidence intervals for the duration of a mass extinction",
  place: "Paleobiology 38:265-277",
};
const solowSmith2000: Source = {
  authors: "Solow, A. R. & Smith, W. K.",
  year: 2000,
  title: "Testing for a mass extinction without selecting taxa",
  place: "Paleobiology 26:647-650",
};
const uniformFinds =
  "Finds are independent and uniform, in the recovery-weighted coordinate, over each true range.";
const declaredTaxa =
  "Taxa enter by a declared rule that does not read how near the horizon their last finds lie; survivors are left out.";

export const timingBasis: readonly Basis[] = [
  {
    method: "common-end",
    statement:
      "Exact test that all ranges end at one level: T = 2 sum m ln((M* - b)/(M - b)) is chi-square with 2(k - 1) degrees of freedom.",
    assumptions: [
      uniformFinds,
      declaredTaxa,
      "It is as much a test of uniform recovery as of one level: where recovery declines upward it rejects far too often.",
    ],
    sources: [solow1996, solowSmith2000],
    after: true,
  },
  {
    method: "common-end-given",
    statement:
      "One-sided interval of the common level, given that there is one, from the highest last find upward; the estimate is its 50% bound.",
    assumptions: [uniformFinds, declaredTaxa, "All ranges end at one level."],
    sources: [solow1996, wang2009],
    after: true,
  },
  {
    method: "common-end-joint",
    statement:
      "Every level at which all ranges could have ended together; an empty set is evidence against any common level.",
    assumptions: [uniformFinds, declaredTaxa],
    sources: [solow1996],
    after: true,
  },
  {
    method: "confidence-levels",
    statement:
      "At a level, the confidence that each range needs to reach it is uniform on (0, 1) if all ended there: exact Kolmogorov-Smirnov test; over an interval the largest p.",
    assumptions: [uniformFinds, declaredTaxa],
    sources: [springer1990],
    after: true,
  },
  {
    method: "duration-lower",
    statement:
      "Least height between the lowest and the highest true end that is not excluded; valid whatever the arrangement of true ends.",
    assumptions: [uniformFinds, declaredTaxa],
    sources: [wang2012],
    after: true,
  },
  {
    method: "duration-box",
    statement:
      "Limits of the height between the lowest and the highest true end from one-ended intervals at level C^(1/k): wide, and decided by the rarest taxa.",
    assumptions: [uniformFinds, "It speaks of the taxa used alone, chosen by their number of horizons."],
    sources: [wang2012],
    after: true,
  },
  ...assemblageBasis,
  ...checkBasis,
  ...scenarioBasis,
  ...pooledBasis,
];
