import { describe, expect, it } from "vitest";
import { poissonBinomial } from "../../../../src/core/numeric/poisson-binomial.ts";
import type { Generator } from "../../../../src/core/numeric/streams.ts";
import { quantile } from "../../../../src/core/numeric/sums.ts";
import type { EffectiveRange } from "../../../../src/core/ranges/pivot.ts";
import { chancesAbove, expectedLasts } from "../../../../src/core/timing/last-finds.ts";
import { localLevel } from "../../../../src/core/timing/last-finds-band.ts";
import { fitPulses } from "../../../../src/core/timing/pulses.ts";
import { pulsesBootstrap } from "../../../../src/core/timing/pulses-bootstrap.ts";
import { rarityTest } from "../../../../src/core/timing/rank-correlation.ts";
import { surfaceClustering } from "../../../../src/core/timing/surfaces.ts";
import {
  expectRate,
  expectRateAtLeast,
  expectRateAtMost,
  isFull,
  rateOf,
} from "../ranges/simulated-finds.ts";
import { drawRanges, END, samples } from "./shapes.ts";

/** A bootstrap or permutations inside every trial: fewer trials. */
const few = { replicates: isFull ? 10_000 : 600 };
const inner = { seed: 11, replicates: 99 };

describe("the number of pulses", () => {
  it.each(samples)("$name: one true pulse is rejected in 5%", ({ horizons }) => {
    expectRate(
      rateOf((g) => (pulsesBootstrap(drawRanges(horizons, g), 1, inner)?.p ?? 1) <= 0.05, few),
      0.05,
    );
  });

  it("one pulse is rejected where there are two far apart, and two of them are then enough", () => {
    const horizons = [20, 18, 14, 12, 12, 10, 8, 8];
    const ends = horizons.map((_, i) => (i % 2 === 0 ? 18 : END));
    const draw = (g: Generator) => drawRanges(horizons, g, { ends });
    expectRateAtLeast(
      rateOf((g) => (pulsesBootstrap(draw(g), 1, inner)?.p ?? 1) <= 0.05, few),
      0.95,
    );
    expectRateAtMost(
      rateOf((g) => (pulsesBootstrap(draw(g), 2, inner)?.p ?? 1) <= 0.05, few),
      0.06,
    );
  });

  // Medians and 95% points of 2 (ll_2 - ll_1) for one true pulse, Monte Carlo of 20000 in Python (numpy 1.24).
  it.each([
    { k: 5, middle: 4.876, high: 10.823 },
    { k: 8, middle: 7.714, high: 14.375 },
    { k: 12, middle: 11.154, high: 18.465 },
    { k: 20, middle: 17.563, high: 26.473 },
  ])("of $k taxa with equal finds and bases gain by a second pulse as outside", ({ k, middle, high }) => {
    const gains = gainsOf((g) =>
      Array.from({ length: k }, () => ({ base: 0, last: g.uniform() ** (1 / 10), exponent: 10 })),
    );
    expect(Math.abs(quantile(gains, 0.5) - middle)).toBeLessThan(0.4);
    expect(Math.abs(quantile(gains, 0.95) - high)).toBeLessThan(0.9);
  });

  // The same for 25 to 5 finds from the first find: 7.363 and 13.934, Monte Carlo of 40000 in Python (numpy 1.24).
  it("of taxa with unequal finds gain less", () => {
    const gains = gainsOf((g) => drawRanges([25, 18, 14, 12, 10, 8, 6, 5], g, { isStartShared: true }));
    expect(Math.abs(quantile(gains, 0.5) - 7.363)).toBeLessThan(0.4);
    expect(Math.abs(quantile(gains, 0.95) - 13.934)).toBeLessThan(0.9);
  });
});

function gainsOf(draw: (g: Generator) => readonly EffectiveRange[]): number[] {
  const gains: number[] = [];
  rateOf((g) => {
    const [one, two] = fitPulses(draw(g), 2);
    gains.push(2 * (two.logLikelihood - one.logLikelihood));
    return true;
  });
  return gains;
}

describe("rarity", () => {
  it.each([4, 9, 14])("of %i taxa rejects in 5% or less where it has no part", (k) => {
    const abundance = Array.from({ length: k }, (_, i) => 3 + (i % 6));
    expectRateAtMost(
      rateOf(
        (g) =>
          (rarityTest(
            abundance,
            Array.from({ length: k }, () => g.uniform()),
            inner,
          )?.p ?? 1) <= 0.05,
        few,
      ),
      0.05,
    );
  });

  it("by density has no mechanical link with the last find; by number of finds it has", () => {
    // Ten taxa of 0.5 finds a metre, ends 16 to 30 m: mean rho 0.593 by number, 0.017 by (n - 2) / (M - x_1), Monte Carlo of
    // 20000 in Python (numpy 1.24).
    const sums = { number: 0, density: 0, trials: 0 };
    rateOf((g) => {
      const ranges = Array.from({ length: 10 }, (_, i) => poissonFinds(16 + (14 * i) / 9, g));
      const lasts = ranges.map((levels) => levels[levels.length - 1]);
      const counts = ranges.map((levels) => levels.length);
      const density = ranges.map((levels, i) => (levels.length - 2) / (lasts[i] - levels[0]));
      sums.number += rarityTest(counts, lasts, { ...inner, replicates: 1 })?.rho ?? 0;
      sums.density += rarityTest(density, lasts, { ...inner, replicates: 1 })?.rho ?? 0;
      sums.trials++;
      return true;
    });
    expect(Math.abs(sums.number / sums.trials - 0.593)).toBeLessThan(0.03);
    expect(Math.abs(sums.density / sums.trials - 0.017)).toBeLessThan(0.03);
  });
});

/** Finds of a taxon with 0.5 finds a metre from 0 to its end; at least three. */
function poissonFinds(end: number, g: Generator): readonly number[] {
  const levels: number[] = [];
  for (let at = g.exponential() / 0.5; at < end; at += g.exponential() / 0.5) levels.push(at);
  while (levels.length < 3) levels.push(end * g.uniform());
  return levels.toSorted((a, b) => a - b);
}

const zone = { low: 5, high: 30 };
const windows = [6, 16, 17, 24].map((s) => ({ low: s - 2, high: s }));
const together = (g: Generator) => {
  const at = zone.low + 25 * g.uniform();
  return surfaceClustering(
    Array.from({ length: 10 }, () => at - 0.01 * g.uniform()).filter((x) => x >= zone.low),
    windows,
    zone,
  );
};

describe("last finds that lie anywhere on the zone", () => {
  it.each([3, 5, 10, 20])("of %i taxa seem to cluster at surfaces in 5% or less", (k) => {
    const clustering = (g: Generator) =>
      surfaceClustering(
        Array.from({ length: k }, () => zone.low + 25 * g.uniform()),
        windows,
        zone,
      );
    expectRateAtMost(
      rateOf((g) => (clustering(g)?.binomialP ?? 1) <= 0.05),
      0.05,
    );
    expectRateAtMost(
      rateOf((g) => (clustering(g)?.shiftP ?? 1) <= 0.05),
      0.05,
    );
  });

  it("do not where all of them end together: by shifting, but by the binomial they may", () => {
    const shifted = rateOf((g) => (together(g)?.shiftP ?? 1) <= 0.25);
    const counted = rateOf((g) => (together(g)?.binomialP ?? 1) <= 0.05);
    expectRateAtMost(shifted, 0.25);
    expect(counted.hits / counted.trials).toBeGreaterThan(0.2);
  });
});

describe.each(samples)("$name: last finds of ranges that end together", ({ horizons }) => {
  it("lie in the pointwise band at each level, and along the whole curve in the other, at their level", () => {
    const ranges = horizons.map((n, i) => ({ base: i, last: END, exponent: n - 1 }));
    const local = localLevel(ranges, END, { confidence: 0.95, simulation: { seed: 3, replicates: 4000 } });
    const bandAt = (x: number) => expectedLasts(chancesAbove(ranges, x, END), { confidence: 0.95, local });
    const fixed = 26;
    const atFixed = bandAt(fixed);
    let fallsOutside = 0;
    const whole = rateOf((g) => {
      const lasts = ranges
        .map(({ base, exponent }) => base + (END - base) * g.uniform() ** (1 / exponent))
        .toSorted((a, b) => a - b);
      const above = lasts.filter((x) => x > fixed).length;
      if (above < atFixed.low || above > atFixed.high) fallsOutside++;
      return lasts.every((x, i) => {
        const { lowAll, highAll } = bandAt(x);
        return lowAll <= lasts.length - 1 - i && lasts.length - i <= highAll;
      });
    });
    expectRate(whole, 0.95);
    expectRateAtMost({ hits: fallsOutside, trials: whole.trials }, 0.05);
  });
});

it("the number of successes among unequal trials has its simulated distribution", () => {
  const chances = Float64Array.of(0.9, 0.5, 0.2, 0.05);
  const distribution = poissonBinomial(chances);
  for (const count of [0, 1, 2, 3, 4])
    expectRate(
      rateOf((g) => chances.filter((p) => g.uniform() < p).length === count),
      distribution[count],
    );
});
