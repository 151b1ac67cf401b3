import { bench, describe } from "vitest";
import { blockGenerator } from "../../../src/core/numeric/streams.ts";
import { uniformCoordinate } from "../../../src/core/ranges/coordinate.ts";
import { type EndLikelihood, endLikelihood } from "../../../src/core/timing/scenarios/end-likelihood.ts";
import { scenarioEvidence } from "../../../src/core/timing/scenarios/evidence.ts";

/** The comparison of scenarios of 60 taxa, with every halved and doubled prior, by truth and by number of pulses. */
const TAXA = 60;
const truths: Readonly<Record<string, (i: number) => number>> = {
  "one level": () => 30,
  "two levels": (i) => (i % 3 === 0 ? 24 : 30),
  "evenly over 14 m": (i) => 16 + (14 * i) / TAXA,
};

function simulated(endOf: (i: number) => number): EndLikelihood[] {
  const g = blockGenerator(1, "example", 0);
  return Array.from({ length: TAXA }, (_, i) => {
    const heights = Array.from({ length: 3 + g.integer(20) }, () => endOf(i) * g.uniform());
    const [base, last] = [Math.min(...heights), Math.max(...heights)];
    const range = { taxon: `t${i}`, lastM: last, base, last, exponent: heights.length - 1 };
    return endLikelihood(range, uniformCoordinate);
  });
}

const once = { iterations: 2, warmupIterations: 1, time: 0, warmupTime: 0 };

describe(`${TAXA} taxa`, () => {
  for (const [truth, endOf] of Object.entries(truths)) {
    const problem = { taxa: simulated(endOf), lowM: 5, highM: 45, longestM: 30, horizons: [], seed: 1 };
    for (const pulses of [2, 3])
      bench(`up to ${pulses} pulses, ${truth}`, () => void scenarioEvidence({ ...problem, pulses }), once);
  }
});
