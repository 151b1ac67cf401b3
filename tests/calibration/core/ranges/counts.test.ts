import { describe, expect, it } from "vitest";
import { exp, log } from "../../../../src/core/numeric/elementary.ts";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { countsChance, countsLikelihood, countsShape } from "../../../../src/core/ranges/counts.ts";
import { furthestOfChances } from "../../../../src/core/ranges/sampled-odds.ts";
import { endPosterior, endQuantile } from "../../../../src/core/ranges/sampled-posterior.ts";
import { expectRateAtLeast, isFull, rateOf } from "./simulated-finds.ts";

/** Barren samples that the bound may count up to. */
const MANY = 60;
const fewer = isFull ? 20_000 : 600;

/** A count of mean m and shape k by inversion. */
function negativeBinomial(mean: number, shape: number, g: Generator): number {
  let p = exp(shape * log(shape / (shape + mean)));
  let rest = g.uniform() - p;
  let count = 0;
  while (rest > 0 && count < 10_000) {
    p *= ((shape + count) * mean) / ((count + 1) * (shape + mean));
    count++;
    rest -= p;
  }
  return count;
}

interface Truth {
  readonly samples: number;
  readonly mean: number;
  readonly shape: number;
}

/** Counts of the true range from the first find's sample on, that one left out, and the barren samples at the top. */
function draw({ samples, mean, shape }: Truth, g: Generator) {
  const counts = Array.from({ length: samples }, () => negativeBinomial(mean, shape, g));
  const first = counts.findIndex((count) => count > 0);
  const last = counts.findLastIndex((count) => count > 0);
  if (last <= first) return undefined;
  return { counts: counts.slice(first + 1, last + 1), barren: samples - 1 - last };
}

function chances(counts: readonly number[], shape: number): Float64Array {
  const total = counts.reduce((a, b) => a + b, 0);
  return Float64Array.from({ length: MANY }, (_, further) =>
    further === 0 ? 1 : countsChance({ total, inside: counts.length, further }, shape),
  );
}

/** Kappa of largest likelihood taken as known costs at most this much coverage. */
const LOST_TO_FIT = 0.02;

describe.each([
  [10, 0.4, 0.3],
  [20, 0.5, 1],
  [20, 2, 0.3],
  [20, 2, 5],
  [40, 1, 0.5],
] as const)("counts: %i samples of mean %f and kappa %f", (samples, mean, shape) => {
  const truth = { samples, mean, shape };

  it("kappa known: covers at least its level", () => {
    const rate = rateOf((g) => {
      const drawn = draw(truth, g);
      return drawn && drawn.barren <= furthestOfChances(chances(drawn.counts, shape), 0.95);
    });
    expectRateAtLeast(rate, 0.95);
  });

  it("kappa of largest likelihood: covers its level but for two in a hundred", () => {
    const rate = rateOf(
      (g) => {
        const drawn = draw(truth, g);
        const fitted = drawn && countsShape({ counts: drawn.counts, efforts: drawn.counts.map(() => 1) });
        if (drawn === undefined || fitted === undefined) return undefined;
        return drawn.barren <= furthestOfChances(chances(drawn.counts, fitted), 0.95);
      },
      { replicates: fewer },
    );
    expectRateAtLeast(rate, 0.95 - LOST_TO_FIT);
  });

  it("kappa averaged: the posterior bound covers at least its level", () => {
    const edges = Array.from({ length: MANY + 2 }, (_, i) => i);
    const above = edges.slice(0, MANY).map(() => 1);
    const rate = rateOf(
      (g) => {
        const drawn = draw(truth, g);
        if (drawn === undefined) return undefined;
        const counts = { counts: drawn.counts, efforts: drawn.counts.map(() => 1) };
        const posterior = endPosterior(countsLikelihood(counts, above), edges, "height");
        return posterior && drawn.barren <= Math.floor(endQuantile(posterior, 0.95));
      },
      { replicates: fewer },
    );
    expectRateAtLeast(rate, 0.95);
  });
});

it("counts: specimens in clumps taken as independent cover far too little", () => {
  const rate = rateOf((g) => {
    const drawn = draw({ samples: 20, mean: 2, shape: 0.3 }, g);
    return drawn && drawn.barren <= furthestOfChances(chances(drawn.counts, Number.POSITIVE_INFINITY), 0.95);
  });
  expect(rate.hits / rate.trials).toBeLessThan(0.8);
});
