import { describe, expect, it } from "vitest";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { uniformCoordinate } from "../../../../src/core/ranges/coordinate.ts";
import { type EndLikelihood, endLikelihood } from "../../../../src/core/timing/scenarios/end-likelihood.ts";
import { gradual } from "../../../../src/core/timing/scenarios/gradual.ts";
import { singleLevel } from "../../../../src/core/timing/scenarios/single-level.ts";
import { twoPulses } from "../../../../src/core/timing/scenarios/two-pulses.ts";
import { expectRate, isFull, rateOf } from "../ranges/simulated-finds.ts";

/** Finds uniform from 0 to each end; the range from its first find, or from the known base 0. */
function draw(horizons: readonly number[], endsM: readonly number[], g: Generator, isBaseKnown: boolean) {
  return horizons.map((n, i): EndLikelihood => {
    const heights = Array.from({ length: n }, () => endsM[i] * g.uniform()).toSorted((a, b) => a - b);
    const lastM = heights[n - 1];
    const base = isBaseKnown ? 0 : heights[0];
    const exponent = isBaseKnown ? n : n - 1;
    return endLikelihood({ taxon: `t${i}`, lastM, base, last: lastM, exponent }, uniformCoordinate);
  });
}

const unequal = [25, 18, 14, 12, 10, 8, 6, 5];

/**
 * How often each scenario comes first among one level, exactly two pulses and gradual with equal priors, when the ends are
 * these: shares of 250 simulated sections by an independent program (Python 3.11.2, numpy 1.24.2, scipy 1.10.1).
 */
const truths = [
  { name: "one level", endsM: unequal.map(() => 30), best: [0.9, 0.056, 0.044] },
  { name: "22 and 30 m", endsM: unequal.map((_, i) => (i % 2 === 0 ? 30 : 22)), best: [0, 0.672, 0.328] },
  { name: "27 and 30 m", endsM: unequal.map((_, i) => (i % 2 === 0 ? 30 : 27)), best: [0.504, 0.132, 0.364] },
  { name: "evenly 16 to 30 m", endsM: unequal.map((_, i) => 30 - 2 * i), best: [0.008, 0.028, 0.964] },
  { name: "evenly 26 to 30 m", endsM: unequal.map((_, i) => 30 - (4 / 7) * i), best: [0.632, 0.104, 0.264] },
];
const SECTIONS = 250;
const sections = isFull ? 1000 : 48;

describe("the scenario that comes first", () => {
  it.each(truths)("$name", ({ endsM, best }) => {
    const wins = [0, 0, 0];
    const window = { lowM: 10, topsM: [45] };
    rateOf(
      (g) => {
        const taxa = draw(unequal, endsM, g, false);
        // The reference window reaches no lower: ends below it are thought impossible.
        if (taxa.some((taxon) => taxon.lastM < window.lowM)) return undefined;
        const logs = [
          singleLevel(taxa, window).logEvidence[0],
          twoPulses(taxa, window).logEvidence[0],
          gradual(taxa, window, [30]).logEvidence[0][0],
        ];
        wins[logs.indexOf(Math.max(...logs))]++;
        return true;
      },
      { replicates: sections },
    );
    const total = wins[0] + wins[1] + wins[2];
    expect(total).toBeGreaterThan(0.8 * sections);
    best.forEach((share, i) => {
      const spread = Math.max(share * (1 - share), 0.02) * (1 / SECTIONS + 1 / total);
      expect(Math.abs(wins[i] / total - share)).toBeLessThan(3 * Math.sqrt(spread));
    });
  });
});

/**
 * With one known base and a far window the posterior falls as the power s - 1 of the level, s the number of finds, while
 * (M / end)^s is uniform: it covers 0.975^(s / (s - 1)) - 0.025^(s / (s - 1)).
 */
const covered = (finds: number) => 0.975 ** (finds / (finds - 1)) - 0.025 ** (finds / (finds - 1));

describe("the central 95 % interval of one level", () => {
  it.each([
    { name: "3 each", horizons: [3, 3, 3] },
    { name: "5 each", horizons: [5, 5, 5, 5] },
    { name: "10 each", horizons: [10, 10, 10, 10] },
    { name: "20 each", horizons: [20, 20, 20, 20] },
    { name: "2 to 25", horizons: [25, 12, 6, 3, 2] },
  ])("$name", ({ horizons }) => {
    const window = { lowM: 0, topsM: [3000] };
    const finds = horizons.reduce((sum, n) => sum + n, 0);
    const endsM = horizons.map(() => 30);
    const rate = rateOf(
      (g) => {
        const { posterior } = singleLevel(draw(horizons, endsM, g, true), window);
        const below = posterior?.cdf(30) ?? Number.NaN;
        return below > 0.025 && below < 0.975;
      },
      { replicates: isFull ? 20_000 : 600 },
    );
    expectRate(rate, covered(finds));
  });
});
