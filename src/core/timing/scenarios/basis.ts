import type { Basis } from "../../basis.ts";

const uniformFinds =
  "Finds are independent and uniform, in the recovery-weighted coordinate, over each true range; where recovery declines upward the comparison leans on it.";
const flatPriors =
  "Levels are flat in height over timing.window, durations flat up to timing.longestDuration; the answer with both halved and doubled is always beside.";

/** The comparison of scenarios, as the methods text states it. */
export const scenarioBasis: readonly Basis[] = [
  {
    method: "scenarios",
    statement:
      "Evidence of one level, of exactly two to four pulses, of a gradual end, of one level at a marker horizon and of independent ends, each the likelihood of all last finds averaged over its prior by deterministic quadrature in logarithms; more than 14 taxa in four pulses, or 20 in three, by importance sampling with its error. Probabilities are over the scenarios that have a prior.",
    assumptions: [
      uniformFinds,
      "Where searches are listed a taxon is found in samples searched for its group alone, by their effort: all ends between two of them are equally likely (variant continuous: finds could lie anywhere). Where they are not, the reverse (variant sampled).",
      flatPriors,
      "A scenario that allows more is not better for it: it spreads its prior over more possibilities, and only data that need them pay for that; a wider window or longer duration lowers the evidence of the scenarios that use it.",
      "One level at a marker horizon is one idea, its prior shared among the horizons; among-horizons is their sum and is not counted again.",
      "In pulses the shares of taxa are equally likely beforehand (variant equal: every allocation is), and every pulse holds a taxon.",
      "Pulses nearer than about 10 to 15 per cent of the ranges cannot be told apart by such data.",
    ],
    sources: [],
    after: false,
  },
  {
    method: "duration-posterior",
    statement:
      "Height over which the ends were spread if they were spread evenly: posterior of the duration with its top integrated out.",
    assumptions: [
      uniformFinds,
      flatPriors,
      "Ends are independent and uniform between the base and the top of the disappearance.",
    ],
    sources: [],
    after: false,
  },
  {
    method: "pulses-posterior",
    statement:
      "Posterior probability of each number of levels, one level anywhere and at the marker horizons together; gradual ends hold the rest.",
    assumptions: [uniformFinds, flatPriors],
    sources: [],
    after: false,
  },
];
