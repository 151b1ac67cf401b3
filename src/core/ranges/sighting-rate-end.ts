import { estimatedEnd } from "./estimate-row.ts";
import { reasonWithoutBound } from "./range-case.ts";
import { sightingRateBound, sightingRateChance, sightingRateCoverage } from "./sighting-rate.ts";
import { round } from "./uniform-end.ts";
import { levelAsked } from "./window-end.ts";

/** The row of method `sighting-rate`, given for comparison: its note says what the bound covers in truth. */
export const sightingRateEnd = estimatedEnd({
  method: "sighting-rate",
  reason: reasonWithoutBound,
  estimate: (rangeCase) => {
    const { range, confidence } = rangeCase;
    const covers = round(sightingRateCoverage(range.exponent, confidence));
    return {
      bound: sightingRateBound(range, confidence),
      chanceAt: (level) => sightingRateChance(range, level),
      asked: levelAsked(rangeCase),
      notes: [`the rate is taken as known: the bound covers ${covers} where finds are uniform`],
    };
  },
});
